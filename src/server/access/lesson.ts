import { readLesson, type StoredLesson } from '../lessons/index.ts';
import { ProblemError } from '../problem.ts';
import { mayOpenLesson, type Standing } from './memberships.ts';

/** A lesson that this person may open; one that they may not is a 403, one that does not exist (for them) a 404. */
export async function lessonFor(slug: string, standing: Standing | null): Promise<StoredLesson> {
  const stored = await readLesson(slug);
  const theirs =
    stored &&
    (stored.schoolId === null ||
      (standing?.memberships.some((m) => m.schoolId === stored.schoolId) ?? false));
  if (!stored || !theirs)
    throw new ProblemError({ status: 404, code: 'not-found', title: 'There is no such lesson.' });
  if (!mayOpenLesson(standing, { access: stored.lesson.access, schoolId: stored.schoolId }))
    throw new ProblemError({
      status: 403,
      code: 'no-access',
      title: 'This lesson needs access: your own, or a seat of your school.',
    });
  return stored;
}
