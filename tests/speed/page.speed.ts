/**
 * A signed-in lesson page, as a share of what a page of the same bytes and headers reaches that is only sent: the same front, the
 * same compression, the same load, in turns. 0.5 or more is the aim. Two figures, since a page is kept while nothing changes.
 */
import autocannon from 'autocannon';
import { spawn, type ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { cookiesOf, ended, freePort, site, stopSite, untilSaid, type Site } from './site.ts';

const LESSON = '/lessons/meeting-a-buffer';
const SECONDS = 4;
const ROUNDS = 5;
const VISITS = 60;

let hello: ChildProcess | undefined;
let folder: string | undefined;

async function requestsPerSecond(url: string, cookie: string): Promise<number> {
  const result = await autocannon({
    url,
    connections: 10,
    duration: SECONDS,
    headers: { cookie, accept: 'text/html', 'accept-encoding': 'br' },
  });
  if (result.non2xx > 0 || result.errors > 0)
    throw new Error(`${url}: ${result.non2xx} other answers, ${result.errors} errors`);
  return result.requests.average;
}

interface Both {
  readonly one: Site;
  readonly cookie: string;
  /** Address of the page that is only sent. */
  readonly plain: string;
}
let both: Promise<Both> | undefined;

/** The product, somebody signed in, and the same page from a server that does nothing else. */
const sides = (): Promise<Both> => (both ??= startSides());

async function startSides(): Promise<Both> {
  const one = await site();
  const cookie = await cookiesOf(one, 'ikaika');
  const page = await (await fetch(one.address + LESSON, { headers: { cookie } })).text();
  folder = await mkdtemp(join(tmpdir(), 'dropwise-hello-'));
  await writeFile(join(folder, 'page.html'), page);
  const port = await freePort();
  hello = spawn(
    process.execPath,
    ['--import', 'tsx', 'tests/speed/hello.ts', join(folder, 'page.html'), String(port)],
    { stdio: ['ignore', 'pipe', 'pipe'], env: { ...process.env, NODE_ENV: 'production' } },
  );
  await untilSaid(hello, 'listening');
  return { one, cookie, plain: `http://127.0.0.1:${port}/` };
}

const middle = (values: number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

/** Opened again, as by a class of the same state or by somebody who comes back: the page is kept. */
async function openedAgain(): Promise<{ median: number; samples: number }> {
  const { one, cookie, plain } = await sides();
  const ratios: number[] = [];
  for (let round = 0; round <= ROUNDS; round++) {
    const sent = await requestsPerSecond(plain, cookie);
    const lesson = await requestsPerSecond(one.address + LESSON, cookie);
    // The first round warms both up.
    if (round > 0) ratios.push(lesson / sent);
  }
  return { median: middle(ratios), samples: ROUNDS };
}

/** Opened after a move: it has to be made anew. One request at a time, the move between them not counted. */
async function afterAMove(): Promise<{ median: number; samples: number }> {
  const { one, cookie, plain } = await sides();
  const headers = { cookie, accept: 'text/html', 'accept-encoding': 'br' };
  const timed = async (url: string): Promise<number> => {
    const began = performance.now();
    const answer = await fetch(url, { headers });
    await answer.text();
    if (!answer.ok) throw new Error(`${url}: ${answer.status}`);
    return performance.now() - began;
  };
  const post = async (path: string, data: object): Promise<void> => {
    const answer = await fetch(one.address + path, {
      method: 'POST',
      headers: { cookie, origin: one.address, 'content-type': 'application/json' },
      body: JSON.stringify(data),
    });
    if (!answer.ok) throw new Error(`${path}: ${answer.status} ${await answer.text()}`);
  };
  const runId = randomUUID();
  await post('/api/runs', { runId, lesson: 'meeting-a-buffer', bench: 'water-or-buffer', seed: 1 });
  const [lesson, sent]: [number[], number[]] = [[], []];
  for (let i = 0; i < VISITS; i++) {
    const move = i % 2 === 0 ? { kind: 'drip', from: 'acid', into: 'water', drops: 1 } : { kind: 'undo' };
    await post(`/api/runs/${runId}/moves`, { after: i, moves: [{ opId: randomUUID(), move }] });
    lesson.push(await timed(one.address + LESSON));
    sent.push(await timed(plain));
  }
  return { median: middle(sent) / middle(lesson), samples: VISITS };
}

export const benchmarks = [
  { name: 'lesson page again / hello page', unit: 'ratio', run: openedAgain },
  { name: 'lesson page after a move / hello', unit: 'ratio', run: afterAMove },
];

export async function finish(): Promise<void> {
  if (hello) await ended(hello);
  if (folder) await rm(folder, { recursive: true });
  await stopSite();
}
