import { QueryTypes } from 'sequelize';
import type { Answer, Marking } from '../../lessons/index.ts';
import { sequelize } from '../database/index.ts';
import type { StoredLesson } from '../lessons/index.ts';

/** Where a person stands with a question: their newest counted answer to it and what was said to it. */
export interface StoredAnswer {
  readonly question: string;
  readonly attempt: number;
  readonly answer: Answer;
  readonly marking: Marking;
}

export const parsed = <T>(column: string | T): T =>
  typeof column === 'string' ? (JSON.parse(column) as T) : column;

/** The newest answer to each question of the revision that is shown. */
export async function answersOf(personId: number, lesson: StoredLesson): Promise<StoredAnswer[]> {
  const rows = await sequelize.query<{
    question: string;
    attempt: number;
    answer: string | Answer;
    marking: string | Marking;
  }>(
    `SELECT question, attempt, answer, marking FROM answers
      WHERE person_id = :personId AND lesson_id = :lessonId AND revision = :revision ORDER BY question, attempt`,
    {
      replacements: { personId, lessonId: lesson.id, revision: lesson.revision },
      type: QueryTypes.SELECT,
    },
  );
  const newest = new Map<string, StoredAnswer>();
  for (const row of rows)
    newest.set(row.question, { ...row, answer: parsed(row.answer), marking: parsed(row.marking) });
  return [...newest.values()];
}

/** Questions that a person has answered, in whatever revision: finished stays finished. */
export async function answeredIn(personId: number, lessonId: number): Promise<string[]> {
  const rows = await sequelize.query<{ question: string }>(
    `SELECT DISTINCT question FROM answers WHERE person_id = ? AND lesson_id = ? AND verdict = 'right'`,
    { replacements: [personId, lessonId], type: QueryTypes.SELECT },
  );
  return rows.map((row) => row.question);
}
