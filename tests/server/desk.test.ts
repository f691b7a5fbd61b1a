import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import type { Standing } from '../../src/server/access/memberships.ts';
import { lessonFor } from '../../src/server/access/lesson.ts';
import { migrate, Person, School, sequelize } from '../../src/server/database/index.ts';
import {
  checkLesson,
  homesOf,
  publishFromDesk,
  revisionsOf,
  tellVanishing,
  textOf,
  vanishingWith,
  type Checked,
  type Home,
} from '../../src/server/desk/index.ts';
import { LessonFaults, readLesson } from '../../src/server/lessons/index.ts';
import { changed as changedIn, SOUND as LESSON } from '../unit/lessons/lesson.ts';

// A thread compiles the compiler first: slow where other work is done at the same time.
vi.setConfig({ testTimeout: 180_000 });

const FILE = '90-two-beakers.md';
const SOUND = changedIn(
  '```prediction',
  ':::caution\nWear eye protection. Follow your local rules and your school’s licensed practice.\n:::\n\n```prediction',
  LESSON,
);
const changed = (from: string, to: string): string => changedIn(from, to, SOUND);
let [ours, theirs] = [0, 0];
let person: Person;

const authorIn = (schoolId: Home): Standing => ({ memberships: [{ role: 'author', schoolId }] });
const learnerIn = (schoolId: Home): Standing => ({ memberships: [{ role: 'learner', schoolId }] });
/** A text is checked once: each check is a thread that starts from nothing. */
const known = new Map<string, Promise<Checked>>();
const checkedOnce = (markdown: string, file: string): Promise<Checked> => {
  const key = `${file}
${markdown}`;
  const found = known.get(key) ?? checkLesson(markdown, file);
  known.set(key, found);
  return found;
};
const publish = async (markdown: string, home: Home, standing = authorIn(home), file = FILE) =>
  publishFromDesk({ id: person.id, standing }, home, await checkedOnce(markdown, file), markdown, file);

beforeAll(async () => {
  await migrate();
  const school = async (name: string, code: string) =>
    (await School.create({ publicId: randomUUID(), name, code })).id;
  ours = await school('Harrowmere College', 'harrowmere');
  theirs = await school('Sandwick School', 'sandwick');
  person = await Person.create({
    publicId: randomUUID(),
    displayName: 'Saoirse Brannigan',
    email: null,
    emailVerifiedAt: null,
    passwordHash: null,
    conventions: null,
    disabledAt: null,
  });
});
afterAll(() => sequelize.close());

test('faults come with line and column; nothing is published', async () => {
  const broken = changed('kind: colour', 'kind: color');
  const checked = await checkedOnce(broken, FILE);
  expect(checked).toMatchObject({ ok: false });
  if (!checked.ok)
    expect(checked.faults[0]).toMatchObject({ file: FILE, line: expect.any(Number) as number });
  await expect(publish(broken, ours)).rejects.toBeInstanceOf(LessonFaults);
  expect(await readLesson('two-beakers')).toBeNull();
});

test('a YAML bomb and endless work are refused in bounded time', async () => {
  const bomb = changed(
    'title: Two beakers',
    `a: &a [x,x,x,x,x,x,x,x,x]\nb: &b [*a,*a,*a,*a,*a,*a,*a,*a,*a]\nc: &c [*b,*b,*b,*b,*b,*b,*b,*b,*b]\nd: [*c,*c,*c,*c]\ntitle: Two beakers`,
  );
  expect((await checkLesson(bomb, FILE)).ok).toBe(false);
  const late = await checkLesson(SOUND, FILE, { patience_ms: 1 });
  expect(late).toMatchObject({
    ok: false,
    faults: [{ message: expect.stringMatching(/takes more than/) as string }],
  });
});

test('a school’s author publishes to that school’s people; others find nothing', async () => {
  expect(await publish(SOUND, ours)).toMatchObject({ slug: 'two-beakers', revision: 1, change: 'new' });
  expect((await lessonFor('two-beakers', learnerIn(ours))).revision).toBe(1);
  for (const standing of [learnerIn(theirs), authorIn(theirs), authorIn(null), null])
    await expect(lessonFor('two-beakers', standing)).rejects.toMatchObject({ problem: { status: 404 } });
  expect(await textOf('two-beakers', 1, homesOf(authorIn(theirs)))).toBeNull();
  expect(await revisionsOf(homesOf(authorIn(theirs)))).toEqual([]);
  expect(await textOf('two-beakers', 1, homesOf(authorIn(ours)))).toMatchObject({ markdown: SOUND });
});

test('nobody publishes beyond their school, or over another’s lesson or the shipped course', async () => {
  await expect(publish(SOUND, theirs, authorIn(ours))).rejects.toMatchObject({ problem: { status: 404 } });
  await expect(publish(SOUND, null, authorIn(ours))).rejects.toMatchObject({ problem: { status: 404 } });
  await expect(publish(SOUND, ours, learnerIn(ours))).rejects.toMatchObject({ problem: { status: 404 } });
  await expect(publish(SOUND, theirs)).rejects.toBeInstanceOf(LessonFaults);
  await expect(publish(SOUND, null, authorIn(null), '07-meeting-a-buffer.md')).rejects.toThrow(
    /shipped course/,
  );
  await expect(publish(changed('minutes: 20', 'minutes: 20\ndraft: true'), ours)).rejects.toThrow(/draft/);
  expect((await readLesson('two-beakers'))!.revision).toBe(1);
});

test('what vanishes is named with how many met it, and stays met', async () => {
  const { id } = (await readLesson('two-beakers'))!;
  await sequelize.query(
    "INSERT INTO met_aims (person_id, lesson_id, aim, move_number, met_at) VALUES (?, ?, 'yellow', 1, NOW(3))",
    { replacements: [person.id, id], type: QueryTypes.INSERT },
  );
  const renamed = changed('id: yellow,', 'id: turned,');
  const checked = await checkedOnce(renamed, FILE);
  if (!checked.ok) throw new Error('The lesson is sound.');
  const gone = await vanishingWith(checked.lesson, ours);
  expect(gone.map(tellVanishing)).toEqual(["The aim 'yellow' (Turn the buffer yellow) is gone; met by 1."]);
  expect(await publish(renamed, ours)).toMatchObject({
    revision: 2,
    change: 'revised',
    vanished: ['yellow'],
  });
  expect((await revisionsOf([ours])).map(({ revision, current }) => [revision, current])).toEqual([
    [2, true],
    [1, false],
  ]);
  const [met] = await sequelize.query<{ n: number }>(
    'SELECT COUNT(*) AS n FROM met_aims WHERE lesson_id = ?',
    {
      replacements: [id],
      type: QueryTypes.SELECT,
    },
  );
  expect(Number(met!.n)).toBe(1);
});
