import { USUAL } from '../format.ts';
import { scopeOf } from '../scope.ts';
import type { CompiledLesson, Learner } from '../types.ts';
import { markNumeric } from './numeric.ts';
import type { Answer, Marking, Question } from './types.ts';
import { fillText, itemsOf, rightsOf, valuesFor } from './variants.ts';

/** From this attempt on the key is told with the feedback. */
export const TELLING_ATTEMPT = 3;

/** An answer that this question cannot have: another kind, or ids that it does not offer. */
export class AnswerError extends Error {}

/**
 * Marks an answer. Runs on the server alone: it needs the full cut.
 * @param attempt 1 for the first counted answer of this learner to this question
 * @throws AnswerError
 */
export function mark(
  lesson: CompiledLesson,
  question: Question,
  answer: Answer,
  learner: Learner,
  attempt = 1,
): Marking {
  if (answer.kind !== question.kind) throw new AnswerError(`This question takes a ${question.kind} answer.`);
  const scope = scopeOf(lesson, valuesFor(question, learner.seed), learner);
  const conventions = learner.conventions ?? USUAL;
  const tell = attempt >= TELLING_ATTEMPT;
  const fill = (html: string) => fillText(html, scope, conventions);
  switch (question.kind) {
    case 'numeric':
      return markNumeric(question, (answer as { typed: string }).typed, scope, conventions, tell);
    case 'choice': {
      const { chosen } = answer as { chosen: readonly string[] };
      const options = chosen.map((id) => known(question.options, id));
      if (options.length === 0) return { verdict: 'ask', feedback: 'Choose an answer.', misconceptions: [] };
      const all = question.options.filter((option) => option.right);
      const wrong = options.filter((option) => !option.right);
      const right = wrong.length === 0 && new Set(chosen).size === all.length;
      const missing = wrong.length === 0 && !right;
      return {
        verdict: right ? 'right' : 'not-yet',
        feedback: missing
          ? '<p>What you chose is right. There is more.</p>'
          : (right ? options : wrong).map((option) => fill(option.feedback)).join(''),
        misconceptions: [...new Set(wrong.flatMap((option) => option.misconception ?? []))],
        ...(tell && !right ? { key: all.map((option) => fill(option.text)).join('') } : {}),
      };
    }
    case 'order': {
      const { order } = answer as { order: readonly string[] };
      const items = itemsOf(question, learner.seed);
      if (new Set(order).size !== items.length || order.length !== items.length)
        throw new AnswerError('An order names every item once.');
      const misplaced = order.filter((id, place) => known(items, id).item !== question.items[place]!.id);
      return placed(
        misplaced,
        question,
        fill,
        tell ? question.items.map((item) => fill(item.text)).join('') : undefined,
      );
    }
    case 'match': {
      const { matched } = answer as { matched: Readonly<Record<string, string>> };
      const rights = rightsOf(question, learner.seed);
      for (const [left, right] of Object.entries(matched)) {
        known(question.pairs, left);
        known(rights, right);
      }
      if (question.pairs.some((pair) => matched[pair.id] === undefined))
        return { verdict: 'ask', feedback: 'Give every line a partner.', misconceptions: [] };
      const misplaced = question.pairs
        .filter((pair) => known(rights, matched[pair.id]!).pair !== pair.id)
        .map((pair) => pair.id);
      return placed(
        misplaced,
        question,
        fill,
        tell ? question.pairs.map((pair) => fill(pair.left) + fill(pair.right)).join('') : undefined,
      );
    }
    case 'explain': {
      const { text, points } = answer as { text: string; points?: readonly number[] };
      if (text.trim().length < 15)
        return { verdict: 'ask', feedback: 'Write a sentence or two of your own first.', misconceptions: [] };
      const shown = { solution: fill(question.model), points: question.points.map(fill) };
      if (!points)
        return {
          verdict: 'compare',
          feedback: 'Compare your words with this answer. Tick what yours says.',
          misconceptions: [],
          ...shown,
        };
      if (points.some((n) => !Number.isInteger(n) || n < 0 || n >= question.points.length))
        throw new AnswerError('There is no such point.');
      const ticked = new Set(points).size;
      const full = ticked === question.points.length;
      return {
        verdict: full ? 'right' : 'not-yet',
        feedback: full
          ? 'You say that all the points are there.'
          : `You found ${ticked} of ${question.points.length} points in your answer. Add what is missing.`,
        misconceptions: [],
        ...shown,
      };
    }
  }
}

function known<T extends { readonly id: string }>(list: readonly T[], id: string): T {
  const one = list.find((item) => item.id === id);
  if (!one) throw new AnswerError(`There is no '${id}' in this question.`);
  return one;
}

function placed(
  misplaced: readonly string[],
  question: { readonly feedback: string; readonly misconception?: string },
  fill: (html: string) => string,
  key: string | undefined,
): Marking {
  const right = misplaced.length === 0;
  return {
    verdict: right ? 'right' : 'not-yet',
    feedback: fill(question.feedback),
    misconceptions: !right && question.misconception ? [question.misconception] : [],
    ...(right ? {} : { misplaced }),
    ...(!right && key !== undefined ? { key } : {}),
  };
}
