import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { QueryTypes } from 'sequelize';
import { slugOf, type CompiledLesson, type Fault } from '../../lessons/index.ts';
import type { Standing } from '../access/memberships.ts';
import { audit } from '../audit.ts';
import { sequelize } from '../database/index.ts';
import { LessonFaults, publishCompiled, readLesson, type Published } from '../lessons/index.ts';
import { ProblemError } from '../problem.ts';
import { homesOf, type Home } from './authors.ts';
import type { Checked } from './check.ts';

/** A checkpoint of the last revision that the new one has no more, and how many people have met it. */
export interface Vanishing {
  readonly id: string;
  readonly kind: 'prediction' | 'aim' | 'question';
  readonly title: string;
  readonly metBy: number;
}

const MET = {
  aim: 'SELECT COUNT(DISTINCT person_id) AS n FROM met_aims WHERE lesson_id = ? AND aim = ?',
  prediction: 'SELECT COUNT(DISTINCT person_id) AS n FROM predictions WHERE lesson_id = ? AND prediction = ?',
  question: 'SELECT COUNT(DISTINCT person_id) AS n FROM answers WHERE lesson_id = ? AND question = ?',
} as const;

/** What would vanish if this were published. Nothing that people met is taken from them; they only can't be met anew. */
export async function vanishingWith(lesson: CompiledLesson, home: Home): Promise<Vanishing[]> {
  const last = await readLesson(lesson.slug);
  if (!last || last.schoolId !== home) return [];
  const now = new Set(lesson.checkpoints.map(({ id }) => id));
  const gone = last.lesson.checkpoints.filter(({ id }) => !now.has(id));
  return Promise.all(
    gone.map(async ({ id, kind, title }) => {
      const [row] = await sequelize.query<{ n: number }>(MET[kind], {
        replacements: [last.id, id],
        type: QueryTypes.SELECT,
      });
      return { id, kind, title, metBy: Number(row!.n) };
    }),
  );
}

/** 'The aim 'yellow' (Turn the buffer yellow) is gone; met by 214.' */
export const tellVanishing = ({ id, kind, title, metBy }: Vanishing): string =>
  `The ${kind} '${id}'${title ? ` (${title})` : ''} is gone; ${kind === 'aim' ? 'met' : kind === 'question' ? 'answered' : 'given'} by ${metBy}.`;

/** Why a text that compiles is not published as it is. */
async function refusals(checked: Checked & { ok: true }, file: string): Promise<Fault[]> {
  const at = (message: string, line = 1): Fault => ({ file, line, column: 1, message });
  const faults = checked.rehearsal.findings
    .filter(({ level }) => level === 'fault')
    .map(({ line, sentence }) => at(sentence, line));
  if (checked.lesson.draft)
    faults.push(at("This is a draft. Take the line 'draft: true' out to publish it."));
  // The shipped course is written in its folder: the next deployment would take a revision from here back.
  const course = await readdir(path.resolve('content/lessons'));
  if (course.some((name) => name.endsWith('.md') && slugOf(name) === checked.lesson.slug))
    faults.push(at('A lesson of the shipped course has this name. Choose another one.'));
  return faults;
}

/**
 * Publishes what was checked as a new revision.
 * @throws ProblemError 404 where the author has no such home; LessonFaults where something has to be mended first
 */
export async function publishFromDesk(
  author: { readonly id: number; readonly standing: Standing | null },
  home: Home,
  checked: Checked,
  markdown: string,
  file: string,
): Promise<Published> {
  if (!homesOf(author.standing).includes(home))
    throw new ProblemError({ status: 404, code: 'not-found', title: 'There is nothing at this address.' });
  if (!checked.ok) throw new LessonFaults(checked.faults);
  const faults = await refusals(checked, file);
  if (faults.length > 0) throw new LessonFaults(faults);
  const published = await publishCompiled(checked.lesson, markdown, file, home);
  await audit({
    action: 'lesson-published',
    actorId: author.id,
    schoolId: home,
    details: { slug: published.slug, revision: published.revision },
  });
  return published;
}

export interface OwnLesson {
  readonly slug: string;
  readonly file: string;
  readonly schoolId: Home;
  readonly revision: number;
  readonly current: boolean;
  readonly publishedAt: Date;
}

/** Every revision of the lessons of these homes, newest first. */
export async function revisionsOf(homes: readonly Home[]): Promise<OwnLesson[]> {
  const schools = homes.filter((home) => home !== null);
  const rows = await sequelize.query<Omit<OwnLesson, 'current'> & { current: number }>(
    `SELECT l.slug, r.file, l.school_id AS schoolId, r.revision, r.revision = l.current_revision AS current, r.published_at AS publishedAt
       FROM lessons l JOIN lesson_revisions r ON r.lesson_id = l.id
      WHERE (:everyone AND l.school_id IS NULL) OR l.school_id IN (:schools)
      ORDER BY l.slug, r.revision DESC`,
    {
      replacements: { everyone: homes.includes(null), schools: schools.length > 0 ? schools : [0] },
      type: QueryTypes.SELECT,
    },
  );
  return rows.map((row) => ({ ...row, current: Boolean(row.current) }));
}

/** The text of a revision; null where these homes have no such lesson. */
export async function textOf(
  slug: string,
  revision: number,
  homes: readonly Home[],
): Promise<{ readonly file: string; readonly markdown: string; readonly schoolId: Home } | null> {
  const [row] = await sequelize.query<{ file: string; markdown: string; schoolId: Home }>(
    `SELECT r.file, r.markdown, l.school_id AS schoolId FROM lessons l JOIN lesson_revisions r ON r.lesson_id = l.id
      WHERE l.slug = ? AND r.revision = ?`,
    { replacements: [slug, revision], type: QueryTypes.SELECT },
  );
  return row && homes.includes(row.schoolId) ? row : null;
}
