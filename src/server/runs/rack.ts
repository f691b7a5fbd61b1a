import { QueryTypes } from 'sequelize';
import { sequelize } from '../database/index.ts';
import type { StoredLesson } from '../lessons/index.ts';

export interface Tube {
  readonly slug: string;
  readonly number: number;
  readonly title: string;
  readonly summary: string;
  readonly minutes: number;
  readonly open: boolean;
  readonly total: number;
  readonly done: number;
  /** The person's own last solution in this lesson. */
  readonly solution: { readonly words: string; readonly hex: string; readonly pH: number | null } | null;
}

/** The rack: a tube for each lesson, filled as far as its checkpoints are done. Three queries, however many lessons. */
export async function rackOf(
  personId: number | null,
  lessons: readonly (StoredLesson & { mayOpen: boolean })[],
): Promise<Tube[]> {
  const done = new Map<number, Set<string>>();
  const last = new Map<number, { words: string; hex: string; pH: number | null }>();
  if (personId !== null) {
    const replacements = { personId };
    const [checkpoints, runs] = await Promise.all([
      sequelize.query<{ lessonId: number; id: string }>(
        `SELECT lesson_id AS lessonId, prediction AS id FROM predictions WHERE person_id = :personId
         UNION ALL SELECT lesson_id, aim FROM met_aims WHERE person_id = :personId
         UNION ALL SELECT DISTINCT lesson_id, question FROM answers WHERE person_id = :personId AND verdict = 'right'`,
        { replacements, type: QueryTypes.SELECT },
      ),
      sequelize.query<{ lessonId: number; words: string; hex: string; pH: number | null }>(
        `SELECT lesson_id AS lessonId, last_words AS words, last_hex AS hex, last_pH AS pH FROM runs
          WHERE person_id = :personId AND last_hex IS NOT NULL ORDER BY updated_at`,
        { replacements, type: QueryTypes.SELECT },
      ),
    ]);
    for (const { lessonId, id } of checkpoints) done.set(lessonId, (done.get(lessonId) ?? new Set()).add(id));
    for (const { lessonId, words, hex, pH } of runs) last.set(lessonId, { words, hex, pH });
  }
  return lessons.map(({ id, slug, lesson, mayOpen }) => ({
    slug,
    number: lesson.number,
    title: lesson.title,
    summary: lesson.summary,
    minutes: lesson.minutes,
    open: mayOpen,
    total: lesson.checkpoints.length,
    done: lesson.checkpoints.filter((checkpoint) => done.get(id)?.has(checkpoint.id)).length,
    solution: last.get(id) ?? null,
  }));
}
