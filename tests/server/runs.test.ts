// Runs as the server keeps them: every accepted move once and in order, whoever repeats, reorders or interrupts.
import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import type { Move } from '../../src/bench/index.ts';
import { migrate, Person, sequelize } from '../../src/server/database/index.ts';
import { publishLesson, readLesson, type StoredLesson } from '../../src/server/lessons/index.ts';
import { ProblemError } from '../../src/server/problem.ts';
import {
  lockPrediction,
  observe,
  openRun,
  progressOf,
  runPage,
  runsOf,
  saveMoves,
  takeOver,
} from '../../src/server/runs/index.ts';
import { movesShape, openShape, takeOverShape } from '../../src/server/runs/shapes.ts';
import { drop } from '../../src/server/runs/state.ts';
import { SOUND } from '../unit/lessons/lesson.ts';

let lesson: StoredLesson;
let person: Person;
let bench: string;
let prediction: { id: string; answer: string } | null = null;

const newPerson = () =>
  Person.create({
    publicId: randomUUID(),
    displayName: 'Adaeze Okonjo',
    email: null,
    emailVerifiedAt: null,
    passwordHash: null,
    conventions: null,
    disabledAt: null,
  });

beforeAll(async () => {
  await migrate();
  await publishLesson(SOUND, '90-two-beakers.md');
  lesson = (await readLesson('two-beakers'))!;
  for (const block of lesson.lesson.blocks) {
    if (block.kind === 'bench') bench = block.spec.id;
    if (block.kind === 'prediction') prediction = { id: block.spec.id, answer: block.spec.options[0]!.id };
  }
});
beforeEach(async () => {
  person = await newPerson();
});
afterAll(() => sequelize.close());

const drip = (drops = 1, into = 'water'): Move => ({ kind: 'drip', from: 'acid', into, drops });
const sent = (move: Move = drip(), opId: string = randomUUID()) => ({ opId, move });
const many = (count: number) => Array.from({ length: count }, () => sent());
const predict = (who = person) => lockPrediction(who.id, lesson, prediction!.id, prediction!.answer, 3);
async function begin(who = person): Promise<string> {
  const runId = randomUUID();
  if (prediction) await predict(who);
  await openRun(who.id, lesson, bench, runId);
  return runId;
}
const storedOps = async (runId: string) =>
  (
    await sequelize.query<{ op: string; number: number }>(
      `SELECT op_id AS op, number FROM run_moves JOIN runs ON runs.id = run_moves.run_id
       WHERE public_id = ? ORDER BY number`,
      { replacements: [runId], type: QueryTypes.SELECT },
    )
  ).map(({ op, number }) => [number, op] as const);
const problemOf = async (work: Promise<unknown>) => {
  const error = await work.then(
    () => null,
    (fault: unknown) => fault,
  );
  expect(error).toBeInstanceOf(ProblemError);
  return (error as ProblemError).problem;
};

test('moves are stored in order with what was shown, and aims are met', async () => {
  const runId = await begin();
  const list = many(3);
  expect(await saveMoves(person.id, runId, 0, list.slice(0, 1))).toMatchObject({ count: 1 });
  expect(await saveMoves(person.id, runId, 1, list.slice(1))).toMatchObject({ count: 3 });
  expect(await storedOps(runId)).toEqual(list.map(({ opId }, i) => [i + 1, opId]));
  const page = await runPage(person.id, runId);
  expect(page.rows.filter((row) => row.n !== null)).not.toHaveLength(0);
  expect(await runsOf(person.id)).toMatchObject([{ runId, moves: 3 }]);
});

test('a repeated request has one effect and the same answer', async () => {
  const runId = await begin();
  const list = many(2);
  const first = await saveMoves(person.id, runId, 0, list);
  for (let i = 0; i < 3; i++) expect(await saveMoves(person.id, runId, 0, list)).toEqual(first);
  expect(await storedOps(runId)).toHaveLength(2);
});

test('a request that is overtaken by a later one of the same browser brings nothing new', async () => {
  const runId = await begin();
  const list = many(3);
  await saveMoves(person.id, runId, 0, list);
  expect(await saveMoves(person.id, runId, 0, list.slice(0, 1))).toMatchObject({ count: 3 });
  expect(await saveMoves(person.id, runId, 1, list.slice(1, 2))).toMatchObject({ count: 3 });
  expect(await storedOps(runId)).toHaveLength(3);
});

test('another browser’s moves are not overwritten: the answer names them, and nothing is stored', async () => {
  const runId = await begin();
  const here = many(2);
  const there = many(1);
  await saveMoves(person.id, runId, 0, here);
  const problem = await problemOf(saveMoves(person.id, runId, 0, there));
  expect(problem).toMatchObject({ status: 409, code: 'other-moves' });
  expect(problem.extensions).toEqual({ count: 2, since: here });
  expect(await storedOps(runId)).toHaveLength(2);
  // What the other browser has is kept beside it when the person chooses.
  const branch = randomUUID();
  await openRun(person.id, lesson, bench, branch, { branchedFrom: runId });
  expect(await saveMoves(person.id, branch, 0, there)).toMatchObject({ count: 1 });
  expect((await runsOf(person.id)).map((run) => run.runId).sort()).toEqual([runId, branch].sort());
});

test('a sender who knows of moves that are not stored gets a conflict, not a gap', async () => {
  const runId = await begin();
  await saveMoves(person.id, runId, 0, many(1));
  expect(await problemOf(saveMoves(person.id, runId, 5, many(1)))).toMatchObject({ code: 'other-moves' });
  expect(await storedOps(runId)).toHaveLength(1);
});

test('twenty savers at once: each move once, in one order', async () => {
  const runId = await begin();
  const list = many(1);
  const answers = await Promise.all(Array.from({ length: 20 }, () => saveMoves(person.id, runId, 0, list)));
  expect(new Set(answers.map(({ count }) => count))).toEqual(new Set([1]));
  const rivals = await Promise.allSettled(
    Array.from({ length: 20 }, () => saveMoves(person.id, runId, 1, many(1))),
  );
  const won = rivals.filter(({ status }) => status === 'fulfilled');
  expect(won).toHaveLength(1);
  for (const rival of rivals)
    if (rival.status === 'rejected') expect((rival.reason as ProblemError).problem.code).toBe('other-moves');
  expect((await storedOps(runId)).map(([number]) => number)).toEqual([1, 2]);
});

test('what one node keeps in memory never outlives what another stored', async () => {
  const runId = await begin();
  const list = many(4);
  await saveMoves(person.id, runId, 0, list.slice(0, 2));
  const [run] = await sequelize.query<{ id: number }>('SELECT id FROM runs WHERE public_id = ?', {
    replacements: [runId],
    type: QueryTypes.SELECT,
  });
  // Another node, which keeps nothing of this run, stores the next move; this node's memory is one move behind then.
  const { shown } = (
    await sequelize.query<{ shown: string }>('SELECT shown FROM run_moves WHERE run_id = ? AND number = 2', {
      replacements: [run!.id],
      type: QueryTypes.SELECT,
    })
  )[0]!;
  await sequelize.query(
    `INSERT INTO run_moves (run_id, number, op_id, move, shown, engine_version, at)
     VALUES (?, 3, ?, ?, ?, 'other', NOW(3))`,
    { replacements: [run!.id, list[2]!.opId, JSON.stringify(list[2]!.move), JSON.stringify(shown)] },
  );
  await sequelize.query('UPDATE runs SET move_count = 3 WHERE id = ?', { replacements: [run!.id] });
  expect(await saveMoves(person.id, runId, 3, list.slice(3))).toMatchObject({ count: 4 });
  const here = await runPage(person.id, runId);
  drop(run!.id);
  expect(await runPage(person.id, runId)).toEqual(here);
});

test('a move that the bench refuses says why; what came before it stays', async () => {
  const runId = await begin();
  const cases = [
    { kind: 'pour', from: 'acid', into: 'water', volume_uL: 90_000_000 },
    { kind: 'drip', from: 'acid', into: 'nowhere', drops: 1 },
    { kind: 'drip', from: 'nothing', into: 'water', drops: 1 },
    { kind: 'drip', from: 'acid', into: 'water', drops: -1 },
    { kind: 'drip', from: 'acid', into: 'water', drops: 0.5 },
    { kind: 'drip', from: 'acid', into: 'water', drops: Number.MAX_SAFE_INTEGER },
    { kind: 'fly', from: 'acid' },
    { kind: '__proto__' },
    { kind: 'constructor' },
    { kind: 'drip' },
    { kind: 'drip', from: ['acid'], into: { toString: 1 }, drops: '1' },
  ] as unknown as Move[];
  let after = 0;
  for (const move of cases) {
    const good = sent();
    const bad = sent(move);
    const answer = await saveMoves(person.id, runId, after, [good, bad, sent()]);
    after += 1;
    expect(answer.count, JSON.stringify(move)).toBe(after);
    expect(answer.refused, JSON.stringify(move)).toMatchObject({ opId: bad.opId });
    expect(answer.refused!.sentence).toMatch(/^\S.*\.$/);
  }
});

test('bodies that are no moves are refused before they reach a run', () => {
  const good = { after: 0, moves: [sent()] };
  expect(movesShape.safeParse(good).success).toBe(true);
  const opId = randomUUID();
  const deep = JSON.parse('['.repeat(2000) + ']'.repeat(2000)) as unknown;
  const hostile: unknown[] = [
    null,
    [],
    'moves',
    {},
    { after: 0 },
    { moves: [] },
    { ...good, extra: 1 },
    { after: -1, moves: [] },
    { after: 0.5, moves: [] },
    { after: 1e9, moves: [] },
    { after: '0', moves: [] },
    { after: NaN, moves: [] },
    { after: 0, moves: {} },
    { after: 0, moves: many(501) },
    { after: 0, moves: [null] },
    { after: 0, moves: [{ opId }] },
    { after: 0, moves: [{ opId: 'x', move: drip() }] },
    { after: 0, moves: [{ opId: opId.toUpperCase(), move: drip() }] },
    { after: 0, moves: [{ opId, move: drip(), at: 1 }] },
    { after: 0, moves: [{ opId, move: [] }] },
    { after: 0, moves: [{ opId, move: { kind: 1 } }] },
    { after: 0, moves: [{ opId, move: { kind: 'x'.repeat(31) } }] },
    { after: 0, moves: [{ opId, move: { kind: 'drip', drops: Infinity } }] },
    { after: 0, moves: [{ opId, move: { kind: 'drip', from: { a: 1 } } }] },
    { after: 0, moves: [{ opId, move: { kind: 'drip', from: null } }] },
    { after: 0, moves: [{ opId, move: { kind: 'label', text: 'x'.repeat(201) } }] },
    { after: 0, moves: [{ opId, move: { kind: 'drip', into: deep } }] },
    { after: 0, moves: [{ opId, move: { kind: 'a', b: 1, c: 1, d: 1, e: 1, f: 1, g: 1, h: 1, i: 1 } }] },
  ];
  for (const body of hostile)
    expect(movesShape.safeParse(body).success, JSON.stringify(body)?.slice(0, 120)).toBe(false);
  for (const body of [
    {},
    { runId: opId, lesson: '../x', bench: 'a' },
    { runId: opId, lesson: 'a', bench: 'A' },
    { runId: opId, lesson: 'a', bench: 'a', seed: 0 },
    { runId: opId, lesson: 'a', bench: 'a', personId: 1 },
  ])
    expect(openShape.safeParse(body).success, JSON.stringify(body)).toBe(false);
  expect(
    takeOverShape.safeParse({ lesson: 'a', runId: opId, bench: 'a', seed: 1, moves: many(2001) }).success,
  ).toBe(false);
});

test('somebody else’s run does not exist', async () => {
  const runId = await begin();
  const other = await newPerson();
  for (const work of [
    () => saveMoves(other.id, runId, 0, many(1)),
    () => runPage(other.id, runId),
    () => openRun(other.id, lesson, bench, runId),
  ])
    expect(await problemOf(work())).toMatchObject({ status: 404 });
  expect(await storedOps(runId)).toHaveLength(0);
});

test('no move before the prediction is locked; the first answer stands; no outcome before something was seen', async () => {
  expect(prediction).not.toBeNull();
  const runId = randomUUID();
  await openRun(person.id, lesson, bench, runId);
  expect(await problemOf(saveMoves(person.id, runId, 0, many(1)))).toMatchObject({
    status: 409,
    code: 'predict-first',
  });
  expect(await problemOf(observe(person.id, lesson, prediction!.id, prediction!.answer))).toMatchObject({
    code: 'pour-first',
  });
  const first = await predict();
  expect(first).not.toHaveProperty('outcome');
  const again = await lockPrediction(person.id, lesson, prediction!.id, prediction!.answer, 1);
  expect(again.confidence).toBe(3);
  await saveMoves(person.id, runId, 0, many(1));
  expect(await observe(person.id, lesson, prediction!.id, prediction!.answer)).toHaveProperty('outcome');
});

test('a run holds 2,000 moves and says so', async () => {
  const runId = await begin();
  // Drops from hand to hand would overflow: taking back and putting in again does not.
  const list = Array.from({ length: 2001 }, (_, i) => sent(i % 2 === 0 ? drip() : { kind: 'undo' }));
  for (let after = 0; after < 2000; after += 500)
    expect(await saveMoves(person.id, runId, after, list.slice(after, after + 500))).toMatchObject({
      count: after + 500,
    });
  const problem = await problemOf(saveMoves(person.id, runId, 2000, list.slice(2000)));
  expect(problem).toMatchObject({ status: 422, code: 'run-full' });
  expect(problem.title).toContain('2000');
  expect(await storedOps(runId)).toHaveLength(2000);
});

test('work from before an account is taken over once, judged like any other, and found on another device', async () => {
  const work = {
    runId: randomUUID(),
    bench,
    seed: 4711,
    moves: many(3),
    ...(prediction ? { prediction: { ...prediction, confidence: 2 } } : {}),
  };
  const first = await takeOver(person.id, lesson, work);
  expect(await takeOver(person.id, lesson, work)).toEqual(first);
  const progress = await progressOf(person.id, lesson);
  expect(progress.runs).toEqual([
    { runId: work.runId, bench, seed: 4711, moves: work.moves.map(({ move }) => move) },
  ]);
  expect(progress.metAims).toEqual([...first.metAims]);
  const other = await newPerson();
  expect(await problemOf(takeOver(other.id, lesson, work))).toMatchObject({ status: 404 });
});

test('aims stay met whatever is done later, and finishing is read from the database', async () => {
  const runId = await begin();
  const before = await progressOf(person.id, lesson);
  const list = Array.from({ length: 30 }, () => sent(drip(5, 'buffer')));
  const { metAims } = await saveMoves(person.id, runId, 0, list);
  expect(metAims.length).toBeGreaterThan(0);
  await saveMoves(person.id, runId, 30, [sent({ kind: 'startAgain' })]);
  const after = await progressOf(person.id, lesson);
  expect(after.metAims).toEqual(expect.arrayContaining([...metAims]));
  expect(after.done.length).toBeGreaterThan(before.done.length);
});
