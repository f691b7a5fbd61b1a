import { QueryTypes } from 'sequelize';
import { notebook, notebookCsv, replay, type NotebookRow } from '../../bench/index.ts';
import { sequelize } from '../database/index.ts';
import { readLessonById } from '../lessons/index.ts';
import { benchOf, ownRun } from './open.ts';
import { movesAfter } from './state.ts';

export interface RunInList {
  readonly runId: string;
  readonly lesson: string;
  readonly title: string;
  readonly bench: string;
  readonly moves: number;
  readonly at: Date;
  readonly solution: { readonly words: string; readonly hex: string; readonly pH: number | null } | null;
}

/** A person's runs, newest first; nothing is replayed for the list. */
export async function runsOf(personId: number, most = 200): Promise<RunInList[]> {
  const rows = await sequelize.query<{
    runId: string;
    lesson: string;
    title: string;
    bench: string;
    moves: number;
    at: Date;
    words: string | null;
    hex: string | null;
    pH: number | null;
  }>(
    `SELECT r.public_id AS runId, l.slug AS lesson, JSON_VALUE(v.compiled, '$.title') AS title, r.bench, r.move_count AS moves,
            r.updated_at AS at, r.last_words AS words, r.last_hex AS hex, r.last_pH AS pH
       FROM runs r JOIN lessons l ON l.id = r.lesson_id JOIN lesson_revisions v ON v.lesson_id = r.lesson_id AND v.revision = r.revision
      WHERE r.person_id = ? AND r.move_count > 0 ORDER BY r.updated_at DESC, r.id DESC LIMIT ?`,
    { replacements: [personId, most], type: QueryTypes.SELECT },
  );
  return rows.map(({ words, hex, pH, ...row }) => ({
    ...row,
    solution: words && hex ? { words, hex, pH } : null,
  }));
}

export interface RunPage {
  readonly runId: string;
  readonly lesson: string;
  readonly title: string;
  readonly benchTitle: string;
  readonly rows: readonly NotebookRow[];
  readonly csv: string;
}

/** One run, replayed into its notebook rows. */
export async function runPage(personId: number, publicId: string): Promise<RunPage> {
  const run = await ownRun(personId, publicId);
  const lesson = (await readLessonById(run.lessonId, run.revision))!;
  const spec = benchOf(lesson, run.bench);
  const moves = await movesAfter(run.id, 0);
  const { state } = replay(
    spec,
    run.seed,
    moves.map((row) => row.move),
  );
  const seen = { predicted: true };
  return {
    runId: run.publicId,
    lesson: lesson.slug,
    title: lesson.lesson.title,
    benchTitle: spec.title,
    rows: notebook(state, seen),
    csv: notebookCsv(notebook(state, seen)),
  };
}
