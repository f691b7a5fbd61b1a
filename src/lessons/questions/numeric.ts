/** Marks a number: right within the tolerance, asked back where it is not clear, else traced to the way that gives it. */
import { evaluate, parseFormula, type RunScope } from '../formula.ts';
import { formatQuantity, roundHalfAway, UNITS, type Conventions } from '../format.ts';
import { readNumber } from '../numberInput.ts';
import { mixtureOf, pourAnswer } from './tubes.ts';
import type { Marking, Numeric, Tube, WrongNumber } from './types.ts';
import { fillText } from './variants.ts';
import { resultOf, wrongMethods, type MethodId, type WrongMethod } from './wrongMethods.ts';

/** The key in base units. */
export const keyOf = (question: Numeric, scope: RunScope): number =>
  evaluate(parseFormula(question.key, mixtureOf(question)), scope);

/** Half-width of what counts as right, in base units. */
export const toleranceOf = (question: Numeric, key: number): number =>
  question.tolerance.of === 'percent'
    ? Math.abs(key) * (question.tolerance.value / 100)
    : question.tolerance.value * UNITS[question.unit]!;

/** A hair beyond the tolerance still counts: 4.78 is within 0.02 of 4.76 whatever its binary form. */
export const within = (value: number, key: number, tolerance: number): boolean =>
  Math.abs(value - key) <= tolerance * (1 + 1e-9) + 1e-15;

/** Whether the key of a question is the pH of its mixture: then methods that work on mixtures apply. */
export const asksPH = (question: Numeric): boolean =>
  question.unit === '' && /^pH\(/.test(question.key.trim());

/** The number that a wrong method gives, in base units; null where it does not apply. */
export function wrongValue(
  wrong: WrongNumber,
  question: Numeric,
  scope: RunScope,
  key: number,
): number | null {
  const mixture = mixtureOf(question) ?? null;
  if (wrong.method === 'own') return evaluate(parseFormula(wrong.value!, mixture ?? undefined), scope);
  return resultOf(wrong.method, { mixture, scope, key, isPH: asksPH(question) });
}

/** Methods tried where the author names none: those that cannot be mistaken for another. */
const USUAL: readonly MethodId[] = [
  'strong-for-weak',
  'reaction-forgotten',
  'volume-forgotten',
  'addition-forgotten',
  'root-forgotten',
  'ratio-inverted',
  'pOH-for-pH',
  'sign-lost',
  'natural-logarithm',
  'concentration-for-pH',
  'thousand-times',
  'thousandth',
  'ten-times',
  'tenth',
];

export function traced(question: Numeric, given: number, key: number, scope: RunScope): WrongNumber | null {
  const tolerance = toleranceOf(question, key);
  const nearestOf = (list: readonly WrongNumber[]): WrongNumber | null => {
    let best: { wrong: WrongNumber; far: number } | null = null;
    for (const wrong of list) {
      const value = wrongValue(wrong, question, scope, key);
      if (value === null || within(value, key, tolerance)) continue;
      const width =
        question.tolerance.of === 'percent' ? Math.abs(value) * (question.tolerance.value / 100) : tolerance;
      const far = Math.abs(given - value);
      if (within(given, value, width) && (!best || far < best.far - 1e-12)) best = { wrong, far };
    }
    return best?.wrong ?? null;
  };
  // What the author expects comes first.
  return nearestOf(question.wrong) ?? nearestOf(USUAL.map((method) => ({ method })));
}

/**
 * Marks what a learner typed.
 * @param tell whether the key may be told although the answer is not right
 */
export function markNumeric(
  question: Numeric,
  typed: string,
  scope: RunScope,
  conventions: Conventions,
  tell: boolean,
): Marking {
  const read = readNumber(typed, question.unit);
  if (!read.ok) return { verdict: 'ask', feedback: escape(read.ask), misconceptions: [] };
  const key = keyOf(question, scope);
  const tolerance = toleranceOf(question, key);
  const style = { unit: question.unit, digits: question.digits, by: question.by };
  const told = {
    key: formatQuantity(key, style, conventions),
    solution: fillText(question.solution, scope, conventions, mixtureOf(question)),
  };
  const poured = pourAnswer(question, read.base, key, scope, conventions);
  if (within(read.base, key, tolerance))
    return {
      verdict: 'right',
      feedback: `The engine gets ${escape(told.key)}.${tooManyDigits(question, read.decimals, conventions)}`,
      misconceptions: [],
      ...told,
      ...(poured ? { poured } : {}),
    };
  if (
    question.by === 'decimals' &&
    question.unit === '' &&
    read.decimals < question.digits &&
    roundHalfAway(key, read.decimals) === read.value
  )
    return {
      verdict: 'ask',
      feedback:
        conventions.pH === 'significant figures'
          ? `Give ${question.digits} decimals: the decimals of a pH are the significant figures of its concentration.`
          : `Give the pH with ${question.digits} decimals.`,
      misconceptions: [],
    };
  const wrong = traced(question, read.base, key, scope);
  const library: WrongMethod | null = wrong && wrong.method !== 'own' ? wrongMethods[wrong.method] : null;
  const misconception = wrong?.misconception ?? library?.misconception;
  return {
    verdict: 'not-yet',
    feedback: wrong
      ? fillText(wrong.feedback ?? escape(library!.feedback), scope, conventions, mixtureOf(question))
      : poured
        ? compared(poured)
        : 'Write down what is in the solution, in amounts, before you use a formula.',
    misconceptions: misconception ? [misconception] : [],
    ...(wrong ? { method: wrong.method } : {}),
    ...(poured ? { poured: tell ? poured : { yours: poured.yours, asked: unlabelled(poured.asked) } } : {}),
    ...(tell ? told : {}),
  };
}

/** By the rule of significant figures, digits that nobody can know are named, and not held against anybody. */
const tooManyDigits = ({ unit, digits, by }: Numeric, typed: number, { pH }: Conventions): string =>
  pH === 'significant figures' && unit === '' && by === 'decimals' && typed > digits
    ? ` You gave ${typed} decimals; ${digits} are known, since the concentration has ${digits} significant figures.`
    : '';

/** An answer that no wrong method explains: its tube says on which side it is. */
function compared({ yours, asked }: { readonly yours: Tube; readonly asked: Tube }): string {
  const far = Math.round(((yours.pH ?? 0) - (asked.pH ?? 0)) * 100);
  if (far === 0) return 'The two tubes look alike. Work with more digits, and round at the end.';
  return `Your tube is ${far < 0 ? 'more' : 'less'} acidic than the one that is asked for. What has to change?`;
}

/** The asked-for tube before the key may be told: what the eye sees, and no number. */
const unlabelled = (tube: Tube): Tube => ({ ...tube, label: 'Asked for', pH: null });

export const escape = (text: string): string =>
  text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
