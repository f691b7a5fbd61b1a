/** What the engine costs a browser: at most 25 kB (Brotli) with its data, and nothing of the prep room in it. */
import { brotliCompressSync } from 'node:zlib';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
import { expect, test } from 'vitest';

test('the whole engine stays within 25 kB and outside the prep room', async () => {
  const { outputFiles, metafile } = await build({
    entryPoints: [fileURLToPath(new URL('../../../src/chemistry/index.ts', import.meta.url))],
    bundle: true,
    minify: true,
    format: 'esm',
    write: false,
    metafile: true,
  });
  expect(brotliCompressSync(outputFiles[0]!.contents).length).toBeLessThan(25_000);
  const files = Object.keys(metafile.inputs);
  expect(files.some((file) => file.endsWith('chemistry/solver.ts'))).toBe(true);
  expect(files.filter((file) => /chemistry\/(data|preparation)\//.test(file))).toEqual([]);
});
