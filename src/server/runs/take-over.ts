import type { StoredLesson } from '../lessons/index.ts';
import { openRun } from './open.ts';
import { lockPrediction } from './predict.ts';
import { saveMoves, type Saved, type SentMove } from './save.ts';

/** What a browser kept of work without an account: a prediction and a run. */
export interface LocalWork {
  readonly runId: string;
  readonly bench: string;
  readonly seed: number;
  readonly moves: readonly SentMove[];
  readonly prediction?: { readonly id: string; readonly answer: string; readonly confidence: number };
}

/**
 * Takes over a run that was begun without an account, after the person said that it is theirs. The prediction goes first;
 * the moves are replayed and judged like any others. Doing it twice does it once.
 */
export async function takeOver(personId: number, lesson: StoredLesson, work: LocalWork): Promise<Saved> {
  if (work.prediction)
    await lockPrediction(
      personId,
      lesson,
      work.prediction.id,
      work.prediction.answer,
      work.prediction.confidence,
    );
  await openRun(personId, lesson, work.bench, work.runId, { seed: work.seed });
  return saveMoves(personId, work.runId, 0, work.moves);
}
