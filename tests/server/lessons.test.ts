import { randomUUID } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { migrate, School, sequelize } from '../../src/server/database/index.ts';
import {
  LessonFaults,
  listLessons,
  publishLesson,
  publishShippedCourse,
  readLesson,
} from '../../src/server/lessons/index.ts';
import { changed, SOUND } from '../unit/lessons/lesson.ts';

const file = '90-two-beakers.md';
let folder: string;

beforeAll(async () => {
  await migrate();
  folder = await mkdtemp(path.join(tmpdir(), 'dropwise-course-'));
});
afterAll(async () => {
  await rm(folder, { recursive: true });
  await sequelize.close();
});

test('a lesson is published, left alone while its text is the same, and revised when it changes', async () => {
  expect(await publishLesson(SOUND, file)).toMatchObject({ revision: 1, change: 'new' });
  expect(await publishLesson(SOUND, file)).toMatchObject({ revision: 1, change: 'same' });
  const shorter = changed('id: yellow,', 'id: turned,');
  expect(await publishLesson(shorter, file)).toEqual({
    slug: 'two-beakers',
    revision: 2,
    change: 'revised',
    vanished: ['yellow'],
  });
  expect((await readLesson('two-beakers'))!.revision).toBe(2);
  const first = await readLesson('two-beakers', 1);
  expect(first!.lesson.checkpoints.map(({ id }) => id)).toContain('yellow');
});

test('the text of a revision never changes; an older compiled form is renewed in its place', async () => {
  const rows = () =>
    sequelize.query<{ revision: number; markdown: string; version: number }>(
      'SELECT revision, markdown, compiler_version AS version FROM lesson_revisions ORDER BY revision',
      { type: QueryTypes.SELECT },
    );
  const before = await rows();
  await sequelize.query(
    'UPDATE lesson_revisions SET compiler_version = 0, compiled = \'{"checkpoints":[]}\'',
  );
  const shorter = changed('id: yellow,', 'id: turned,');
  expect(await publishLesson(shorter, file)).toMatchObject({ revision: 2, change: 'recompiled' });
  const after = await rows();
  expect(after.map(({ markdown }) => markdown)).toEqual(before.map(({ markdown }) => markdown));
  expect((await readLesson('two-beakers'))!.lesson.blocks.length).toBeGreaterThan(0);
});

test('a lesson with faults is not published and says where they are', async () => {
  const wrong = changed('glass: beaker-100', 'glass: beeker-100');
  await expect(publishLesson(wrong, file)).rejects.toThrow(
    /90-two-beakers\.md:28:5 .*beeker-100.*Write: glass: beaker-100/,
  );
  expect((await readLesson('two-beakers'))!.revision).toBe(2);
});

test('a school’s author cannot write over a lesson of the course, and its lesson is seen by that school alone', async () => {
  const school = await School.create({
    publicId: randomUUID(),
    name: 'Harrowmere College',
    code: 'harrowmere',
  });
  await expect(publishLesson(SOUND, file, school.id)).rejects.toThrow(LessonFaults);
  await publishLesson(SOUND, '91-our-beakers.md', school.id);
  expect((await listLessons()).map(({ slug }) => slug)).toEqual(['two-beakers']);
  expect((await listLessons([school.id])).map(({ slug }) => slug)).toEqual(['our-beakers', 'two-beakers']);
});

test('a deployment publishes the course without its drafts', async () => {
  await writeFile(path.join(folder, '01-ready.md'), SOUND);
  await writeFile(path.join(folder, '02-draft.md'), changed('minutes: 20', 'minutes: 20\ndraft: true'));
  expect((await publishShippedCourse(folder)).map(({ slug }) => slug)).toEqual(['ready']);
  expect(await readLesson('draft')).toBeNull();
});
