// `npm run test:course [file …]`: a robot solves every lesson of content/ by what a learner has, and says what it did.
// Exit status 1 where a lesson cannot be finished.
import { readdir, readFile } from 'node:fs/promises';
import { basename, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { register } from 'tsx/esm/api';

register();
const { compile, tellFault } = await import('../src/lessons/index.ts');
const { solveLesson } = await import('../tests/course/robot.ts');

// A reader that closes early (`| head`) is no failure.
process.stdout.on('error', (error) => {
  if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EPIPE') process.exit();
  throw error;
});

const FOLDER = fileURLToPath(new URL('../content/lessons', import.meta.url));
/** Learners whose variants and shuffles are tried. */
const SEEDS = [1, 2, 3];

const given = process.argv.slice(2);
const files =
  given.length > 0
    ? given.map((name) => resolve(name))
    : (await readdir(FOLDER))
        .filter((name) => name.endsWith('.md'))
        .sort()
        .map((name) => join(FOLDER, name));

let unsolved = 0;
for (const file of files) {
  const shown = relative(process.cwd(), file);
  const result = compile(await readFile(file, 'utf8'), { file: basename(file) });
  if (!result.ok) {
    unsolved += 1;
    for (const fault of result.faults) console.log(tellFault({ ...fault, file: shown }));
    continue;
  }
  const { lesson } = result;
  const runs = SEEDS.map((seed) => ({ seed, ...solveLesson(lesson, seed) }));
  const open = runs.flatMap((run) => run.open.map((id) => `${id} (learner ${run.seed})`));
  if (open.length > 0) unsolved += 1;
  console.log(
    `${open.length === 0 ? 'solved  ' : 'UNSOLVED'}  ${lesson.number} ${lesson.title}: ${lesson.checkpoints.length} things to do, ${SEEDS.length} learners`,
  );
  for (const { kind, id, done, sentence } of runs[0]?.steps ?? [])
    console.log(`  ${done ? 'done' : 'OPEN'}  ${kind} ${id}: ${sentence}`);
  if (open.length > 0) console.log(`  Not met: ${open.join(', ')}`);
  console.log();
}
if (files.length === 0) console.log(`There is no lesson in ${relative(process.cwd(), FOLDER)}.`);
console.log(`${files.length - unsolved} of ${files.length} lessons solved`);
process.exitCode = unsolved > 0 || files.length === 0 ? 1 : 0;
