import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { TELLING_ATTEMPT, type Answer } from '../../src/lessons/index.ts';
import { giveAnswer, markForVisitor, mayAnswer, seedOf } from '../../src/server/answers/index.ts';
import { answerShape } from '../../src/server/answers/shapes.ts';
import { migrate, Person, sequelize } from '../../src/server/database/index.ts';
import { publishLesson, readLesson, type StoredLesson } from '../../src/server/lessons/index.ts';
import { exportPerson } from '../../src/server/people/export.ts';
import { progressOf, rackOf } from '../../src/server/runs/index.ts';
import { changed, SOUND } from '../unit/lessons/lesson.ts';

const EXPLAIN = `
\`\`\`question
id: why
kind: explain
ask: Why does the buffer change little?
model: Ethanoate ions take the hydrogen ions in, so that few stay free.
points: [Ethanoate takes hydrogen ions in., Few of them stay free.]
\`\`\`
`;
let lesson: StoredLesson;
let person: Person;

beforeAll(async () => {
  await migrate();
  await publishLesson(SOUND + EXPLAIN, '90-two-beakers.md');
  lesson = (await readLesson('two-beakers'))!;
});
beforeEach(async () => {
  person = await Person.create({
    publicId: randomUUID(),
    displayName: 'Adaeze Okonjo',
    email: null,
    emailVerifiedAt: null,
    passwordHash: null,
    conventions: null,
    disabledAt: null,
  });
});
afterAll(() => sequelize.close());

const who = () => ({ id: person.id, publicId: person.publicId });
const give = (question: string, answer: Answer, opId: string = randomUUID()) =>
  giveAnswer(who(), lesson, question, opId, answer);
const typed = (text: string): Answer => ({ kind: 'numeric', typed: text });
const chosen = (...ids: string[]): Answer => ({ kind: 'choice', chosen: ids });
const stored = () =>
  sequelize.query<{ question: string; attempt: number; verdict: string }>(
    'SELECT question, attempt, verdict FROM answers WHERE person_id = ? ORDER BY id',
    { replacements: [person.id], type: QueryTypes.SELECT },
  );

test('a key is told from the third counted answer on, and what was asked back does not count', async () => {
  for (let attempt = 1; attempt < TELLING_ATTEMPT; attempt++) {
    expect(await give('dilute', typed('1,000'))).toMatchObject({ attempt, marking: { verdict: 'ask' } });
    const { marking, ...rest } = await give('dilute', typed('9.99'));
    expect(rest).toEqual({ attempt, done: false });
    expect(marking.verdict).toBe('not-yet');
    expect(marking).not.toHaveProperty('key');
    expect(marking).not.toHaveProperty('solution');
    expect(marking.poured!.asked.pH).toBeNull();
  }
  const told = await give('dilute', typed('9.99'));
  expect(told.marking.key).toMatch(/^\d\.\d\d$/);
  expect(told.marking.poured!.asked.pH).toBeCloseTo(Number(told.marking.key), 2);
  expect(await give('dilute', typed(told.marking.key!))).toMatchObject({ attempt: 4, done: true });
  expect((await stored()).map(({ verdict }) => verdict)).toEqual(['not-yet', 'not-yet', 'not-yet', 'right']);
});

test('the same answer sent again, also twice at once, counts once and gets the same word', async () => {
  const opId = randomUUID();
  const both = await Promise.all([give('which', chosen('salt'), opId), give('which', chosen('salt'), opId)]);
  expect(both[0]).toEqual(both[1]);
  await give('which', chosen('both'));
  expect(await give('which', chosen('both'), opId)).toMatchObject({ attempt: 1, marking: both[0]!.marking });
  expect(await stored()).toHaveLength(2);
  await expect(give('dilute', typed('3'), opId)).rejects.toMatchObject({ problem: { code: 'op-id-used' } });
});

test('two different answers at once are two attempts', async () => {
  const both = await Promise.all([give('which', chosen('salt')), give('which', chosen('salt', 'both'))]);
  expect(both.map(({ attempt }) => attempt).sort()).toEqual([1, 2]);
});

test('what is done is done on the rack and in the lesson, in the text’s order, and stays so in a new revision', async () => {
  await give('which', chosen('both'));
  await give('which', chosen('salt'));
  expect((await progressOf(person.id, lesson)).done).toEqual(['which']);
  const [tube] = await rackOf(person.id, [{ ...lesson, mayOpen: true }]);
  expect(tube).toMatchObject({ done: 1, total: 5 });
  await publishLesson(
    changed('Which one is a buffer?', 'Which is a buffer?', SOUND + EXPLAIN),
    '90-two-beakers.md',
  );
  const next = (await readLesson('two-beakers'))!;
  expect(next.revision).toBe(lesson.revision + 1);
  const progress = await progressOf(person.id, next);
  expect(progress.done).toEqual(['which']);
  // The new text may ask for something else: its attempts start anew, and no old feedback stands below it.
  expect(progress.answers).toEqual([]);
  expect(await giveAnswer(who(), next, 'which', randomUUID(), chosen('salt'))).toMatchObject({
    attempt: 1,
    done: true,
  });
});

test('a model answer comes after a text of one’s own; points that are ticked unseen do not count', async () => {
  const text = 'The ethanoate ions take the hydrogen ions.';
  const first = await give('why', { kind: 'explain', text, points: [0, 1] });
  expect(first).toMatchObject({ done: false, marking: { verdict: 'compare' } });
  expect(first.marking.points).toHaveLength(2);
  expect(await give('why', { kind: 'explain', text, points: [0] })).toMatchObject({ done: false });
  expect(await give('why', { kind: 'explain', text, points: [0, 1] })).toMatchObject({ done: true });
  expect((await progressOf(person.id, lesson)).answers).toMatchObject([
    { question: 'why', attempt: 3, answer: { text, points: [0, 1] } },
  ]);
});

test('a visitor is marked as their browser counts, and nothing is stored', async () => {
  const before = await sequelize.query('SELECT COUNT(*) AS n FROM answers', { type: QueryTypes.SELECT });
  const first = await markForVisitor(lesson, 'dilute', typed('9.99'), 1);
  expect(first.marking).not.toHaveProperty('key');
  const third = await markForVisitor(lesson, 'dilute', typed('9.99'), TELLING_ATTEMPT);
  expect(await markForVisitor(lesson, 'dilute', typed(third.marking.key!), 1)).toMatchObject({ done: true });
  const after = await sequelize.query('SELECT COUNT(*) AS n FROM answers', { type: QueryTypes.SELECT });
  expect(after).toEqual(before);
});

test('answers to what is not there are refused with a reason and leave nothing', async () => {
  await expect(give('nothing', chosen('a'))).rejects.toMatchObject({ problem: { status: 404 } });
  await expect(give('which', chosen('gone'))).rejects.toMatchObject({
    problem: { status: 422, code: 'no-such-answer' },
  });
  await expect(give('which', typed('3'))).rejects.toMatchObject({ problem: { status: 422 } });
  expect(await stored()).toEqual([]);
  const sent = {
    lesson: 'two-beakers',
    question: 'which',
    opId: randomUUID(),
    person: null,
    answer: chosen('both'),
  };
  expect(answerShape.safeParse(sent).success).toBe(true);
  for (const broken of [
    { ...sent, opId: 'x' },
    { ...sent, attempt: 0 },
    { ...sent, answer: { kind: 'choice', chosen: Array(9).fill('a') } },
    { ...sent, answer: { kind: 'explain', text: 'x'.repeat(4001) } },
    { ...sent, answer: { kind: 'match', matched: { 'a b': 'c' } } },
    { ...sent, verdict: 'right' },
  ])
    expect(answerShape.safeParse(broken).success).toBe(false);
});

test('people have their own numbers, the same on every device', async () => {
  const ids = Array.from({ length: 200 }, () => randomUUID());
  const seeds = ids.map((id) => seedOf(id, 'two-beakers'));
  expect(seeds).toEqual(ids.map((id) => seedOf(id, 'two-beakers')));
  expect(new Set(seeds).size).toBe(200);
  expect(seeds.every((seed) => Number.isInteger(seed) && seed >= 1 && seed < 2 ** 31)).toBe(true);
  expect(seedOf(ids[0]!, 'two-beakers')).not.toBe(seedOf(ids[0]!, 'another'));
});

test('a flood of answers from one account is held up, with when to go on', async () => {
  const key = randomUUID();
  for (let n = 0; n < 120; n++) await mayAnswer('person', key);
  await expect(mayAnswer('person', key)).rejects.toMatchObject({
    problem: { status: 429, headers: { 'Retry-After': expect.stringMatching(/^[1-9]\d?$/) } },
  });
});

test('answers are in a person’s export and go with the account', async () => {
  await give('which', chosen('salt'));
  expect((await exportPerson(person.id)).answers).toMatchObject([
    {
      lesson: 'two-beakers',
      question: 'which',
      attempt: 1,
      verdict: 'not-yet',
      answer: { kind: 'choice', chosen: ['salt'] },
      marking: { misconceptions: ['M13'] },
    },
  ]);
  await person.destroy();
  expect(await stored()).toEqual([]);
});
