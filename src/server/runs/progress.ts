import { QueryTypes } from 'sequelize';
import type { Move } from '../../bench/index.ts';
import type { CompiledLesson } from '../../lessons/index.ts';
import { answeredIn, answersOf, type StoredAnswer } from '../answers/stored.ts';
import { sequelize } from '../database/index.ts';
import type { StoredLesson } from '../lessons/index.ts';
import { newestRuns } from './open.ts';
import { predictionsOf, type StoredPrediction } from './predict.ts';
import { movesAfter } from './state.ts';

export interface Progress {
  readonly runs: readonly {
    readonly runId: string;
    readonly bench: string;
    readonly seed: number;
    readonly moves: readonly Move[];
  }[];
  readonly predictions: readonly StoredPrediction[];
  readonly metAims: readonly string[];
  /** The newest answer to each question. */
  readonly answers: readonly StoredAnswer[];
  /** Ids of the checkpoints that count as done. */
  readonly done: readonly string[];
}

/** Where a person stands in a lesson: what they left on each bench, predicted, answered and met. */
export async function progressOf(personId: number, lesson: StoredLesson): Promise<Progress> {
  const [runs, predictions, aims, answers, answered] = await Promise.all([
    newestRuns(personId, lesson.id),
    predictionsOf(personId, lesson),
    sequelize.query<{ aim: string }>(
      'SELECT aim FROM met_aims WHERE person_id = ? AND lesson_id = ? ORDER BY met_at',
      {
        replacements: [personId, lesson.id],
        type: QueryTypes.SELECT,
      },
    ),
    answersOf(personId, lesson),
    answeredIn(personId, lesson.id),
  ]);
  const metAims = aims.map((row) => row.aim);
  // Only runs of the revision that is shown are taken up again; a bench that changed starts anew and the old run stays.
  const current = runs.filter((run) => run.revision === lesson.revision);
  const moves = await Promise.all(current.map((run) => movesAfter(run.id, 0)));
  return {
    runs: current.map((run, i) => ({
      runId: run.publicId,
      bench: run.bench,
      seed: run.seed,
      moves: moves[i]!.map((row) => row.move),
    })),
    predictions,
    metAims,
    answers,
    done: doneIn(
      lesson.lesson,
      predictions.map((one) => one.prediction),
      metAims,
      answered,
    ),
  };
}

/** The checkpoints of a lesson that are done, in the order of the text. */
export function doneIn(
  lesson: CompiledLesson,
  predictions: readonly string[],
  metAims: readonly string[],
  answered: readonly string[],
): string[] {
  const done = new Set([...predictions, ...metAims, ...answered]);
  return lesson.checkpoints
    .filter((checkpoint) => done.has(checkpoint.id))
    .map((checkpoint) => checkpoint.id);
}
