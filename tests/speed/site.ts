/** The built product for benchmarks that ask it: started as anybody starts it, with a data folder of its own, or the one that SITE names. */
import { spawn, type ChildProcess } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { join, resolve } from 'node:path';
import { demoPassword } from '../../src/server/demo/passwords.ts';
import { emailOf, PEOPLE } from '../../src/server/demo/people.ts';

export interface Site {
  readonly address: string;
  /** Where its demo.json stands. */
  readonly folder: string;
  stop(): Promise<void>;
}

/** A port that nobody listens on. */
export const freePort = (): Promise<number> =>
  new Promise((done, fail) => {
    const probe = createServer();
    probe.once('error', fail);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as { port: number };
      probe.close(() => done(port));
    });
  });

/** Resolves when a program has said a word; its output is told when it ends before that. */
export function untilSaid(child: ChildProcess, word: string): Promise<void> {
  let said = '';
  return new Promise((done, fail) => {
    const hear = (chunk: Buffer) => {
      said += chunk.toString();
      if (said.includes(word)) done();
    };
    child.stdout!.on('data', hear);
    child.stderr!.on('data', hear);
    child.once('exit', (code) => fail(new Error(`It ended (${code}):\n${said}`)));
  });
}

export async function ended(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const gone = new Promise<void>((done) => child.once('exit', () => done()));
  child.kill('SIGTERM');
  await gone;
}

let running: Promise<Site> | undefined;

/** Starts the product once for all benchmarks of a file. */
export function site(): Promise<Site> {
  return (running ??= start());
}

async function start(): Promise<Site> {
  const folder = resolve(process.env.DATA_FOLDER ?? (process.env.SITE ? '.data' : '.data/bench'));
  if (process.env.SITE) return { address: process.env.SITE, folder, stop: () => Promise.resolve() };
  const port = await freePort();
  const child = spawn(process.execPath, ['scripts/start.mjs'], {
    env: { ...process.env, PORT: String(port), DATA_FOLDER: folder, HOST: '127.0.0.1', LOG_LEVEL: 'warn' },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  await untilSaid(child, 'Ready in');
  return { address: `http://127.0.0.1:${port}`, folder, stop: () => ended(child) };
}

export async function stopSite(): Promise<void> {
  await (await running)?.stop();
  running = undefined;
}

export const secretsOf = (one: Site): { secret: string; databasePassword: string } =>
  JSON.parse(readFileSync(join(one.folder, 'demo.json'), 'utf8')) as {
    secret: string;
    databasePassword: string;
  };

/** Signs in as somebody of the demo and answers with the cookies. */
export async function cookiesOf(one: Site, key: string): Promise<string> {
  const { address } = one;
  const person = PEOPLE.find((somebody) => somebody.key === key)!;
  const form = await (await fetch(`${address}/sign-in`)).text();
  const action = /<form[^>]*action="([^"]+)"/.exec(form)![1]!.replaceAll('&amp;', '&');
  const answer = await fetch(`${address}/sign-in?${action.split('?')[1]}`, {
    method: 'POST',
    redirect: 'manual',
    headers: { Origin: address },
    body: new URLSearchParams({
      email: emailOf(person),
      password: demoPassword(secretsOf(one).secret, person.shown ? key : 'everyone else'),
    }),
  });
  if (answer.status !== 303) throw new Error(`Nobody was signed in: ${answer.status}`);
  return answer.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0]!)
    .join('; ');
}
