// The fast checks, each a program of its own: what `npm run check` runs and `npm test` runs first.
import { spawn } from 'node:child_process';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('..', import.meta.url));
const require = createRequire(import.meta.url);

/**
 * The file that a package names as its program: run with `node`, so that ending it ends the work itself.
 * @param {string} name @param {string} [program]
 */
export function programOf(name, program = name.replace(/^@[^/]+\//, '')) {
  const file = join(ROOT, 'node_modules', name, 'package.json');
  const { bin } = require(file);
  return join(dirname(file), typeof bin === 'string' ? bin : bin[program]);
}

export const CHECKS = [
  { name: 'format', command: [programOf('prettier'), '--check', '--log-level', 'warn', '.'] },
  { name: 'lint', command: [programOf('eslint'), '.', '--max-warnings', '0'] },
  { name: 'types', command: [programOf('astro'), 'check', '--minimumSeverity', 'warning'] },
  { name: 'import rules', command: [programOf('dependency-cruiser', 'depcruise'), 'src', 'scripts'] },
];

/**
 * Runs a program with its output on ours and answers whether it succeeded.
 * @param {string[]} command arguments of node
 * @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<boolean>}
 */
export function run(command, env = process.env) {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, command, {
      cwd: ROOT,
      env,
      stdio: ['ignore', 'inherit', 'inherit'],
    });
    child.once('exit', (code) => resolve(code === 0));
    child.once('error', () => resolve(false));
  });
}

/**
 * Runs all checks, one after the other, and counts.
 * @returns {Promise<{ passed: number, failed: number }>}
 */
export async function runChecks() {
  const count = { passed: 0, failed: 0 };
  for (const { name, command } of CHECKS) {
    const good = await run(command);
    count[good ? 'passed' : 'failed'] += 1;
    console.log(`${good ? 'passed' : 'FAILED'}  ${name}`);
  }
  return count;
}
