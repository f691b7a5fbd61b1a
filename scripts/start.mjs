// `npm start`: from a clean checkout to the running product. Built-ins only until the packages are there.
import { execFile, spawnSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { existsSync } from 'node:fs';
import { mkdir, readFile, writeFile } from 'node:fs/promises';
import { createServer } from 'node:net';
import { networkInterfaces } from 'node:os';
import { join, resolve } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { freePort, startMariadb } from './mariadb.mjs';
import { createProcesses } from './processes.mjs';

const ROOT = fileURLToPath(new URL('..', import.meta.url)).replace(/\/$/, '');
const DATA = resolve(ROOT, process.env.DATA_FOLDER ?? '.data');
const PORT = Number(process.env.PORT ?? 4321);
const READY_MS = 30_000;

/** @param {string} line */
const say = (line) => console.log(line);

class Expected extends Error {}

/**
 * Fails in words where somebody else listens already.
 * @param {number} patience_ms a process that has just ended may hold its port a moment longer than its id
 */
async function checkPort(patience_ms) {
  const until = Date.now() + patience_ms;
  for (;;) {
    try {
      return await tryPort();
    } catch (error) {
      if (Date.now() >= until) throw error;
      await sleep(50);
    }
  }
}

/** @returns {Promise<void>} */
function tryPort() {
  if (!Number.isInteger(PORT) || PORT < 1 || PORT > 65_535)
    throw new Expected(`PORT is “${process.env.PORT}”, which is no port: give a number from 1 to 65535.`);
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', (/** @type {NodeJS.ErrnoException} */ error) => {
      const why = error.code === 'EACCES' ? 'may not be used by this user' : 'is taken by another program';
      reject(
        new Expected(
          `Port ${PORT} ${why}. Start with another one, for example:\n\n  PORT=${PORT + 10} npm start\n`,
        ),
      );
    });
    probe.listen(PORT, process.env.HOST, () => probe.close(() => resolve()));
  });
}

/** Packages are there when the lock file that npm left with them is the checkout's. */
async function requirePackages() {
  const marker = join(DATA, 'packages');
  const lock = await readFile(join(ROOT, 'package-lock.json'), 'utf8');
  const present = existsSync(join(ROOT, 'node_modules/.package-lock.json'));
  const installed = await readFile(marker, 'utf8').catch(() => undefined);
  if (present && (installed === undefined || installed === lock)) {
    if (installed === undefined) await writeFile(marker, lock);
    return;
  }
  say('Installing packages');
  const done = spawnSync('npm', ['ci', '--no-audit', '--no-fund'], { cwd: ROOT, encoding: 'utf8' });
  if (done.status !== 0) throw new Expected(`npm ci failed:\n${done.stdout}${done.stderr}`);
  await writeFile(marker, lock);
}

/** What is made up at the first start and kept: passwords and ports. */
async function requireSecrets() {
  const file = join(DATA, 'demo.json');
  const kept = existsSync(file) ? JSON.parse(await readFile(file, 'utf8')) : {};
  const demo = {
    databasePassword: randomBytes(24).toString('base64url'),
    secret: randomBytes(32).toString('base64url'),
    databasePort: await freePort(),
    smtpPort: await freePort(),
    mailPagePort: await freePort(),
    ...kept,
  };
  if (JSON.stringify(kept) !== JSON.stringify(demo))
    await writeFile(file, JSON.stringify(demo, null, 2), { mode: 0o600 });
  return demo;
}

/**
 * Waits until the web process that we started, and no other, is ready.
 * @param {string} instance @param {() => boolean} failed
 */
async function waitUntilReady(instance, failed) {
  const patience = Date.now() + READY_MS;
  while (Date.now() < patience) {
    if (failed()) break;
    try {
      const live = await fetch(`http://127.0.0.1:${PORT}/livez`).then((answer) => answer.json());
      const ready = await fetch(`http://127.0.0.1:${PORT}/readyz`);
      if (live.instance === instance && ready.ok) return;
    } catch {
      // Not listening yet.
    }
    await sleep(40);
  }
  const log = await readFile(join(DATA, 'log/web.log'), 'utf8').catch(() => '');
  throw new Expected(
    `The web process did not get ready. The end of ${DATA}/log/web.log:\n${log.slice(-2000)}`,
  );
}

/**
 * Starts the database again when it has ended although nobody asked it to. The other processes wait for it.
 * @param {() => number} pid @param {() => Promise<void>} startAgain
 */
function watchDatabase(pid, startAgain) {
  let busy = false;
  const look = async () => {
    if (busy || stopping || existsSync(`/proc/${pid()}`)) return;
    busy = true;
    say('MariaDB ended unexpectedly: starting it again');
    await startAgain().catch((error) => {
      console.error(error.message);
      void stop(1);
    });
    busy = false;
  };
  setInterval(() => void look(), 250).unref();
}

/**
 * Migrates, publishes the shipped course and loads the demo world.
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<string>} what it has to say, such as the demo's sign-ins
 */
const prepare = (env) =>
  new Promise((done, fail) => {
    execFile(process.execPath, ['dist/prepare.mjs'], { cwd: ROOT, env }, (error, stdout, stderr) => {
      if (error) fail(new Expected(`The database could not be prepared:\n${stdout}${stderr}`));
      else done(stdout.trim());
    });
  });

const otherAddresses = () =>
  Object.values(networkInterfaces())
    .flatMap((list) => list ?? [])
    .filter(({ family, internal }) => family === 'IPv4' && !internal)
    .map(({ address }) => `http://${address}:${PORT}`);

/** @type {(() => Promise<void>)[]} what to undo, the last first */
const undo = [];
let stopping = false;

/** @param {number} code */
async function stop(code) {
  if (stopping) return;
  stopping = true;
  for (const step of undo.reverse()) await step().catch((error) => console.error(error));
  process.exit(code);
}

async function start() {
  const began = performance.now();
  await mkdir(join(DATA, 'log'), { recursive: true, mode: 0o700 });
  const processes = createProcesses(join(DATA, 'processes'));
  const holder = await processes.claim();
  if (holder) throw new Expected(`Dropwise is already running from this folder (process ${holder}).`);
  undo.push(() => processes.endAll());
  const orphans = await processes.endOrphans();
  if (orphans > 0) say('Ended what an earlier start had left running');
  await checkPort(orphans > 0 ? 5000 : 0);
  await requirePackages();
  const demo = await requireSecrets();

  const database = { database: 'dropwise', user: 'dropwise', password: demo.databasePassword };
  const startDatabase = () =>
    startMariadb({ folder: join(DATA, 'mariadb'), port: demo.databasePort, ...database, say });
  // Known before it is up: a stop that comes while it starts waits for it, and ends it.
  let starting = startDatabase();
  undo.unshift(async () => (await starting.catch(() => undefined))?.stop());
  let mariadb = await starting;
  watchDatabase(
    () => mariadb.pid,
    async () => {
      starting = startDatabase();
      mariadb = await starting;
    },
  );

  const { build, isBuilt } = await import('./build.mjs');
  if (!isBuilt()) {
    say('Building');
    await build();
  }

  const instance = randomBytes(8).toString('hex');
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    DEMO: 'true',
    DATA_FOLDER: DATA,
    PORT: String(PORT),
    PUBLIC_URL: process.env.PUBLIC_URL ?? `http://127.0.0.1:${PORT}`,
    DATABASE_HOST: '127.0.0.1',
    DATABASE_PORT: String(mariadb.port),
    DATABASE_NAME: database.database,
    DATABASE_USER: database.user,
    DATABASE_PASSWORD: database.password,
    SMTP_URL: `smtp://127.0.0.1:${demo.smtpPort}`,
    MAIL_FOLDER: join(DATA, 'mail'),
    MAIL_PAGE_PORT: String(demo.mailPagePort),
    COOKIE_SECRET: demo.secret,
    DROPWISE_INSTANCE: instance,
  };
  let failed = false;
  /** @param {string} name @param {string} program */
  const run = (name, program) =>
    processes.start(name, ['--enable-source-maps', program], {
      cwd: ROOT,
      env,
      log: join(DATA, `log/${name}.log`),
      onExit: (code) => {
        failed = true;
        if (stopping) return;
        console.error(`The ${name} process ended (${code ?? 'killed'}); see ${DATA}/log/${name}.log`);
        void stop(1);
      },
    });
  // The database is prepared while the web process starts: it is not ready before its schema is there.
  const prepared = prepare(env);
  await run('fakes', 'scripts/fakes/main.mjs');
  await run('web', 'dist/front.mjs');
  const words = await prepared;
  if (existsSync(join(ROOT, 'dist/jobs.mjs'))) await run('jobs', 'dist/jobs.mjs');
  await waitUntilReady(instance, () => failed);

  say(`
Dropwise   ${env.PUBLIC_URL}
Mail       http://127.0.0.1:${demo.mailPagePort}`);
  if (!process.env.HOST) for (const address of otherAddresses()) say(`Network    ${address}`);
  if (words) say(`\n${words}`);
  say(`\nReady in ${((performance.now() - began) / 1000).toFixed(1)} s. Ctrl-C ends it.`);
}

process.on('SIGINT', () => void stop(0));
process.on('SIGTERM', () => void stop(0));
process.on('SIGHUP', () => void stop(0));
try {
  await start();
} catch (error) {
  if (!stopping) {
    console.error(error instanceof Expected ? error.message : error instanceof Error ? error.message : error);
    await stop(1);
  }
}
