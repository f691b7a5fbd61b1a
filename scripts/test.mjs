// `npm test`: everything, from nothing. Its last line counts: `N passed, N failed`.
import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdir, readFile, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { installDebianPackage, requireMariadb } from './mariadb.mjs';

const ROOT = fileURLToPath(new URL('..', import.meta.url));
const RESULTS = join(ROOT, '.data/test');

/** @param {string} line */
const say = (line) => console.log(line);

function requirePackages() {
  if (existsSync(join(ROOT, 'node_modules/.package-lock.json'))) return;
  say('Installing packages');
  const done = spawnSync('npm', ['ci', '--no-audit', '--no-fund'], { cwd: ROOT, stdio: 'inherit' });
  if (done.status !== 0) throw new Error('npm ci failed');
}

function requireChromium() {
  if (existsSync('/usr/bin/chromium')) return;
  if (process.getuid?.() !== 0)
    throw new Error('The browser tests need Debian’s chromium. Run: sudo apt-get install -y chromium');
  say('Chromium is missing: installing it from Debian');
  installDebianPackage('chromium');
}

/** @param {string} name @returns {Promise<any>} */
const report = async (name) => JSON.parse(await readFile(join(RESULTS, name), 'utf8'));

/**
 * Counts what a run reported. A run that failed without a failed test (a crash, an unhandled error, no test at all)
 * counts as one failure.
 * @param {boolean} good @param {() => Promise<{ passed: number, failed: number }>} read
 */
async function counted(good, read) {
  const count = await read().catch(() => ({ passed: 0, failed: 0 }));
  const silent = !good || count.passed + count.failed === 0;
  return count.failed === 0 && silent ? { ...count, failed: 1 } : count;
}

async function main() {
  requirePackages();
  requireMariadb(say);
  requireChromium();
  const { programOf, run, runChecks } = await import('./checks.mjs');
  await rm(RESULTS, { recursive: true, force: true });
  // The end-to-end tests begin with an empty database of their own.
  await rm(join(ROOT, '.data/e2e'), { recursive: true, force: true });
  await mkdir(RESULTS, { recursive: true });

  const counts = [await runChecks()];

  const vitest = await run([
    programOf('vitest'),
    'run',
    '--reporter=dot',
    '--reporter=json',
    `--outputFile=${join(RESULTS, 'vitest.json')}`,
  ]);
  counts.push(
    await counted(vitest, async () => {
      const { numPassedTests, numFailedTests } = await report('vitest.json');
      return { passed: numPassedTests, failed: numFailedTests };
    }),
  );

  const playwright = await run([programOf('@playwright/test', 'playwright'), 'test']);
  counts.push(
    await counted(playwright, async () => {
      const { stats } = await report('playwright.json');
      // A skipped test proves nothing, and none is meant to be skipped.
      return { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped };
    }),
  );

  const passed = counts.reduce((sum, count) => sum + count.passed, 0);
  const failed = counts.reduce((sum, count) => sum + count.failed, 0);
  say(`${passed} passed, ${failed} failed`);
  process.exitCode = failed === 0 ? 0 : 1;
}

try {
  await main();
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  say('0 passed, 1 failed');
  process.exitCode = 1;
}
