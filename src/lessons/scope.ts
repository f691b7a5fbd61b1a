import type { BenchSpec } from '../bench/index.ts';
import type { RunScope } from './formula.ts';
import type { CompiledLesson, Learner } from './types.ts';

/** What formulas of a compiled lesson may speak of. */
export function scopeOf(
  lesson: CompiledLesson,
  values: Readonly<Record<string, number>>,
  learner?: Learner,
): RunScope {
  const benches = new Map<string, BenchSpec>();
  for (const block of lesson.blocks) if (block.kind === 'bench') benches.set(block.spec.id, block.spec);
  return { model: lesson.model, benches, values, ...(learner?.runs ? { runs: learner.runs } : {}) };
}
