import { forBrowser, type BenchSpec } from '../bench/index.ts';
import type { CompiledLesson, PredictionForLearner } from './types.ts';

export type LearnerBlock =
  | { readonly kind: 'prose'; readonly html: string }
  | { readonly kind: 'bench'; readonly spec: BenchSpec; readonly prediction: string | null }
  | { readonly kind: 'prediction'; readonly spec: PredictionForLearner };

/** The lesson as a page may hold it: outcomes and whatever a bench keeps secret stay on the server. */
export function forLearner(lesson: CompiledLesson): readonly LearnerBlock[] {
  return lesson.blocks.map((block): LearnerBlock => {
    if (block.kind === 'prose') return block;
    if (block.kind === 'bench') {
      const before = lesson.blocks.find(
        (other) => other.kind === 'prediction' && other.spec.bench === block.spec.id,
      );
      return {
        kind: 'bench',
        spec: forBrowser(block.spec),
        prediction: before?.kind === 'prediction' ? before.spec.id : null,
      };
    }
    const { id, bench, ask, options, observe } = block.spec;
    return { kind: 'prediction', spec: { id, bench, ask, options, observe } };
  });
}
