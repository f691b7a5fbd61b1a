/** Preparation arithmetic: worked by hand, and as a prep room does it. */
import { describe, expect, test } from 'vitest';
import { createSolution, pHOf } from '../../../src/chemistry/index.ts';
import {
  catalogue,
  dilute,
  factsFor,
  pHUncertainty,
  relativeUncertainty,
  sensible,
  volumeToMake,
  weigh,
} from '../../../src/chemistry/preparation/index.ts';
import { familyOf, strongIons } from '../../../src/chemistry/components.ts';

const wanted = (substance: string, concentration_molL: number, volume_mL: number) => ({
  substance,
  concentration_molL,
  volume_mL,
});

describe('weighing', () => {
  // 0.020 mol/L in 1.50 L is 0.030 mol: 0.030 × 136.08 g/mol, or × 82.03 g/mol without its water.
  test('sodium ethanoate: the trihydrate is the usual form', () => {
    expect(weigh(wanted('sodium ethanoate', 0.02, 1500))).toMatchObject({
      formula: 'CH3COONa·3H2O',
      mass_g: 4.08,
    });
    expect(weigh(wanted('sodium acetate', 0.02, 1500), { waters: 0 }).mass_g).toBe(2.46);
  });
  test('purity is allowed for', () => {
    const { exact_g } = weigh(wanted('NaOH', 0.1, 1000), { purity_percent: 97 });
    expect(exact_g).toBeCloseTo(3.9997 / 0.97, 4);
  });
  test('a hydrate that is not sold is refused with those that are', () => {
    expect(() => weigh(wanted('Na2CO3', 0.1, 100), { waters: 5 })).toThrow(
      /Na2CO3, Na2CO3·10H2O, Na2CO3·H2O/,
    );
  });
  test('what comes as a liquid is not weighed', () => {
    expect(() => weigh(wanted('HCl', 0.1, 100))).toThrow(/dilute it from its bottle/);
  });
  test('a misspelt name is answered with the nearest', () => {
    expect(() => weigh(wanted('sodium carbonat', 0.1, 100))).toThrow(
      expect.objectContaining({ field: 'substance', nearest: 'sodium carbonate' }),
    );
  });
  test.each([
    [{ purity_percent: 0 }, 'purity_percent'],
    [{ balance_g: NaN }, 'balance_g'],
  ])('%j is refused', (options, field) => {
    expect(() => weigh(wanted('NaCl', 0.1, 100), options)).toThrow(expect.objectContaining({ field }));
  });
});

describe('diluting', () => {
  test('from a stock: 25.0 mL of 1.00 mol/L make 250 mL of 0.10 mol/L', () => {
    expect(dilute(wanted('HCl', 0.1, 250), { molL: 1 })).toMatchObject({ volume_mL: 25, intoWater: false });
  });
  // 36 % hydrochloric acid of 1.18 g/mL holds 11.65 mol/L: 1 mol is in 85.8 mL.
  test('from the concentrated bottle by its label', () => {
    const byLabel = dilute(wanted('HCl', 1, 1000), { label_percent: 36, density_gmL: 1.18 });
    expect(byLabel.exact_mL).toBeCloseTo(85.8, 1);
    expect(byLabel.intoWater).toBe(true);
    expect(dilute(wanted('HCl', 1, 1000)).exact_mL).toBeCloseTo(85.9, 0);
  });
  test('a stock too weak is refused', () => {
    expect(() => dilute(wanted('HCl', 2, 100), { molL: 1 })).toThrow(
      expect.objectContaining({ field: 'stock' }),
    );
  });
  test('nothing wanted, nothing measured', () => {
    expect(dilute(wanted('HCl', 0, 100), { molL: 1 }).volume_mL).toBe(0);
  });
});

test.each([
  [4.0824, 0.01, 4.08],
  [0.020123, 0.01, 0.02],
  [123.456, 0.01, 123],
  [85.812, 0.1, 85.8],
  [0, 0.1, 0],
])('%d on a scale of %d is %d', (value, step, shown) => expect(sensible(value, step)).toBe(shown));

// A class of 8 groups: 1200 mL used, 15 % spare is 1380 mL; 125 mL with 20 % is 150 mL.
test.each([
  [1200, 0.15, 1500],
  [125, 0.2, 250],
  [20_000, 0.1, 25_000],
])('%d mL with a share of %d to spare: %d mL', (used, spare, make) =>
  expect(volumeToMake(used, spare)).toBe(make),
);

describe('uncertainty', () => {
  test('of a 25 mL pipette into a 250 mL flask', () => {
    const u = relativeUncertainty([
      { value: 25, tolerance: 0.06 },
      { value: 250, tolerance: 0.3 },
    ]);
    expect(u).toBeCloseTo(Math.sqrt((0.0024 ** 2 + 0.0012 ** 2) / 3), 12);
  });
  // d pH / d ln(ratio) = 1 / ln 10 for a weak acid and its base in the middle of their range, where water's own ions do not matter.
  test('of a buffer made of acid and salt', () => {
    const parts = ['CH3COOH', 'CH3COONa'].map((substance) => ({ substance, concentration_molL: 0.1 }));
    const buffer = createSolution({ parts, volume_mL: 100 });
    const u = pHUncertainty(buffer, 'textbook', { 'Na+': 0.01 });
    expect(u).toBeCloseTo((0.01 * 2) / Math.LN10, 3);
    expect(pHUncertainty(buffer, 'textbook', {})).toBe(0);
  });
});

describe('catalogue', () => {
  test('holds at least fifty substances, each with names, mass, form and sources', () => {
    expect(catalogue.length).toBeGreaterThanOrEqual(50);
    for (const facts of catalogue) {
      expect(facts.names.length, facts.formula).toBeGreaterThan(0);
      expect(facts.molarMass_gmol).toBeGreaterThan(15);
      expect(facts.hydrates.length).toBeGreaterThan(0);
      expect(facts.sources.length).toBeGreaterThan(1);
      for (const id in facts.gives) expect(familyOf(id) ?? strongIons[id], id).toBeDefined();
    }
  });
  test('every formula and name leads to one substance alone', () => {
    for (const facts of catalogue)
      for (const word of [facts.formula, ...facts.names]) expect(factsFor(word), word).toBe(facts);
  });
  test('every substance can be dissolved and solved, by both models', () => {
    for (const { formula } of catalogue) {
      const solution = createSolution({
        parts: [{ substance: formula, concentration_molL: 0.01 }],
        volume_mL: 10,
      });
      for (const model of ['textbook', 'real'] as const) {
        const pH = pHOf(solution, model);
        expect(pH > 0.9 && pH < 13.5, `${formula}: pH ${pH}`).toBe(true);
      }
    }
  });
  test('usual strengths dissolve', () => {
    for (const { formula, usual_molL, solubility_molL } of catalogue)
      for (const c of usual_molL) expect(c, formula).toBeLessThanOrEqual(solubility_molL ?? Infinity);
  });
});
