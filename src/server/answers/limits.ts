import { ProblemError } from '../problem.ts';
import { count } from '../rate-limit/index.ts';

/** A school's classes work behind one address; one person types no two answers a second for a minute. */
const A_MINUTE = { address: 1500, person: 120 } as const;

/** @throws ProblemError 429 where more answers came in a minute than people can give */
export async function mayAnswer(who: keyof typeof A_MINUTE, key: string): Promise<void> {
  const { points, seconds } = await count(`answers-${who}:${key}`, 1, 60);
  if (points <= A_MINUTE[who]) return;
  throw new ProblemError({
    status: 429,
    code: 'too-many-answers',
    title: 'Too many answers at once. Wait a moment; yours is kept.',
    headers: { 'Retry-After': String(Math.max(1, seconds)) },
  });
}
