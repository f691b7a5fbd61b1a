import { QueryTypes } from 'sequelize';
import type { CompiledLesson } from '../../lessons/index.ts';
import { sequelize } from '../database/index.ts';

/** A lesson as it is served: one revision of it, compiled. */
export interface StoredLesson {
  readonly id: number;
  readonly slug: string;
  readonly schoolId: number | null;
  readonly revision: number;
  readonly lesson: CompiledLesson;
}

interface Head {
  id: number;
  slug: string;
  schoolId: number | null;
  revision: number;
  version: string;
}

/**
 * Compiled revisions by lesson, revision and compiler, so that a page view parses nothing. Which revision is current is
 * asked of the database every time: no node serves an old one.
 */
const compiled = new Map<string, CompiledLesson>();
const MOST = 200;

const HEAD = `SELECT l.id, l.slug, l.school_id AS schoolId, r.revision, CONCAT(r.compiler_version, ':', r.engine_version) AS version
                FROM lessons l JOIN lesson_revisions r ON r.lesson_id = l.id`;

async function withCompiled(head: Head): Promise<StoredLesson> {
  const key = `${head.id}:${head.revision}:${head.version}`;
  let lesson = compiled.get(key);
  if (!lesson) {
    const [row] = await sequelize.query<{ compiled: string }>(
      'SELECT compiled FROM lesson_revisions WHERE lesson_id = ? AND revision = ?',
      { replacements: [head.id, head.revision], type: QueryTypes.SELECT },
    );
    lesson = JSON.parse(row!.compiled) as CompiledLesson;
    if (compiled.size >= MOST) compiled.delete(compiled.keys().next().value!);
    compiled.set(key, lesson);
  }
  return { id: head.id, slug: head.slug, schoolId: head.schoolId, revision: head.revision, lesson };
}

/** The current revision of a lesson, or the one asked for; null where there is none. Access is the caller's to check. */
export async function readLesson(slug: string, revision?: number): Promise<StoredLesson | null> {
  const [head] = await sequelize.query<Head>(
    `${HEAD} AND r.revision = COALESCE(:revision, l.current_revision) WHERE l.slug = :slug`,
    {
      replacements: { slug, revision: revision ?? null },
      type: QueryTypes.SELECT,
    },
  );
  return head ? withCompiled(head) : null;
}

export async function readLessonById(id: number, revision: number): Promise<StoredLesson | null> {
  const [head] = await sequelize.query<Head>(`${HEAD} AND r.revision = :revision WHERE l.id = :id`, {
    replacements: { id, revision },
    type: QueryTypes.SELECT,
  });
  return head ? withCompiled(head) : null;
}

/** Current revisions of the shipped course and of these schools, by number. */
export async function listLessons(schoolIds: readonly number[] = []): Promise<StoredLesson[]> {
  const heads = await sequelize.query<Head>(
    `${HEAD} AND r.revision = l.current_revision WHERE l.school_id IS NULL OR l.school_id IN (:schools)`,
    { replacements: { schools: schoolIds.length > 0 ? schoolIds : [0] }, type: QueryTypes.SELECT },
  );
  const all = await Promise.all(heads.map(withCompiled));
  return all.sort((a, b) => a.lesson.number - b.lesson.number || a.slug.localeCompare(b.slug));
}
