import { ProblemError } from '../problem.ts';
import { count } from '../rate-limit/index.ts';

const CHECKS = 30;
const WINDOW_S = 600;

/** @throws ProblemError 429 where this author has checked too often */
export async function mayCheck(author: string): Promise<void> {
  const { points, seconds } = await count(`desk:${author}`, 1, WINDOW_S);
  if (points <= CHECKS) return;
  throw new ProblemError({
    status: 429,
    code: 'too-many-checks',
    title: `${CHECKS} checks in ten minutes are the most. Your text is still here: wait a moment.`,
    headers: { 'Retry-After': String(Math.max(1, seconds)) },
  });
}
