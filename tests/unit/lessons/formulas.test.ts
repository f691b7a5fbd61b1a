import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { evaluate, parseFormula, type RunScope } from '../../../src/lessons/formula.ts';

const scope: RunScope = { model: 'textbook', benches: new Map(), values: { c: 0.1 } };
const value = (text: string): number => evaluate(parseFormula(text), scope);

interface Row {
  readonly id: string;
  readonly given: {
    analyte?: string;
    Ka?: number;
    C_M?: number;
    V_mL?: number;
    titrant?: string;
    C_titrant_M?: number;
    V_added_mL?: number;
  };
  readonly quantity: string;
  readonly check_exact_ideal: number;
  readonly source: string;
}
const file = new URL('../../reference/data/chemistry.json', import.meta.url);
const { sections } = JSON.parse(readFileSync(file, 'utf8')) as { sections: { n: number; rows: Row[] }[] };
// Titrations whose constants are ours: strong acid, or ethanoic acid with Ka 1.75e-5 (Harvey, Analytical Chemistry 2.1).
const titrations = sections
  .find(({ n }) => n === 4)!
  .rows.filter(
    ({ given, quantity }) =>
      quantity === 'pH' &&
      given.titrant === 'NaOH' &&
      (given.analyte === 'HCl' || (given.analyte === 'CH3COOH' && given.Ka === 1.75e-5)),
  );

describe('keys agree with worked examples of textbooks', () => {
  it('has such examples', () => expect(titrations.length).toBeGreaterThan(30));
  it.each(titrations.map((row) => [row.id, row.given.V_added_mL, row] as const))(
    '%s, %f mL',
    (_, __, row) => {
      const { analyte, C_M, V_mL, C_titrant_M, V_added_mL } = row.given;
      const pH = value(
        `pH(${V_mL} mL of ${C_M} mol/L ${analyte} + ${V_added_mL} mL of ${C_titrant_M} mol/L NaOH)`,
      );
      expect(Math.abs(pH - row.check_exact_ideal), row.source).toBeLessThanOrEqual(0.006);
    },
  );
});

describe('formulas', () => {
  it.each([
    ['2 + 3 * 4', 14],
    ['-2^2', -4],
    ['(2 + 3) · 4 / 10', 2],
    ['-lg(c)', 1],
    ['sqrt(10^-pKa(ethanoic) * c)', Math.sqrt(10 ** -4.756 * 0.1)],
    ['volume(25 mL of water + 2 drops of 0.1 mol/L HCl)', 0.0251],
    ['conc(H3O+; 1 L of 0.02 mol/L HCl)', 0.02],
    ['amount(Cl-; 50 mL of c mol/L HCl)', 0.005],
    ['pKa(phosphoric 2)', 7.198],
  ])('%s', (text, expected) => expect(value(text)).toBeCloseTo(expected, 6));
  it('a ratio of partners by amounts', () => {
    expect(value('ratio(CH3COO-; CH3COOH; 50 mL of 0.10 mol/L CH3COOH and 0.20 mol/L CH3COONa)')).toBeCloseTo(
      2,
      2,
    );
  });
  it('deep nesting and long text are refused, not computed', () => {
    expect(() => parseFormula('('.repeat(100) + '1' + ')'.repeat(100))).toThrow(/nested/);
    expect(() => parseFormula('-'.repeat(200) + '1')).toThrow(/nested/);
    expect(() => parseFormula(`${'1+'.repeat(1000)}1`)).toThrow(/at most/);
    expect(() => value('10^400')).toThrow(/no number/);
    for (const text of ['constructor(1)', 'toString', 'pKa(constructor)', 'pH(1 mL of valueOf mol/L HCl)'])
      expect(() => value(text), text).toThrow(/There is no/);
  });
});
