import { randomInt } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import type { BenchSpec } from '../../bench/index.ts';
import { ENGINE_VERSION } from '../../chemistry/index.ts';
import { sequelize } from '../database/index.ts';
import type { StoredLesson } from '../lessons/index.ts';
import { ProblemError } from '../problem.ts';

export interface StoredRun {
  readonly id: number;
  readonly publicId: string;
  readonly personId: number;
  readonly lessonId: number;
  readonly revision: number;
  readonly bench: string;
  readonly seed: number;
  readonly moveCount: number;
  readonly updatedAt: Date;
}

export const RUN_COLUMNS = `id, public_id AS publicId, person_id AS personId, lesson_id AS lessonId, revision, bench, seed,
  move_count AS moveCount, updated_at AS updatedAt`;

const notFound = () =>
  new ProblemError({ status: 404, code: 'not-found', title: 'There is no such run of yours.' });

/** The bench of a lesson, or a 404 problem. */
export function benchOf(lesson: StoredLesson, bench: string): BenchSpec {
  for (const block of lesson.lesson.blocks)
    if (block.kind === 'bench' && block.spec.id === bench) return block.spec;
  throw new ProblemError({ status: 404, code: 'not-found', title: 'This lesson has no such bench.' });
}

/** What a replayed state hangs on: the text that it was set up from and the code that replays it. */
export const stateKey = (run: { revision: number; bench: string }): string =>
  `${run.revision}:${run.bench}:${ENGINE_VERSION}`;

/** One of a person's own runs. Anyone else's does not exist. */
export async function ownRun(personId: number, publicId: string): Promise<StoredRun> {
  const [run] = await sequelize.query<StoredRun>(
    `SELECT ${RUN_COLUMNS} FROM runs WHERE public_id = ? AND person_id = ?`,
    {
      replacements: [publicId, personId],
      type: QueryTypes.SELECT,
    },
  );
  if (!run) throw notFound();
  return run;
}

/**
 * Opens a run under an id made by the browser; asking twice opens one.
 * @param seed kept where the run was begun without an account; else drawn here
 */
export async function openRun(
  personId: number,
  lesson: StoredLesson,
  bench: string,
  publicId: string,
  options: { seed?: number; branchedFrom?: string } = {},
): Promise<StoredRun> {
  benchOf(lesson, bench);
  await sequelize.query(
    `INSERT IGNORE INTO runs (public_id, person_id, lesson_id, revision, bench, seed, branched_from, created_at, updated_at)
     VALUES (:publicId, :personId, :lessonId, :revision, :bench, :seed, :branchedFrom, NOW(3), NOW(3))`,
    {
      replacements: {
        publicId,
        personId,
        lessonId: lesson.id,
        revision: lesson.revision,
        bench,
        seed: options.seed ?? randomInt(1, 2 ** 31),
        branchedFrom: options.branchedFrom ?? null,
      },
      type: QueryTypes.INSERT,
    },
  );
  const run = await ownRun(personId, publicId);
  if (run.lessonId !== lesson.id || run.bench !== bench)
    throw new ProblemError({
      status: 409,
      code: 'run-elsewhere',
      title: 'This run belongs to another bench.',
    });
  return run;
}

/** The newest run of a person on each bench of a lesson. */
export async function newestRuns(personId: number, lessonId: number): Promise<StoredRun[]> {
  const rows = await sequelize.query<StoredRun>(
    `SELECT ${RUN_COLUMNS} FROM runs WHERE person_id = ? AND lesson_id = ? ORDER BY updated_at DESC, id DESC`,
    { replacements: [personId, lessonId], type: QueryTypes.SELECT },
  );
  const seen = new Set<string>();
  return rows.filter((run) => !seen.has(run.bench) && seen.add(run.bench));
}
