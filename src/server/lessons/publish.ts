import { createHash } from 'node:crypto';
import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { QueryTypes } from 'sequelize';
import { ENGINE_VERSION } from '../../chemistry/index.ts';
import {
  compile,
  COMPILER_VERSION,
  tellFault,
  type CompiledLesson,
  type Fault,
} from '../../lessons/index.ts';
import { sequelize, withTransaction } from '../database/index.ts';

export class LessonFaults extends Error {
  constructor(readonly faults: readonly Fault[]) {
    super(faults.map(tellFault).join('\n'));
    this.name = 'LessonFaults';
  }
}

export type Published = {
  slug: string;
  revision: number;
  change: 'new' | 'revised' | 'recompiled' | 'same';
  vanished: string[];
};

interface Current {
  id: number;
  schoolId: number | null;
  revision: number;
  hash: string;
  compilerVersion: number;
  engineVersion: string;
  compiled: string;
}

/**
 * Publishes one lesson: a new revision where its text changed, its compiled form anew where only the compiler or the
 * engine did. Names the checkpoints that vanish; what people met stays theirs.
 * @throws LessonFaults
 */
export async function publishLesson(
  markdown: string,
  file: string,
  schoolId: number | null = null,
): Promise<Published> {
  return publishCompiled(compiled(markdown, file), markdown, file, schoolId);
}

function compiled(markdown: string, file: string): CompiledLesson {
  const result = compile(markdown, { file });
  if (!result.ok) throw new LessonFaults(result.faults);
  return result.lesson;
}

/** Publishes what was compiled already, as `publishLesson` does. */
export function publishCompiled(
  lesson: CompiledLesson,
  markdown: string,
  file: string,
  schoolId: number | null,
): Promise<Published> {
  const hash = createHash('sha256').update(markdown).digest('hex');
  return withTransaction(async (transaction) => {
    const [current] = await sequelize.query<Current>(
      `SELECT l.id, l.school_id AS schoolId, r.revision, r.markdown_hash AS hash, r.compiler_version AS compilerVersion, r.engine_version AS engineVersion, r.compiled
         FROM lessons l JOIN lesson_revisions r ON r.lesson_id = l.id AND r.revision = l.current_revision
        WHERE l.slug = ? FOR UPDATE`,
      { replacements: [lesson.slug], type: QueryTypes.SELECT, transaction },
    );
    // Nobody writes over the course or another school's lesson by choosing its name.
    if (current && current.schoolId !== schoolId)
      throw new LessonFaults([
        { file, line: 1, column: 1, message: 'Another lesson has this file name.', found: file },
      ]);
    const text = JSON.stringify(lesson);
    if (current?.hash === hash) {
      if (current.compilerVersion === COMPILER_VERSION && current.engineVersion === ENGINE_VERSION)
        return { slug: lesson.slug, revision: current.revision, change: 'same', vanished: [] };
      await sequelize.query(
        `UPDATE lesson_revisions SET compiled = ?, compiler_version = ?, engine_version = ? WHERE lesson_id = ? AND revision = ?`,
        {
          replacements: [text, COMPILER_VERSION, ENGINE_VERSION, current.id, current.revision],
          type: QueryTypes.UPDATE,
          transaction,
        },
      );
      return { slug: lesson.slug, revision: current.revision, change: 'recompiled', vanished: [] };
    }
    const revision = (current?.revision ?? 0) + 1;
    const before = current
      ? (JSON.parse(current.compiled) as CompiledLesson).checkpoints.map(({ id }) => id)
      : [];
    const now = new Set(lesson.checkpoints.map(({ id }) => id));
    const vanished = before.filter((id) => !now.has(id));
    if (!current)
      await sequelize.query(
        'INSERT INTO lessons (slug, school_id, current_revision, created_at, updated_at) VALUES (?, ?, 1, NOW(3), NOW(3))',
        { replacements: [lesson.slug, schoolId], type: QueryTypes.INSERT, transaction },
      );
    await sequelize.query(
      `INSERT INTO lesson_revisions (lesson_id, revision, file, markdown, markdown_hash, compiler_version, engine_version, compiled, vanished, published_at)
       SELECT id, :revision, :file, :markdown, :hash, :compiler, :engine, :text, :vanished, NOW(3) FROM lessons WHERE slug = :slug`,
      {
        replacements: {
          revision,
          file,
          markdown,
          hash,
          compiler: COMPILER_VERSION,
          engine: ENGINE_VERSION,
          text,
          vanished: JSON.stringify(vanished),
          slug: lesson.slug,
        },
        type: QueryTypes.INSERT,
        transaction,
      },
    );
    await sequelize.query('UPDATE lessons SET current_revision = ?, updated_at = NOW(3) WHERE slug = ?', {
      replacements: [revision, lesson.slug],
      type: QueryTypes.UPDATE,
      transaction,
    });
    return { slug: lesson.slug, revision, change: current ? 'revised' : 'new', vanished };
  });
}

/** Publishes the shipped course from its folder, without its drafts: what a deployment does. */
export async function publishShippedCourse(folder: string): Promise<Published[]> {
  const files = (await readdir(folder)).filter((name) => name.endsWith('.md')).sort();
  const published: Published[] = [];
  for (const name of files) {
    const markdown = await readFile(path.join(folder, name), 'utf8');
    const lesson = compiled(markdown, name);
    if (!lesson.draft) published.push(await publishCompiled(lesson, markdown, name, null));
  }
  return published;
}
