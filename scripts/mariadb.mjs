// A private MariaDB instance: found, installed into a data folder of its own, started, reused, stopped.
// Built-ins only, since it runs before any package is installed.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdir, mkdtemp, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { createConnection, createServer } from 'node:net';
import { userInfo } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

const PLACES = ['/usr/sbin', '/usr/bin', '/usr/local/sbin', '/usr/local/bin', '/usr/libexec'];
const DEBIAN_PACKAGE = 'mariadb-server-core';
/** Linux keeps a socket's path in 108 bytes, the last of them zero. */
const LONGEST_SOCKET_PATH = 107;

/** @param {string} name */
function findProgram(name) {
  const folders = [...(process.env.PATH ?? '').split(':'), ...PLACES].filter(Boolean);
  return folders.map((folder) => join(folder, name)).find((path) => existsSync(path));
}

/** The two programs of MariaDB's server, or undefined where one is missing. */
export function findMariadb() {
  const server = findProgram('mariadbd');
  const installer = findProgram('mariadb-install-db');
  return server && installer ? { server, installer } : undefined;
}

/** The command that installs MariaDB's server on Debian without starting a service. */
export const INSTALL_COMMAND = `apt-get install -y --no-install-recommends ${DEBIAN_PACKAGE}`;

/**
 * Finds MariaDB, and installs it from Debian where it is missing and we may.
 * @param {(line: string) => void} say
 */
export function requireMariadb(say) {
  const found = findMariadb();
  if (found) return found;
  if (process.getuid?.() === 0 && findProgram('apt-get')) {
    say('MariaDB is missing: installing it from Debian');
    installDebianPackage(DEBIAN_PACKAGE);
    const installed = findMariadb();
    if (installed) return installed;
  }
  throw new Error(
    `MariaDB's server is missing and cannot be installed from here. Run this, then start again:\n\n` +
      `  sudo apt-get update && sudo ${INSTALL_COMMAND}\n`,
  );
}

/**
 * Installs one Debian package as root; throws with apt's own words when that fails.
 * @param {string} name
 */
export function installDebianPackage(name) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const apt = (/** @type {string[]} */ ...args) => spawnSync('apt-get', args, { env, encoding: 'utf8' });
  const updated = apt('update', '-q');
  const done = apt('install', '-y', '-q', '--no-install-recommends', name);
  if (done.status !== 0) throw new Error(`apt-get install ${name} failed:\n${updated.stderr}${done.stderr}`);
}

/** A port of the loopback address that nobody listens on at this moment. */
export function freePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      const port = address && typeof address === 'object' ? address.port : 0;
      probe.close(() => resolve(port));
    });
  });
}

/**
 * Does a MariaDB server greet on this socket? Its first packet names protocol 10.
 * @param {string} socketPath
 * @returns {Promise<boolean>}
 */
function greets(socketPath) {
  return new Promise((resolve) => {
    const connection = createConnection(socketPath);
    const end = (/** @type {boolean} */ answer) => {
      connection.destroy();
      resolve(answer);
    };
    connection.setTimeout(1000, () => end(false));
    connection.once('error', () => end(false));
    connection.once('data', (packet) => end(packet[4] === 10));
    connection.once('end', () => end(false));
  });
}

/**
 * The process that serves this data folder, by its recorded id and its command line (an id alone may have been
 * given to another process since).
 * @param {string} folder
 */
async function runningServer(folder) {
  const pid = Number(await readFile(join(folder, 'mariadbd.pid'), 'utf8').catch(() => ''));
  if (!pid) return undefined;
  const commandLine = await readFile(`/proc/${pid}/cmdline`, 'utf8').catch(() => '');
  return commandLine.split('\0').includes(`--datadir=${join(folder, 'data')}`) ? pid : undefined;
}

/** @param {number} pid */
function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

/** @param {number} pid @param {number} patience_ms */
async function gone(pid, patience_ms) {
  const end = Date.now() + patience_ms;
  while (isAlive(pid)) {
    if (Date.now() > end) return false;
    await sleep(20);
  }
  return true;
}

/**
 * Creates the data folder. It is made under a temporary name and renamed when complete, so a half-made one is
 * never taken for data, and existing data is never touched.
 * @param {string} installer @param {string} folder
 */
async function installData(installer, folder) {
  const data = join(folder, 'data');
  if (existsSync(data)) return;
  const unfinished = await mkdtemp(join(folder, 'data-unfinished-'));
  const user = userInfo().username;
  const made = spawnSync(
    installer,
    [
      '--no-defaults',
      `--datadir=${unfinished}`,
      `--user=${user}`,
      '--auth-root-authentication-method=socket',
      `--auth-root-socket-user=${user}`,
      '--skip-test-db',
    ],
    { encoding: 'utf8' },
  );
  if (made.status !== 0) {
    await rm(unfinished, { recursive: true });
    throw new Error(`mariadb-install-db failed:\n${made.stdout}${made.stderr}`);
  }
  await rename(unfinished, data);
}

const DURABLE = [
  '--innodb-flush-log-at-trx-commit=1',
  '--log-bin=binlog',
  '--sync-binlog=1',
  '--binlog-format=ROW',
  '--server-id=1',
  '--binlog-expire-logs-seconds=604800',
];
/** Only for data that may be lost: the tests' own. */
const FAST = [
  '--innodb-flush-log-at-trx-commit=0',
  '--innodb-doublewrite=0',
  '--sync-frm=0',
  '--skip-log-bin',
];

const SETTINGS = [
  '--bind-address=127.0.0.1',
  '--skip-name-resolve',
  '--character-set-server=utf8mb4',
  '--collation-server=utf8mb4_uca1400_as_ci',
  '--default-time-zone=+00:00',
  '--sql-mode=STRICT_TRANS_TABLES,ERROR_FOR_DIVISION_BY_ZERO,NO_AUTO_CREATE_USER,NO_ENGINE_SUBSTITUTION',
  '--transaction-isolation=READ-COMMITTED',
  '--innodb-rollback-on-timeout=ON',
  '--innodb-lock-wait-timeout=5',
  '--innodb-log-file-size=16M',
  '--max-connections=200',
];

/** @param {string} text */
const quoted = (text) => `'${text.replace(/[\\']/g, '\\$&')}'`;

/**
 * Starts a private MariaDB on loopback, or takes over the one that already serves this folder.
 *
 * @param {object} options
 * @param {string} options.folder       holds `data`, the socket, the log and the process id
 * @param {number} [options.port]       a free one is chosen when it is not given
 * @param {string} options.database
 * @param {string} options.user         may do everything in databases named `database` or `database_…`
 * @param {string} options.password
 * @param {boolean} [options.durable]   false only for tests
 * @param {(line: string) => void} [options.say]
 * @returns {Promise<{ port: number, socket: string, pid: number, reused: boolean, stop: () => Promise<void> }>}
 */
export async function startMariadb({
  folder,
  port,
  database,
  user,
  password,
  durable = true,
  say = () => {},
}) {
  const { server, installer } = requireMariadb(say);
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const socket = join(folder, 'mariadb.sock');
  if (Buffer.byteLength(socket) > LONGEST_SOCKET_PATH)
    throw new Error(`The path of MariaDB's socket is longer than ${LONGEST_SOCKET_PATH} bytes: ${socket}`);

  const orphan = await runningServer(folder);
  if (orphan) {
    const orphanPort = Number(await readFile(join(folder, 'port'), 'utf8').catch(() => ''));
    if (orphanPort && (await greets(socket)))
      return { port: orphanPort, socket, pid: orphan, reused: true, stop: () => stop(orphan) };
    await stop(orphan);
  }

  await installData(installer, folder);
  const chosenPort = port ?? (await freePort());
  const initFile = join(folder, 'init.sql');
  // A grant's database name is a pattern: `_` is escaped so that it stands for itself.
  const family = database.replaceAll('_', '\\_');
  await writeFile(
    initFile,
    [
      `CREATE DATABASE IF NOT EXISTS \`${database}\`;`,
      `CREATE USER IF NOT EXISTS ${quoted(user)}@'127.0.0.1' IDENTIFIED BY ${quoted(password)};`,
      `ALTER USER ${quoted(user)}@'127.0.0.1' IDENTIFIED BY ${quoted(password)};`,
      `GRANT ALL ON \`${family}\`.* TO ${quoted(user)}@'127.0.0.1';`,
      `GRANT ALL ON \`${family}\\_%\`.* TO ${quoted(user)}@'127.0.0.1';`,
      '',
    ].join('\n'),
    { mode: 0o600 },
  );
  await writeFile(join(folder, 'port'), String(chosenPort));
  const errorLog = join(folder, 'mariadb.log');
  const child = spawn(
    server,
    [
      '--no-defaults',
      `--datadir=${join(folder, 'data')}`,
      `--socket=${socket}`,
      `--port=${chosenPort}`,
      `--pid-file=${join(folder, 'mariadbd.pid')}`,
      `--log-error=${errorLog}`,
      `--init-file=${initFile}`,
      `--user=${userInfo().username}`,
      ...SETTINGS,
      ...(durable ? DURABLE : FAST),
    ],
    // Its own process group: Ctrl-C reaches the starter alone, which then stops the database last.
    { stdio: 'ignore', detached: true },
  );
  const pid = child.pid;
  if (!pid) throw new Error(`${server} could not be started`);
  let exited = false;
  child.once('exit', () => (exited = true));
  const patience = Date.now() + 30_000;
  while ((await runningServer(folder)) !== pid || !(await greets(socket))) {
    if (exited || Date.now() > patience) {
      if (!exited) await stop(pid);
      const log = await readFile(errorLog, 'utf8').catch(() => '');
      throw new Error(
        `MariaDB did not start. The end of ${errorLog}:\n${log.split('\n').slice(-12).join('\n')}`,
      );
    }
    await sleep(20);
  }
  child.unref();
  return { port: chosenPort, socket, pid, reused: false, stop: () => stop(pid) };
}

/** @param {number} pid */
async function stop(pid) {
  if (!isAlive(pid)) return;
  process.kill(pid, 'SIGTERM');
  if (await gone(pid, 20_000)) return;
  process.kill(pid, 'SIGKILL');
  await gone(pid, 5_000);
}
