// Killed in the middle of a pour: whatever was accepted is there afterwards, once and in order, and the rest follows.
import type { APIRequestContext } from '@playwright/test';
import { spawn, type ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { join, resolve } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { demoPassword } from '../../src/server/demo/passwords.ts';
import { emailOf, PEOPLE } from '../../src/server/demo/people.ts';
import { PORT } from './site.ts';
import { expect, test } from './test.ts';

const OWN_PORT = PORT + 7;
const OWN_SITE = `http://127.0.0.1:${OWN_PORT}`;
const FOLDER = '.data/e2e-killed';
const LESSON = 'meeting-a-buffer';
const ROUNDS = 10;
const MOVES_A_ROUND = 24;

let starter: ChildProcess | undefined;

/** What the starter has said since it was started last. */
let said = '';

/** `npm start` of its own, from the build that is there; resolves when it says that it is ready. */
async function start(): Promise<void> {
  const child = spawn(process.execPath, ['scripts/start.mjs'], {
    env: { ...process.env, PORT: String(OWN_PORT), DATA_FOLDER: FOLDER, HOST: '127.0.0.1' },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  starter = child;
  said = '';
  await new Promise<void>((resolve, reject) => {
    const hear = (chunk: Buffer) => {
      said += chunk.toString();
      if (said.includes('Ready in')) resolve();
    };
    child.stdout!.on('data', hear);
    child.stderr!.on('data', hear);
    child.once('exit', (code) => reject(new Error(`The start ended (${code}):\n${said}`)));
  });
}
const ended = (child: ChildProcess): Promise<void> =>
  child.exitCode !== null || child.signalCode !== null
    ? Promise.resolve()
    : new Promise((resolve) => child.once('exit', () => resolve()));

const pidOf = (name: string): number =>
  (JSON.parse(readFileSync(join(FOLDER, 'processes', `${name}.json`), 'utf8')) as { pid: number }).pid;
const databasePid = (): number => Number(readFileSync(join(FOLDER, 'mariadb', 'mariadbd.pid'), 'utf8'));

test.afterEach(async () => {
  if (!starter) return;
  starter.kill('SIGTERM');
  await ended(starter);
  await rm(FOLDER, { recursive: true, force: true });
});

async function signedIn(client: APIRequestContext): Promise<void> {
  const { secret } = JSON.parse(readFileSync(join(FOLDER, 'demo.json'), 'utf8')) as { secret: string };
  const person = PEOPLE.find(({ key }) => key === 'wren')!;
  const form = await (await client.get('/sign-in')).text();
  const action = /<form[^>]*action="([^"]+)"/.exec(form)![1]!.replaceAll('&amp;', '&');
  const answer = await client.post(
    `/sign-in${action.startsWith('?') ? action : `?${action.split('?')[1]}`}`,
    {
      form: { email: emailOf(person), password: demoPassword(secret, person.key) },
      headers: { Origin: OWN_SITE },
      maxRedirects: 0,
    },
  );
  expect(answer.status()).toBe(303);
}

test('web process, starter and database killed while moves arrive: none is missing, none is there twice', async ({
  playwright,
}) => {
  test.setTimeout(300_000);
  await rm(FOLDER, { recursive: true, force: true });
  await start();
  const client = await playwright.request.newContext({ baseURL: OWN_SITE });
  await signedIn(client);
  const post = (path: string, data: object) => client.post(path, { data, headers: { Origin: OWN_SITE } });
  const runId = randomUUID();
  const seed = 4711;
  await post('/api/predictions', {
    lesson: LESSON,
    prediction: 'which-turns-first',
    answer: 'same',
    confidence: 2,
  });
  expect((await post('/api/runs', { runId, lesson: LESSON, bench: 'water-or-buffer', seed })).status()).toBe(
    200,
  );

  // No two neighbours are alike, so that a missing, doubled or misplaced one is seen.
  const list = Array.from({ length: ROUNDS * MOVES_A_ROUND }, (_, i) => ({
    opId: randomUUID(),
    move: { kind: 'drip', from: 'acid', into: i % 2 ? 'water' : 'buffer', drops: 1 + (i % 3) },
  }));
  let confirmed = 0;
  /** As the browser does: what is not confirmed is sent again until somebody answers. */
  async function send(until: number): Promise<void> {
    const patience = Date.now() + 60_000;
    while (confirmed < until) {
      expect(Date.now(), `stuck at ${confirmed}`).toBeLessThan(patience);
      try {
        const answer = await post(`/api/runs/${runId}/moves`, {
          after: confirmed,
          moves: list.slice(confirmed, Math.min(until, confirmed + 3)),
        });
        if (answer.status() >= 500) throw new Error(String(answer.status()));
        expect(answer.status(), await answer.text()).toBe(200);
        const { count } = (await answer.json()) as { count: number };
        expect(count).toBeGreaterThan(confirmed);
        confirmed = count;
      } catch (error) {
        if (error instanceof Error && /expect/.test(error.message)) throw error;
        await sleep(100);
      }
    }
  }

  const kills: (() => Promise<void>)[] = [
    async () => {
      const child = starter!;
      process.kill(pidOf('web'), 'SIGKILL');
      await ended(child);
      await start();
    },
    async () => {
      const child = starter!;
      child.kill('SIGKILL');
      await ended(child);
      await start();
    },
    async () => {
      // The starter brings the database back by itself; the web process lives on.
      process.kill(databasePid(), 'SIGKILL');
    },
  ];
  for (let round = 0; round < ROUNDS; round++) {
    const sending = send((round + 1) * MOVES_A_ROUND);
    await expect.poll(() => confirmed, { intervals: [5] }).toBeGreaterThan(round * MOVES_A_ROUND + 5);
    await kills[round % kills.length]!();
    await sending;
  }

  const progress = (await (await client.get(`/api/lessons/${LESSON}/progress`)).json()) as {
    runs: { runId: string; moves: unknown[] }[];
  };
  const run = progress.runs.find((one) => one.runId === runId)!;
  expect(run.moves).toEqual(list.map(({ move }) => move));
  await client.dispose();
});

/** Processes that serve this test's database. */
const databases = (): number[] =>
  readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .filter((pid) => {
      try {
        return readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(
          `--datadir=${join(resolve(FOLDER), 'mariadb')}`,
        );
      } catch {
        // It ended while the list was read.
        return false;
      }
    })
    .map(Number);

test('a starter that is asked to end while it brings the database back leaves none running', async () => {
  test.setTimeout(120_000);
  await rm(FOLDER, { recursive: true, force: true });
  await start();
  expect(databases()).toEqual([databasePid()]);
  const child = starter!;
  process.kill(databasePid(), 'SIGKILL');
  await expect.poll(() => said, { intervals: [5], timeout: 20_000 }).toContain('starting it again');
  child.kill('SIGTERM');
  await ended(child);
  expect(databases()).toEqual([]);
});
