import { createHash } from 'node:crypto';
import { createState, replay, type BenchSpec, type BenchState } from '../../bench/index.ts';
import {
  conventionsFrom,
  usualIn,
  type CompiledLesson,
  type Learner,
  type Question,
} from '../../lessons/index.ts';
import type { StoredLesson } from '../lessons/index.ts';
import { newestRuns } from '../runs/open.ts';
import { movesAfter } from '../runs/state.ts';

/** Whose lesson it is, as far as questions go. */
export interface Answerer {
  readonly id: number;
  readonly publicId: string;
  readonly conventions?: Readonly<Record<string, string>> | null;
}

/** Visitors all get the same variants: there is nobody to keep others for. */
export const VISITOR_SEED = 1;

/** The same for one person and lesson on every device, and not to be told from anyone else's. */
export function seedOf(publicId: string, slug: string): number {
  return (createHash('sha256').update(`${publicId}/${slug}`).digest().readUInt32BE(0) % (2 ** 31 - 1)) + 1;
}

const OWN = /\bown\(\s*\w+\s*;\s*[a-z][a-z0-9-]*\s+on\s+([a-z][a-z0-9-]*)/g;

/** The benches whose runs a question speaks of. */
export function benchesOf(question: Question): string[] {
  const text = JSON.stringify(question);
  return [...new Set([...text.matchAll(OWN)].map((found) => found[1]!))];
}

const specOf = (lesson: CompiledLesson, id: string): BenchSpec | undefined => {
  for (const block of lesson.blocks) if (block.kind === 'bench' && block.spec.id === id) return block.spec;
  return undefined;
};

/**
 * The learner that questions are filled and marked for.
 * @param questions those that will be: runs are replayed only where one of them speaks of the learner's own
 */
export async function learnerOf(
  person: Answerer | null,
  lesson: StoredLesson,
  questions: readonly Question[],
): Promise<Learner> {
  const base: Learner = {
    seed: person ? seedOf(person.publicId, lesson.slug) : VISITOR_SEED,
    conventions: conventionsFrom(person?.conventions, usualIn(lesson.lesson.lang)),
  };
  const benches = new Set(questions.flatMap(benchesOf));
  if (!person || benches.size === 0) return base;
  const runs: Record<string, BenchState> = {};
  for (const run of await newestRuns(person.id, lesson.id)) {
    const spec = benches.has(run.bench) ? specOf(lesson.lesson, run.bench) : undefined;
    if (!spec || run.revision !== lesson.revision) continue;
    const moves = await movesAfter(run.id, 0);
    runs[run.bench] = replay(
      createState(spec, { seed: run.seed }),
      run.seed,
      moves.map((row) => row.move),
    ).state;
  }
  return { ...base, runs };
}
