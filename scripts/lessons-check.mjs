// `npm run lessons:check [file …]`: compiles and rehearses lessons and says what to mend. Exit status 1 where there is
// anything to mend, or with --strict where there is anything to look at.
import { readdir, readFile } from 'node:fs/promises';
import { basename, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { register } from 'tsx/esm/api';

register();
const { compile, rehearseLesson, tellFault, tellRehearsal } = await import('../src/lessons/index.ts');

// A reader that closes early (`| head`) is no failure.
process.stdout.on('error', (error) => {
  if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EPIPE') process.exit();
  throw error;
});

const FOLDER = fileURLToPath(new URL('../content/lessons', import.meta.url));
const given = process.argv.slice(2);
const strict = given.includes('--strict');
const named = given.filter((argument) => !argument.startsWith('--'));

const beside = await readdir(FOLDER);
const course = beside.filter((name) => name.endsWith('.md')).sort();
const files =
  named.length > 0 ? named.map((name) => resolve(name)) : course.map((name) => join(FOLDER, name));

let [mend, look] = [0, 0];
const compiled = [];
for (const file of files) {
  const markdown = await readFile(file, 'utf8');
  const result = compile(markdown, { file: basename(file) });
  if (result.ok) compiled.push({ file, markdown, lesson: result.lesson });
  else {
    mend += result.faults.length;
    for (const fault of result.faults)
      console.log(tellFault({ ...fault, file: relative(process.cwd(), file) }));
    console.log();
  }
}
const slugs = new Set([
  ...course.map((name) => name.replace(/^\d+-|\.md$/g, '')),
  ...compiled.map(({ lesson }) => lesson.slug),
]);
for (const { file, markdown, lesson } of compiled) {
  const rehearsal = rehearseLesson(lesson, markdown, { lessons: slugs, pictures: new Set(beside) });
  mend += rehearsal.findings.filter(({ level }) => level === 'fault').length;
  look += rehearsal.findings.filter(({ level }) => level === 'look').length;
  const title = `${lesson.number} ${lesson.title}${lesson.draft ? ' (draft)' : ''}`;
  console.log(`${tellRehearsal(relative(process.cwd(), file), title, rehearsal)}\n`);
}
console.log(`${files.length} lessons, ${mend} to mend, ${look} to look at`);
process.exitCode = mend > 0 || (strict && look > 0) ? 1 : 0;
