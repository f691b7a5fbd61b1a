// `npm run build`: the site by Astro, the programs beside it by esbuild, and the client's files compressed once.
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { readFile, rm, writeFile } from 'node:fs/promises';
import { extname, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';
import { programOf, ROOT, run } from './checks.mjs';

/** The programs that a deployment runs: the web process, what prepares the database, the jobs. */
const PROGRAMS = {
  front: 'scripts/front/main.ts',
  prepare: 'src/server/prepare.ts',
  jobs: 'src/server/jobs/main.ts',
};
const SOURCES = ['src', 'content', 'public', 'scripts/front', 'scripts/build.mjs'];
const SINGLE_SOURCES = ['package-lock.json', 'astro.config.mjs', 'tailwind.config.mjs', 'tsconfig.json'];
const COMPRESSIBLE = new Set([
  '.css',
  '.html',
  '.js',
  '.json',
  '.mjs',
  '.svg',
  '.txt',
  '.webmanifest',
  '.xml',
]);
const WORTH_COMPRESSING = 1024;

/** @param {string} folder @returns {string[]} */
function filesIn(folder) {
  if (!existsSync(folder)) return [];
  if (statSync(folder).isFile()) return [folder];
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => join(entry.parentPath, entry.name))
    .sort();
}

/** One name for the state of everything that the build is made from. */
export function sourcesHash() {
  const hash = createHash('sha256').update(process.version);
  for (const file of [...SOURCES, ...SINGLE_SOURCES].flatMap((name) => filesIn(join(ROOT, name))))
    hash.update(file.slice(ROOT.length)).update(readFileSync(file));
  return hash.digest('hex');
}

/** Was the present build made from the present sources, to its end? */
export function isBuilt() {
  try {
    const { hash } = JSON.parse(readFileSync(join(ROOT, 'dist/build.json'), 'utf8'));
    return hash === sourcesHash();
  } catch {
    return false;
  }
}

async function bundlePrograms() {
  const { build } = await import('esbuild');
  const present = Object.entries(PROGRAMS).filter(([, file]) => existsSync(join(ROOT, file)));
  await build({
    absWorkingDir: ROOT,
    entryPoints: Object.fromEntries(present),
    outdir: 'dist',
    outExtension: { '.js': '.mjs' },
    bundle: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    target: 'node20',
    sourcemap: 'linked',
    logLevel: 'warning',
  });
}

async function compressClient() {
  const [brotli, gzipped] = [promisify(brotliCompress), promisify(gzip)];
  const worth = filesIn(join(ROOT, 'dist/client')).filter(
    (file) => COMPRESSIBLE.has(extname(file)) && statSync(file).size >= WORTH_COMPRESSING,
  );
  await Promise.all(
    worth.map(async (file) => {
      const content = await readFile(file);
      const params = {
        [constants.BROTLI_PARAM_QUALITY]: 11,
        [constants.BROTLI_PARAM_SIZE_HINT]: content.length,
      };
      await writeFile(`${file}.br`, await brotli(content, { params }));
      await writeFile(`${file}.gz`, await gzipped(content, { level: 9 }));
    }),
  );
}

/** Builds everything; its last act is to note what it was built from, so that a broken-off build is made again. */
export async function build() {
  const hash = sourcesHash();
  await rm(join(ROOT, 'dist/build.json'), { force: true });
  const env = { ...process.env, NODE_ENV: 'production', ASTRO_TELEMETRY_DISABLED: '1' };
  if (!(await run([programOf('astro'), 'build', '--silent'], env))) throw new Error('astro build failed');
  await bundlePrograms();
  await compressClient();
  await writeFile(join(ROOT, 'dist/build.json'), JSON.stringify({ hash }));
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) await build();
