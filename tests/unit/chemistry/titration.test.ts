/** Titrations, against what stoichiometry and textbooks say. */
import { describe, expect, test } from 'vitest';
import { createSolution, pHOf, titrate, type Model } from '../../../src/chemistry/index.ts';

const of = (substance: string, concentration_molL: number, volume_mL: number) =>
  createSolution({ parts: [{ substance, concentration_molL }], volume_mL });
const run = (analyte: string, titrant: string, model: Model = 'textbook', to_mL = 80) =>
  titrate(of(analyte, 0.1, 25), of(titrant, 0.1, 100), to_mL, model);

describe('equivalence points by stoichiometry, half-equivalence near pKa', () => {
  test.each([
    ['CH3COOH', 'NaOH', [25], [[12.5, 4.756]]],
    ['HCl', 'NaOH', [25], []],
    ['NaOH', 'HCl', [25], []],
    ['NH3', 'HCl', [25], [[12.5, 9.245]]],
    ['H3PO4', 'NaOH', [25, 50], [[37.5, 7.198]]],
    ['Na2CO3', 'HCl', [25, 50], [[37.5, 6.351]]],
    ['citric acid', 'NaOH', [75], []],
    ['CH3COOH', 'NH3', [25], [[12.5, 4.756]]],
    ['NaOH', 'CH3COOH', [25], []],
  ] as const)('%s with %s', (analyte, titrant, equivalence, halves) => {
    const { equivalence: found, halfEquivalence } = run(analyte, titrant);
    expect(found.map((e) => e.added_mL)).toEqual(equivalence.map((mL) => expect.closeTo(mL, 9)));
    for (const [mL, pKa] of halves) {
      const mark = halfEquivalence.find((half) => Math.abs(half.added_mL - mL) < 1e-9);
      expect(Math.abs(mark!.pH - pKa)).toBeLessThan(0.01);
    }
    if (halves.length === 0) expect(halfEquivalence).toEqual([]);
  });

  test('the first half of phosphoric acid is marked, where its own strength keeps pH above pKa', () => {
    const [first] = run('H3PO4', 'NaOH').halfEquivalence;
    expect(first).toMatchObject({
      family: 'phosphoric',
      step: 1,
      added_mL: expect.closeTo(12.5, 9) as number,
    });
    expect(first!.pH).toBeGreaterThan(2.148);
  });

  test('strong and weak acid in one flask give two', () => {
    const parts = ['HCl', 'CH3COOH'].map((substance) => ({ substance, concentration_molL: 0.1 }));
    const both = titrate(createSolution({ parts, volume_mL: 25 }), of('NaOH', 0.1, 100), 80, 'textbook');
    expect(both.equivalence.map((e) => [e.family, e.added_mL])).toEqual([
      ['strong', expect.closeTo(25, 9)],
      ['ethanoic', expect.closeTo(50, 9)],
    ]);
  });

  test('volume too small to reach them marks none', () => {
    const short = run('CH3COOH', 'NaOH', 'textbook', 10);
    expect(short.equivalence).toEqual([]);
    expect(short.halfEquivalence).toEqual([]);
  });
});

test('equivalence is where the trace is steepest', () => {
  const { points, equivalence } = run('CH3COOH', 'NaOH', 'real');
  let steepest = { slope: 0, at: 0 };
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1]!, points[i]!];
    const slope = (b.pH - a.pH) / (b.added_mL - a.added_mL);
    if (slope > steepest.slope) steepest = { slope, at: (a.added_mL + b.added_mL) / 2 };
  }
  expect(Math.abs(steepest.at - equivalence[0]!.added_mL)).toBeLessThan(0.05);
});

describe.each(['textbook', 'real'] as const)('a trace (%s)', (model) => {
  const { points } = run('H3PO4', 'NaOH', model);
  test('begins with the analyte and ends at the volume asked for', () => {
    expect(points[0]).toEqual({ added_mL: 0, pH: pHOf(of('H3PO4', 0.1, 25), model) });
    expect(points.at(-1)!.added_mL).toBeCloseTo(80, 9);
  });
  test('rises, with no gap above 0.15', () => {
    for (let i = 1; i < points.length; i++) {
      expect(points[i]!.added_mL).toBeGreaterThan(points[i - 1]!.added_mL);
      expect(points[i]!.pH).toBeGreaterThanOrEqual(points[i - 1]!.pH);
      expect(points[i]!.pH - points[i - 1]!.pH).toBeLessThan(0.151);
    }
  });
});

test('bad input is refused by field', () => {
  const flask = of('HCl', 0.1, 25);
  expect(() => titrate(flask, of('NaOH', 0.1, 0), 10, 'real')).toThrow(
    expect.objectContaining({ field: 'titrant' }),
  );
  expect(() => titrate(flask, of('NaOH', 0.1, 10), NaN, 'real')).toThrow(
    expect.objectContaining({ field: 'to_mL' }),
  );
});
