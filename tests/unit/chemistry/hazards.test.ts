/** Hazards by concentration: the law's limits from their sources, the school's own bands, and what adds up. */
import { describe, expect, test } from 'vitest';
import { CLASSES, legalLimits, schoolBands, STATEMENTS } from '../../../src/chemistry/data/hazards.ts';
import { hazardsOf } from '../../../src/chemistry/preparation/hazards.ts';
import { molarityOf } from '../../../src/chemistry/preparation/strength.ts';
import { findSubstance } from '../../../src/chemistry/substances.ts';
import { published } from '../../reference/published.ts';

const of = (substance: string, concentration_molL: number) => hazardsOf([{ substance, concentration_molL }]);
const codes = (substance: string, concentration_molL: number) =>
  of(substance, concentration_molL).legal.map((h) => h.statement);

// Specific concentration limits of chemistry.json, section 9: just at the limit the class holds, just below it does not.
const limits = published<{
  substance: string;
  C_min_percent?: number;
  C_max_percent_exclusive?: number;
  classification: string;
}>(9, 'SCL')
  .filter((row) => row.C_min_percent !== undefined)
  .map((row) => ({
    formula: row.substance.replace('(aq)', ''),
    from: row.C_min_percent!,
    // Mixtures of 99 % nitric acid are another substance's entry, not a solution's.
    below: (row.C_max_percent_exclusive ?? 99) < 99 ? row.C_max_percent_exclusive : undefined,
    classes: row.classification.split('; '),
  }));
const classesAt = (formula: string, percent: number) =>
  of(formula, molarityOf(formula, percent)).legal.map((h) => h.classification);

describe.each(limits)('$formula, $classes', ({ formula, from, classes }) => {
  test('holds from its limit on', () =>
    expect(classesAt(formula, from + 1e-6)).toEqual(expect.arrayContaining(classes)));
  test('does not hold below', () => {
    for (const one of classes) expect(classesAt(formula, from * 0.999)).not.toContain(one);
  });
});

test.each(limits.filter((limit) => limit.below !== undefined))(
  '$formula, $classes: a stronger class takes over at $below %',
  ({ formula, below, classes }) => {
    for (const one of classes) expect(classesAt(formula, below! + 1e-6)).not.toContain(one);
  },
);

describe('what a class looks like on a bottle', () => {
  test('0.1 mol/L sodium hydroxide has no legal class, but the school says: eyes', () => {
    const hazards = of('NaOH', 0.1);
    expect(hazards.legal).toEqual([]);
    expect(hazards.pictograms).toEqual([]);
    expect(hazards.school).toMatchObject({
      words: 'hazard to eyes',
      handler: 'learners 11 to 16',
      goggles: true,
    });
  });
  test('1 mol/L sodium hydroxide is corrosive, and nothing weaker is said beside it', () => {
    expect(codes('NaOH', 1)).toEqual(['H314']);
    expect(of('NaOH', 1).pictograms).toEqual(['GHS05']);
    expect(of('NaOH', 1).school).toMatchObject({ handler: 'learners 16 to 19', gloves: true });
  });
  test('2 mol/L hydrochloric acid is below the law and inside the school band of irritants', () => {
    expect(codes('HCl', 2)).toEqual([]);
    expect(of('HCl', 2).school?.words).toMatch(/irritant/);
  });
  test('bleach names the gas that acid drives out of it', () => {
    expect(codes('NaOCl', 1)).toContain('EUH031');
  });
  test('borax from 0.3 %', () => {
    expect(codes('borax', 0.05)).toContain('H360FD');
    expect(codes('borax', 0.01)).toEqual([]);
  });
  test('table salt has none', () =>
    expect(of('NaCl', 1)).toEqual({ legal: [], school: undefined, pictograms: [] }));
});

test('shares of one class add up', () => {
  const half = (substance: string) => ({ substance, concentration_molL: molarityOf(substance, 0.3) });
  expect(hazardsOf([half('NaOH')]).legal).toEqual([]);
  const both = hazardsOf([half('NaOH'), half('KOH')]).legal;
  expect(both.map((h) => h.statement).sort()).toEqual(['H315', 'H319']);
  expect(both[0]!.from).toEqual(['NaOH', 'KOH']);
});

test('two irritants below their upper ends are corrosive together where the shares say so', () => {
  const parts = ['NaOH', 'KOH'].map((substance) => ({
    substance,
    concentration_molL: molarityOf(substance, 1.5),
  }));
  expect(hazardsOf(parts).legal.map((h) => h.statement)).toEqual(['H314']);
});

test('every listed substance is in the catalogue by its formula, every class has its words, every limit its source', () => {
  for (const formula of [...Object.keys(legalLimits), ...Object.keys(schoolBands)])
    expect(findSubstance(formula)?.formula, formula).toBe(formula);
  for (const [, statement] of Object.values(CLASSES)) expect(STATEMENTS[statement]).toBeTruthy();
  for (const h of of('NaOH', 5).legal) expect(h.sources.join()).not.toBe('');
});

test('bands rise', () => {
  for (const bands of Object.values(schoolBands))
    for (let i = 1; i < bands.length; i++)
      expect(bands[i]!.from_molL).toBeGreaterThan(bands[i - 1]!.from_molL);
});

test('a misspelt substance is answered with the nearest word', () => {
  expect(() => of('NaOHH', 1)).toThrow(
    expect.objectContaining({ field: 'parts[0].substance', nearest: 'NaOH' }),
  );
  expect(() => of('NaOH', -1)).toThrow(expect.objectContaining({ field: 'parts[0].concentration_molL' }));
});
