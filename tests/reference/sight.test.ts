/** Differences of colours, and colours as other eyes see them, beside published and printed values. */
import { converter, differenceCiede2000 } from 'culori';
import { describe, expect, test } from 'vitest';
import { indicatorData } from '../../src/chemistry/indicatorData.ts';
import {
  ciede2000,
  colour,
  differ,
  differenceFor,
  labOf,
  SIGHTS,
  water,
  type Colour,
  type Lab,
  type Species,
} from '../../src/chemistry/index.ts';
import { MACHADO, seenBy } from '../../src/chemistry/sight.ts';
import pairs from './data/ciede2000-sharma2005.json' with { type: 'json' };

describe('CIEDE2000', () => {
  // Sharma G., Wu W., Dalal E.N., Color Res. Appl. 30 (2005) 21, table 1: L, a, b of both colours, and their difference.
  test.each(pairs.map((row, i) => [i + 1, row] as const))('pair %d of Sharma, Wu and Dalal', (_, row) => {
    const [L1, a1, b1, L2, a2, b2, expected] = row as [
      number,
      number,
      number,
      number,
      number,
      number,
      number,
    ];
    const [one, other]: [Lab, Lab] = [
      [L1, a1, b1],
      [L2, a2, b2],
    ];
    expect(Math.abs(ciede2000(one, other) - expected)).toBeLessThan(1e-4);
    expect(ciede2000(other, one)).toBeCloseTo(ciede2000(one, other), 10);
    expect(ciede2000(one, one)).toBe(0);
  });

  test('all 34 pairs are there', () => expect(pairs).toHaveLength(34));

  // A second opinion: culori 4.0.2, from sRGB on.
  test('agrees with another program on colours of a screen', () => {
    const lab = converter('lab65');
    const theirs = differenceCiede2000();
    for (let i = 0; i < 200; i++) {
      const [one, other] = [i, (i * 7 + 31) % 200].map((n) => ({
        mode: 'rgb' as const,
        r: ((n * 13) % 101) / 100,
        g: ((n * 29) % 103) / 102,
        b: ((n * 47) % 107) / 106,
      })) as [
        { mode: 'rgb'; r: number; g: number; b: number },
        { mode: 'rgb'; r: number; g: number; b: number },
      ];
      const [a, b] = [lab(one), lab(other)];
      expect(Math.abs(ciede2000([a.l, a.a, a.b], [b.l, b.a, b.b]) - theirs(one, other))).toBeLessThan(0.01);
    }
  });

  test('white is L* 100 without a hue', () => {
    const [L, a, b] = labOf([0.3127 / 0.329, 1, 0.3583 / 0.329]);
    expect(L).toBeCloseTo(100, 10);
    expect(Math.hypot(a, b)).toBeLessThan(1e-10);
  });
});

describe('kinds of sight', () => {
  test('white stays white, and rows sum to 1 as light that is added does', () => {
    for (const rows of Object.values(MACHADO))
      for (const row of rows) expect(row[0] + row[1] + row[2]).toBeCloseTo(1, 5);
    for (const sight of SIGHTS) for (const value of seenBy([1, 1, 1], sight)) expect(value).toBeCloseTo(1, 5);
  });

  /** The usual dose of the textbook's figure: three drops of a 0.1 % solution (phenolphthalein 0.5 %) in 50 mL, 5 cm. */
  function dosed(id: string, pH: number): Colour {
    const { pKa, molarMass, forms, charge } = indicatorData[id]!;
    const weights = [1];
    for (const [k, value] of pKa.entries()) weights.push(weights[k]! * 10 ** (pH - value));
    const sum = weights.reduce((a, b) => a + b);
    const molar = (((id === 'phenolphthalein' ? 0.5 : 0.1) * 10) / molarMass) * (0.15 / 50.15);
    const species = weights.map((weight, k): Species => ({
      name: `${id} ${forms[k]!.name}`,
      component: id,
      charge: charge - k,
      amount_mol: (molar * weight) / sum,
    }));
    return colour(water('boiled', 1000), 5, {
      model: 'textbook',
      pH,
      ionicStrength: 0,
      species,
      warnings: [],
    });
  }

  /*
   * The trial that came before this program, with a program of its own: dE00 between the two end colours of each change, for typical,
   * protan, deutan and tritan sight (Machado), printed as whole numbers.
   */
  const PRINTED = [
    ['thymol-blue', 0, 5, 69, 59, 52, 33],
    ['thymol-blue', 5, 13, 63, 59, 63, 40],
    ['bromophenol-blue', 1, 8, 71, 64, 65, 34],
    ['methyl-orange', 1, 8, 43, 31, 18, 19],
    ['bromocresol-green', 2, 8, 47, 44, 49, 35],
    ['methyl-red', 2, 9, 83, 70, 53, 41],
    ['bromocresol-purple', 3, 10, 75, 66, 66, 33],
    ['bromothymol-blue', 4, 10, 50, 50, 53, 34],
    ['phenol-red', 5, 11, 83, 70, 60, 40],
    ['cresol-red', -1, 4.5, 62, 46, 27, 32],
    ['cresol-red', 4.5, 12, 82, 70, 68, 38],
    ['m-cresol-purple', 5, 12, 78, 69, 68, 36],
    ['phenolphthalein', 4, 12, 45, 47, 30, 44],
  ] as const;
  test.each(PRINTED)('%s from pH %d to %d', (id, acid, base, ...printed) => {
    const [one, other] = [dosed(id, acid), dosed(id, base)];
    for (const [i, sight] of SIGHTS.entries())
      expect(Math.abs(differenceFor(one, other, sight) - printed[i]!), sight).toBeLessThanOrEqual(1);
    expect(differ(one, other)).toMatchObject({ everyone: true, alikeFor: [] });
  });

  test('methyl orange’s end point is the weak one: nobody without middle-wave cones sees either half of it', () => {
    const [acid, middle, base] = [1, 3.55, 8].map((pH) => dosed('methyl-orange', pH)) as [
      Colour,
      Colour,
      Colour,
    ];
    expect(differenceFor(acid, middle, 'deutan')).toBeCloseTo(11.4, 0);
    expect(differenceFor(middle, base, 'deutan')).toBeCloseTo(7.8, 0);
    expect(differ(acid, middle).alikeFor).toContain('deutan');
    expect(differ(middle, base).alikeFor).toContain('deutan');
    expect(differ(acid, acid).alikeFor).toEqual(SIGHTS);
  });
});
