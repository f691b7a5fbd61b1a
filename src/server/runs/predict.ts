import { QueryTypes } from 'sequelize';
import type { Prediction, PredictionOutcome } from '../../lessons/index.ts';
import { sequelize } from '../database/index.ts';
import type { StoredLesson } from '../lessons/index.ts';
import { ProblemError } from '../problem.ts';

export interface StoredPrediction {
  readonly prediction: string;
  readonly answer: string;
  readonly confidence: number;
  readonly observed: string | null;
  /** Told once the person has said what they saw. */
  readonly outcome?: PredictionOutcome;
}

function askedIn(lesson: StoredLesson, id: string): Prediction {
  for (const block of lesson.lesson.blocks)
    if (block.kind === 'prediction' && block.spec.id === id) return block.spec;
  throw new ProblemError({ status: 404, code: 'not-found', title: 'This lesson has no such prediction.' });
}

function optionOf(asked: Prediction, answer: string): string {
  if (!asked.options.some((option) => option.id === answer))
    throw new ProblemError({ status: 400, code: 'no-such-option', title: 'Choose one of the answers.' });
  return answer;
}

/** Locks a prediction. The first answer stands: asking again, from this or another device, changes nothing. */
export async function lockPrediction(
  personId: number,
  lesson: StoredLesson,
  id: string,
  answer: string,
  confidence: number,
): Promise<StoredPrediction> {
  optionOf(askedIn(lesson, id), answer);
  await sequelize.query(
    'INSERT IGNORE INTO predictions (person_id, lesson_id, prediction, answer, confidence, locked_at) VALUES (?, ?, ?, ?, ?, NOW(3))',
    { replacements: [personId, lesson.id, id, answer, confidence], type: QueryTypes.INSERT },
  );
  return (await predictionsOf(personId, lesson)).find((one) => one.prediction === id)!;
}

/** Stores what the person says they saw, once there is something to see; then tells what was computed. */
export async function observe(
  personId: number,
  lesson: StoredLesson,
  id: string,
  observed: string,
): Promise<StoredPrediction> {
  const asked = askedIn(lesson, id);
  optionOf(asked, observed);
  const [worked] = await sequelize.query(
    'SELECT 1 FROM runs WHERE person_id = ? AND lesson_id = ? AND bench = ? AND move_count > 0 LIMIT 1',
    {
      replacements: [personId, lesson.id, asked.bench],
      type: QueryTypes.SELECT,
    },
  );
  if (!worked)
    throw new ProblemError({
      status: 409,
      code: 'pour-first',
      title: 'Work on the bench first, then say what you saw.',
    });
  const [, changed] = await sequelize.query(
    'UPDATE predictions SET observed = COALESCE(observed, ?), observed_at = COALESCE(observed_at, NOW(3)) WHERE person_id = ? AND lesson_id = ? AND prediction = ?',
    { replacements: [observed, personId, lesson.id, id], type: QueryTypes.UPDATE },
  );
  const stored = (await predictionsOf(personId, lesson)).find((one) => one.prediction === id);
  if (!stored || changed === undefined)
    throw new ProblemError({ status: 409, code: 'predict-first', title: 'Lock in your prediction first.' });
  return stored;
}

/** A person's predictions in a lesson; outcomes only where they have said what they saw. */
export async function predictionsOf(personId: number, lesson: StoredLesson): Promise<StoredPrediction[]> {
  const rows = await sequelize.query<{
    prediction: string;
    answer: string;
    confidence: number;
    observed: string | null;
  }>(
    'SELECT prediction, answer, confidence, observed FROM predictions WHERE person_id = ? AND lesson_id = ?',
    { replacements: [personId, lesson.id], type: QueryTypes.SELECT },
  );
  return rows.map((row) => {
    if (row.observed === null) return row;
    const block = lesson.lesson.blocks.find(
      (one) => one.kind === 'prediction' && one.spec.id === row.prediction,
    );
    return block?.kind === 'prediction' ? { ...row, outcome: block.spec.outcome } : row;
  });
}
