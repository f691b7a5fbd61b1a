// The starter's child processes: recorded on disk with what tells them from strangers, so that whatever a killed
// starter left behind is found and ended. Built-ins only.
import { spawn } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { mkdir, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { pathToFileURL } from 'node:url';

const PATIENCE_MS = 25_000;

/**
 * When a process began, in the kernel's ticks: with its id this names it for good.
 * @param {number} pid
 */
async function beginning(pid) {
  const stat = await readFile(`/proc/${pid}/stat`, 'utf8').catch(() => '');
  // The second field is the program's name in brackets and may contain spaces.
  const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
  return fields[0] === 'Z' ? undefined : fields[19];
}

/** @param {string} file */
async function recorded(file) {
  try {
    const { pid, began } = JSON.parse(await readFile(file, 'utf8'));
    return (await beginning(pid)) === began ? /** @type {number} */ (pid) : undefined;
  } catch {
    return undefined;
  }
}

/** @param {string} file @param {number} pid */
const record = async (file, pid) => writeFile(file, JSON.stringify({ pid, began: await beginning(pid) }));

/** @param {string} file */
async function end(file) {
  const pid = await recorded(file);
  if (pid) {
    process.kill(pid, 'SIGTERM');
    const patience = Date.now() + PATIENCE_MS;
    while ((await recorded(file)) && Date.now() < patience) await sleep(20);
    if (await recorded(file)) process.kill(pid, 'SIGKILL');
  }
  await rm(file, { force: true });
}

/** @param {string} folder where the records stand */
export function createProcesses(folder) {
  /** @type {{ name: string, file: string, child: import('node:child_process').ChildProcess }[]} */
  const running = [];
  const fileOf = (/** @type {string} */ name) => join(folder, `${name}.json`);

  return {
    /**
     * Takes this folder for the present process.
     * @returns the id of the starter that holds it already, if one is alive
     */
    async claim() {
      await mkdir(folder, { recursive: true });
      const holder = await recorded(fileOf('starter'));
      if (holder && holder !== process.pid) return holder;
      await record(fileOf('starter'), process.pid);
      return undefined;
    },

    /** Ends what a killed starter left behind. */
    async endOrphans() {
      const names = (await readdir(folder)).filter(
        (name) => name.endsWith('.json') && name !== 'starter.json',
      );
      await Promise.all(names.map((name) => end(join(folder, name))));
      return names.length;
    },

    /**
     * @param {string} name
     * @param {string[]} command arguments of node
     * @param {{ cwd: string, env: NodeJS.ProcessEnv, log: string, onExit: (code: number | null) => void }} options
     */
    async start(name, command, { cwd, env, log, onExit }) {
      const preload = pathToFileURL(join(cwd, 'scripts/child.mjs')).href;
      const child = spawn(process.execPath, ['--import', preload, ...command], {
        cwd,
        env,
        stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
        // Its own group: Ctrl-C in the terminal reaches the starter alone, which ends the others in order.
        detached: true,
      });
      const output = createWriteStream(log, { flags: 'a' });
      child.stdout?.pipe(output, { end: false });
      child.stderr?.pipe(output, { end: false });
      child.once('exit', onExit);
      if (!child.pid) throw new Error(`${name} could not be started`);
      await record(fileOf(name), child.pid);
      running.push({ name, file: fileOf(name), child });
    },

    /** Ends everything that was started, the last first. */
    async endAll() {
      for (const { file, child } of running.splice(0).reverse()) {
        child.removeAllListeners('exit');
        await end(file);
      }
      await rm(fileOf('starter'), { force: true });
    },
  };
}
