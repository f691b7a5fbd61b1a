import { forBrowser } from '../bench/index.ts';
import { formatProse } from './format.ts';
import { questionForLearner } from './questions/learner.ts';
import type { CompiledLesson, Learner, LearnerBlock } from './types.ts';

/**
 * The lesson as a page may hold it: outcomes, keys, feedback and whatever a bench keeps secret stay on the server.
 * @param learner whose variants and conventions; without one, those of a visitor
 */
export function forLearner(lesson: CompiledLesson, learner: Learner = { seed: 1 }): readonly LearnerBlock[] {
  return lesson.blocks.map((block): LearnerBlock => {
    switch (block.kind) {
      case 'prose':
        return learner.conventions
          ? { kind: 'prose', html: formatProse(block.html, learner.conventions) }
          : block;
      case 'bench': {
        const before = lesson.blocks.find(
          (other) => other.kind === 'prediction' && other.spec.bench === block.spec.id,
        );
        return {
          kind: 'bench',
          spec: forBrowser(block.spec),
          prediction: before?.kind === 'prediction' ? before.spec.id : null,
        };
      }
      case 'prediction': {
        const { id, bench, ask, options, observe } = block.spec;
        return { kind: 'prediction', spec: { id, bench, ask, options, observe } };
      }
      case 'question':
        return { kind: 'question', spec: questionForLearner(lesson, block.spec, learner) };
    }
  });
}
