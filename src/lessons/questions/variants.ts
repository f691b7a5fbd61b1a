import { shuffled } from '../../bench/seed.ts';
import { htmlIn } from '../conventions.ts';
import { formatProse, formatQuantity, type Conventions } from '../format.ts';
import type { RunScope } from '../formula.ts';
import type { Mixture } from '../mixture.ts';
import { parseQuantity, valueOfQuantity } from '../quantity.ts';
import type { Match, Order, Question, Variants } from './types.ts';
import type { QuestionYaml } from './schema.ts';

export const MOST_VARIANTS = 1000;

/** All rows of values that learners may get; empty where nothing varies. Null where there are too many. */
export function variantsOf(vary: QuestionYaml['vary']): Variants | null {
  if (!vary) return [];
  if (Array.isArray(vary)) return vary;
  let rows: Record<string, number>[] = [{}];
  for (const [name, values] of Object.entries(vary)) {
    if (rows.length * values.length > MOST_VARIANTS) return null;
    rows = rows.flatMap((row) => values.map((value) => ({ ...row, [name]: value })));
  }
  return rows;
}

/** The values that this learner gets; the same on every device and every time. */
export function valuesFor(question: Question, seed: number, other = 0): Readonly<Record<string, number>> {
  const rows = question.variants.map((_, n) => n);
  const place = shuffled(rows, seed, question.id)[other % Math.max(1, rows.length)];
  return place === undefined ? {} : question.variants[place]!;
}

/** The same things in this learner's order, never in the order given. */
export function mixedUp<T>(things: readonly T[], seed: number, salt: string): readonly T[] {
  const order = shuffled(
    things.map((_, n) => n),
    seed,
    salt,
  );
  if (order.every((n, place) => n === place)) order.push(order.shift()!);
  return order.map((n) => things[n]!);
}

const FORMULA = /<data data-formula="([^"]*)">[^<]*<\/data>/g;
const unescape = (text: string): string =>
  text.replace(
    /&#x([0-9a-f]+);|&(quot|amp|lt|gt);/gi,
    (_, code: string | undefined, name: string | undefined) =>
      code
        ? String.fromCodePoint(parseInt(code, 16))
        : { quot: '"', amp: '&', lt: '<', gt: '>' }[name as 'quot']!,
  );

/** Fills the quantities of a question's text with a learner's values. */
export function fillText(html: string, scope: RunScope, conventions: Conventions, mixture?: Mixture): string {
  const filled = formatProse(html, conventions).replace(FORMULA, (_, source: string) => {
    const quantity = parseQuantity(unescape(source), mixture);
    return `<data>${formatQuantity(valueOfQuantity(quantity, scope), quantity.style, conventions)}</data>`;
  });
  return htmlIn(filled, conventions);
}

/**
 * The right-hand side of a match in this learner's order. Their ids are places in it, so that no id tells which
 * left-hand side it belongs to; `pair` is for marking alone.
 */
export function rightsOf(
  question: Match,
  seed: number,
): readonly { readonly id: string; readonly text: string; readonly pair: string | null }[] {
  const all = [
    ...question.pairs.map(({ id, right }) => ({ pair: id, text: right })),
    ...question.decoys.map(({ text }) => ({ pair: null, text })),
  ];
  return mixedUp(all, seed, question.id).map((one, place) => ({ ...one, id: `r${place + 1}` }));
}

/** The items of an order as this learner gets them. Here, too, an id is a place: authors count theirs in the right order. */
export function itemsOf(
  question: Order,
  seed: number,
): readonly { readonly id: string; readonly text: string; readonly item: string }[] {
  return mixedUp(question.items, seed, question.id).map(({ id, text }, place) => ({
    id: `i${place + 1}`,
    text,
    item: id,
  }));
}
