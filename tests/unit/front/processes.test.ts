import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { spawn } from 'node:child_process';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { createProcesses } from '../../../scripts/processes.mjs';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'processes-'));
  await writeFile(join(folder, 'waits.mjs'), 'setInterval(() => {}, 1000);');
});
afterEach(() => rm(folder, { recursive: true }));

const isAlive = (pid: number): boolean => {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
};
const options = () => ({ cwd: process.cwd(), env: process.env, log: join(folder, 'log'), onExit: () => {} });
const pidOf = async (name: string): Promise<number> =>
  JSON.parse(await readFile(join(folder, `${name}.json`), 'utf8')).pid;

describe('the starter’s processes', () => {
  it('end with the starter', async () => {
    const processes = createProcesses(folder);
    expect(await processes.claim()).toBeUndefined();
    await processes.start('web', [join(folder, 'waits.mjs')], options());
    const pid = await pidOf('web');
    expect(isAlive(pid)).toBe(true);
    await processes.endAll();
    expect(isAlive(pid)).toBe(false);
  });

  it('are found and ended by the next start when the last one was killed', async () => {
    const orphan = spawn(process.execPath, [join(folder, 'waits.mjs')], { stdio: 'ignore' });
    const stat = await readFile(`/proc/${orphan.pid}/stat`, 'utf8');
    const began = stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19];
    await writeFile(join(folder, 'web.json'), JSON.stringify({ pid: orphan.pid, began }));
    const gone = new Promise((done) => orphan.once('exit', done));
    expect(await createProcesses(folder).endOrphans()).toBe(1);
    await gone;
  });

  it('are never mistaken for a stranger who was given the same number', async () => {
    await writeFile(join(folder, 'web.json'), JSON.stringify({ pid: process.pid, began: '1' }));
    await createProcesses(folder).endOrphans();
    expect(isAlive(process.pid)).toBe(true);
  });

  it('have one starter a folder', async () => {
    const first = spawn(process.execPath, [join(folder, 'waits.mjs')], { stdio: 'ignore' });
    const stat = await readFile(`/proc/${first.pid}/stat`, 'utf8');
    const began = stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19];
    await writeFile(join(folder, 'starter.json'), JSON.stringify({ pid: first.pid, began }));
    expect(await createProcesses(folder).claim()).toBe(first.pid);
    first.kill();
  });
});
