import { forBrowser, type BenchSpec } from '../bench/index.ts';
import { htmlIn, USUAL, wordsIn } from './conventions.ts';
import { formatProse } from './format.ts';
import { questionForLearner } from './questions/learner.ts';
import type { CompiledLesson, Learner, LearnerBlock } from './types.ts';

/**
 * The lesson as a page may hold it: outcomes, keys, feedback and whatever a bench keeps secret stay on the server.
 * @param learner whose variants and conventions; without one, those of a visitor
 */
export function forLearner(lesson: CompiledLesson, learner: Learner = { seed: 1 }): readonly LearnerBlock[] {
  const conventions = learner.conventions ?? USUAL;
  const words = (text: string) => wordsIn(text, conventions);
  return lesson.blocks.map((block): LearnerBlock => {
    switch (block.kind) {
      case 'prose':
        return { kind: 'prose', html: htmlIn(formatProse(block.html, conventions), conventions) };
      case 'bench': {
        const before = lesson.blocks.find(
          (other) => other.kind === 'prediction' && other.spec.bench === block.spec.id,
        );
        return {
          kind: 'bench',
          spec: inWords(forBrowser(block.spec), words),
          prediction: before?.kind === 'prediction' ? before.spec.id : null,
        };
      }
      case 'prediction': {
        const { id, bench, ask, options, observe } = block.spec;
        return {
          kind: 'prediction',
          spec: {
            id,
            bench,
            ask: words(ask),
            options: options.map((option) => ({ id: option.id, text: words(option.text) })),
            observe: words(observe),
          },
        };
      }
      case 'question':
        return { kind: 'question', spec: questionForLearner(lesson, block.spec, learner) };
    }
  });
}

/** What an author wrote on a bench, in the reader's conventions. Nothing that is computed hangs on these words. */
function inWords(spec: BenchSpec, words: (text: string) => string): BenchSpec {
  const labelled = <T extends { readonly label: string }>(one: T): T => ({ ...one, label: words(one.label) });
  return {
    ...spec,
    title: words(spec.title),
    ...(spec.intro ? { intro: words(spec.intro) } : {}),
    vessels: spec.vessels.map(labelled),
    shelf: spec.shelf.map(labelled),
    aims: spec.aims.map((aim) => ({ ...aim, text: words(aim.text) })),
  };
}
