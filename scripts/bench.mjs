// `npm run bench [-- --json] [-- name…]`: the speed of what matters, as medians. Each module of tests/speed exports
// `benchmarks`: what one run measured, in its unit. Sizes and ratios are benchmarks like times.
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const ROOT = fileURLToPath(new URL('..', import.meta.url));
const RUNS = 7;

// The modules are TypeScript: this program runs itself again under tsx, which reads it.
if (!process.env.DROPWISE_BENCH) {
  const again = spawnSync(
    process.execPath,
    ['--import', 'tsx', process.argv[1] ?? '', ...process.argv.slice(2)],
    {
      cwd: ROOT,
      env: { ...process.env, NODE_ENV: 'production', DROPWISE_BENCH: '1' },
      stdio: 'inherit',
    },
  );
  process.exit(again.status ?? 1);
}

const asJson = process.argv.includes('--json');
const wanted = process.argv.slice(2).filter((argument) => !argument.startsWith('--'));

/** @param {number[]} values */
function median(values) {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/**
 * A benchmark whose run takes long answers with one figure and is run several times; one whose run is too short to be
 * timed alone takes its own samples and answers with their median.
 * @param {() => Promise<number | { median: number, samples: number }>} run
 */
async function measured(run) {
  const values = [];
  while (values.length < RUNS) {
    const value = await run();
    if (typeof value === 'object') return { ...value, median: Number(value.median.toPrecision(4)) };
    values.push(value);
  }
  return { median: Number(median(values).toPrecision(4)), samples: RUNS };
}

let failed = false;
const folder = join(ROOT, 'tests/speed');
for (const file of readdirSync(folder)
  .filter((name) => name.endsWith('.speed.ts'))
  .sort()) {
  if (wanted.length > 0 && !wanted.some((name) => file.startsWith(name))) continue;
  const { benchmarks, finish } = await import(pathToFileURL(join(folder, file)).href);
  try {
    for (const { name, unit, run } of benchmarks) {
      const result = { name, ...(await measured(run)), unit };
      console.log(
        asJson ? JSON.stringify(result) : `${name.padEnd(36)} ${String(result.median).padStart(10)} ${unit}`,
      );
    }
  } catch (error) {
    failed = true;
    console.error(`${file}: ${error instanceof Error ? error.stack : error}`);
  } finally {
    await finish?.();
  }
}
process.exitCode = failed ? 1 : 0;
