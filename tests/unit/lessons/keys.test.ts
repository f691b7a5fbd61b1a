/** Keys of the course beside arithmetic that knows no engine, and its language of mixtures beside published worked examples. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it, test } from 'vitest';
import { compile } from '../../../src/lessons/index.ts';
import { evaluate, parseFormula } from '../../../src/lessons/formula.ts';
import { keyOf, toleranceOf } from '../../../src/lessons/questions/numeric.ts';
import { scopeOf } from '../../../src/lessons/scope.ts';
import { published } from '../../reference/published.ts';

const PKA = 4.756;
const lg = Math.log10;
/** [H3O+] of a weak acid alone, from the quadratic equation. */
const weak = (c: number): number => {
  const Ka = 10 ** -PKA;
  return (-Ka + Math.sqrt(Ka * Ka + 4 * Ka * c)) / 2;
};

/** What somebody with pencil and paper gets, in base units. */
const BY_HAND: Readonly<Record<string, (v: Readonly<Record<string, number>>) => number>> = {
  'from-concentration': ({ c }) => -lg(c!),
  'to-concentration': ({ p }) => 10 ** -p!,
  'how-many-times': ({ low, high }) => 10 ** (high! - low!),
  'strong-ph': ({ c }) => -lg(c!),
  'weak-ph': ({ c }) => -lg(weak(c!)),
  'share-reacted': ({ c }) => weak(c!) / c!,
  'base-for-vinegar': ({ c }) => (0.025 * c!) / 0.1,
  'acid-in': ({ v }) => PKA + lg((2 - 0.1 * v!) / (2 + 0.1 * v!)),
  'base-in': ({ v }) => PKA + lg((0.5 + 0.1 * v!) / (1 - 0.1 * v!)),
  // mmol of RNH2 over mmol of RNH3+; pKa 8.072 at 25 °C (Goldberg, Kishore and Lennen 2002).
  'acid-counted': ({ v }) => 8.072 + lg((2.5 - 0.1 * v!) / (2.5 + 0.1 * v!)),
  'base-counted': ({ v }) => 8.072 + lg((0.5 + 0.1 * v!) / (1.5 - 0.1 * v!)),
  // One part in 1 + r is turned into the acid; mmol over mmol in each mL.
  'make-it': ({ n, r }) => n! / (1 + r!) / 0.2 / 1000,
  'two-to-one': ({ c }) => (50 * c! * (1 / 3)) / 0.1 / 1000,
};

const folder = new URL('../../../content/lessons/', import.meta.url);
const numeric = readdirSync(folder)
  .filter((name) => name.endsWith('.md'))
  .flatMap((file) => {
    const result = compile(readFileSync(new URL(file, folder), 'utf8'), { file });
    if (!result.ok) throw new Error(`${file} has faults.`);
    const { lesson } = result;
    return lesson.blocks.flatMap((block) =>
      block.kind === 'question' && block.spec.kind === 'numeric'
        ? [[block.spec.id, lesson, block.spec] as const]
        : [],
    );
  });

describe('a key is what pencil and paper give', () => {
  it('for every numeric question of the course', () => {
    expect(numeric.map(([id]) => id).filter((id) => !Object.hasOwn(BY_HAND, id))).toEqual([]);
  });
  it.each(numeric)('%s', (id, lesson, question) => {
    for (const values of question.variants) {
      const key = keyOf(question, scopeOf(lesson, values));
      // Half the tolerance: whoever works by hand and rounds once is right.
      expect(Math.abs(key - BY_HAND[id]!(values)), JSON.stringify(values)).toBeLessThanOrEqual(
        toleranceOf(question, key) / 2,
      );
    }
  });
});

interface Example {
  readonly id: string;
  readonly given: Readonly<Record<string, number | string>>;
  readonly quantity: string;
  readonly printed: number | null;
}

/** Acids that lessons speak of, titrated as lessons write it. */
const examples = published<Example>(4, 'worked_example').filter(
  ({ given, quantity, printed }) =>
    typeof printed === 'number' &&
    quantity === 'pH' &&
    ['HCl', 'CH3COOH'].includes(String(given['analyte'])) &&
    given['titrant'] === 'NaOH',
);

describe('mixtures as lessons write them give the worked examples', () => {
  test('there are some of both kinds', () => {
    const of = (analyte: string) => examples.filter(({ given }) => given['analyte'] === analyte).length;
    expect(of('HCl')).toBe(28);
    expect(of('CH3COOH')).toBe(4);
  });
  test.each(examples.map((row) => [row.id, row.given['V_added_mL'], row] as const))(
    '%s, %s mL',
    (_, __, row) => {
      const { analyte, C_M, V_mL, C_titrant_M, V_added_mL, Ka } = row.given;
      const portions = [`${V_mL} mL of ${C_M} mol/L ${analyte}`];
      if (Number(V_added_mL) > 0) portions.push(`${V_added_mL} mL of ${C_titrant_M} mol/L NaOH`);
      const pH = evaluate(parseFormula(`pH(${portions.join(' + ')})`), {
        model: 'textbook',
        benches: new Map(),
        values: {},
      });
      // The book's own Ka is not ours: between the ends of a titration that shifts the pH by as much as it shifts the pKa.
      const shift = Ka === undefined ? 0 : Math.abs(-lg(Number(Ka)) - PKA);
      expect(Math.abs(pH - row.printed!)).toBeLessThan(0.006 + shift);
      expect(0.006 + shift).toBeLessThan(0.02);
    },
  );
});
