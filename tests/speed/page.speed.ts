/**
 * A signed-in lesson page, as a share of what a page of the same bytes and headers reaches that is only sent: the same front, the
 * same compression, the same load, in turns. 0.5 or more is the aim.
 */
import autocannon from 'autocannon';
import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { cookiesOf, ended, freePort, site, stopSite, untilSaid } from './site.ts';

const LESSON = '/lessons/meeting-a-buffer';
const SECONDS = 4;
const ROUNDS = 5;

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

async function ratio(): Promise<{ median: number; samples: number }> {
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
  const ratios: number[] = [];
  for (let round = 0; round <= ROUNDS; round++) {
    const plain = await requestsPerSecond(`http://127.0.0.1:${port}/`, cookie);
    const lesson = await requestsPerSecond(one.address + LESSON, cookie);
    // The first round warms both up.
    if (round > 0) ratios.push(lesson / plain);
  }
  ratios.sort((a, b) => a - b);
  return { median: ratios[ROUNDS >> 1]!, samples: ROUNDS };
}

export const benchmarks = [{ name: 'lesson page, signed in / hello page', unit: 'ratio', run: ratio }];

export async function finish(): Promise<void> {
  if (hello) await ended(hello);
  if (folder) await rm(folder, { recursive: true });
  await stopSite();
}
