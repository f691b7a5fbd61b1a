import { USUAL, type Conventions } from '../conventions.ts';
import { unitName } from '../format.ts';
import { scopeOf } from '../scope.ts';
import type { CompiledLesson, Learner } from '../types.ts';
import { mixtureOf } from './tubes.ts';
import type { Numeric, Question, QuestionForLearner } from './types.ts';
import { fillText, itemsOf, rightsOf, valuesFor } from './variants.ts';

/** A question as a page may hold it: the learner's own values and order, without key, feedback or model answer. */
export function questionForLearner(
  lesson: CompiledLesson,
  question: Question,
  learner: Learner,
): QuestionForLearner {
  const conventions = learner.conventions ?? USUAL;
  const mixture = question.kind === 'numeric' ? mixtureOf(question) : undefined;
  const filler = (other: number) => {
    const scope = scopeOf(lesson, valuesFor(question, learner.seed, other), learner);
    return (html: string) => fillText(html, scope, conventions, mixture);
  };
  const fill = filler(0);
  const base = { id: question.id, ask: fill(question.ask) };
  const plain = ({ id, text }: { id: string; text: string }) => ({ id, text: fill(text) });
  switch (question.kind) {
    case 'choice':
      return {
        ...base,
        kind: 'choice',
        several: question.options.filter((option) => option.right).length > 1,
        options: question.options.map(plain),
      };
    case 'numeric': {
      const unit = unitName(question.unit, conventions);
      const other = filler(1);
      return {
        ...base,
        kind: 'numeric',
        unit,
        hint: hintOf(question, conventions),
        ...(question.help === 'example'
          ? { example: { ask: other(question.ask), steps: question.steps.map(other) } }
          : {}),
        ...(question.help === 'faded' ? { steps: question.steps.slice(0, -1).map(fill) } : {}),
      };
    }
    case 'order':
      return { ...base, kind: 'order', items: itemsOf(question, learner.seed).map(plain) };
    case 'match':
      return {
        ...base,
        kind: 'match',
        lefts: question.pairs.map(({ id, left }) => plain({ id, text: left })),
        rights: rightsOf(question, learner.seed).map(plain),
      };
    case 'explain':
      return { ...base, kind: 'explain' };
  }
}

/** How many digits are asked for, and by which rule a pH has them. */
function hintOf({ unit, digits, by }: Numeric, { pH }: Conventions): string {
  const hint = `${digits} ${by === 'decimals' ? 'decimals' : digits === 1 ? 'significant figure' : 'significant figures'}`;
  return unit === '' && by === 'decimals' && pH === 'significant figures'
    ? `${hint}: as many as the concentration has significant figures`
    : hint;
}
