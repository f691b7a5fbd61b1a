/** Room left, against arithmetic with pencil and paper. */
import { expect, test } from 'vitest';
import { createSolution, indicatorStock, mix, pHOf, roomLeft, water } from '../../../src/chemistry/index.ts';

const buffer = (acid: number, base: number, volume_mL = 100) =>
  createSolution({
    parts: [
      { substance: 'CH3COOH', concentration_molL: acid },
      { substance: 'CH3COONa', concentration_molL: base },
    ],
    volume_mL,
  });
const titrated = (substance: string, volume_mL: number, liquid = buffer(0.1, 0.1)) =>
  mix(liquid, createSolution({ parts: [{ substance, concentration_molL: 0.1 }], volume_mL }));

test('equal partners: 9/11 of one of them, both ways', () => {
  // 10 mmol of each: (10 - n)/(10 + n) = 1/10 gives n = 90/11 = 8.18 mmol. Free hydrogen ions add 0.03 mmol at pH 3.76.
  const room = roomLeft(buffer(0.1, 0.1), 'textbook')!;
  expect(room).toMatchObject({ family: 'ethanoic', acid: 'CH3COOH', base: 'CH3COO-' });
  expect(room.forAcid.amount_mol * 1000).toBeCloseTo(90 / 11 + 0.03, 1);
  expect(room.forBase.amount_mol * 1000).toBeCloseTo(90 / 11, 1);
  expect([room.forAcid.endedBy, room.forBase.endedBy]).toEqual(['ratio', 'ratio']);
  expect(pHOf(titrated('HCl', room.forAcid.volume_mL), 'textbook')).toBeCloseTo(4.756 - 1, 2);
  expect(pHOf(titrated('NaOH', room.forBase.volume_mL), 'textbook')).toBeCloseTo(4.756 + 1, 2);
});

test('unequal partners: little room on the side of the scarce one', () => {
  // 2 mmol base beside 10 mmol acid: (2 - n)/(10 + n) = 1/10 gives 0.91 mmol; (10 - n)/(2 + n) = 1/10 gives 8.91 mmol.
  const room = roomLeft(buffer(0.1, 0.02), 'textbook')!;
  expect(room.forAcid.amount_mol * 1000).toBeCloseTo(1 / 1.1 + 0.02, 1);
  expect(room.forBase.amount_mol * 1000).toBeCloseTo(9.8 / 1.1, 1);
});

test('the vessel’s space ends it first, and that is said', () => {
  const room = roomLeft(buffer(0.1, 0.1), 'real', { titrant_molL: 0.1, space_mL: 20 })!;
  expect(room.forAcid).toEqual({ amount_mol: 0.002, volume_mL: 20, endedBy: 'space' });
  expect(room.forBase).toEqual({ amount_mol: 0.002, volume_mL: 20, endedBy: 'space' });
  const strong = roomLeft(buffer(0.1, 0.1), 'real', { titrant_molL: 1, space_mL: 20 })!;
  expect(strong.forAcid.endedBy).toBe('ratio');
  expect(strong.forAcid.volume_mL).toBeLessThan(10);
  expect(roomLeft(buffer(0.1, 0.1), 'real', { space_mL: 0 })!.forBase.volume_mL).toBe(0);
});

test('of several pairs the one that holds the pH counts', () => {
  const phosphate = createSolution({
    parts: [
      { substance: 'NaH2PO4', concentration_molL: 0.05 },
      { substance: 'Na2HPO4', concentration_molL: 0.05 },
      { substance: 'CH3COONa', concentration_molL: 0.001 },
    ],
    volume_mL: 50,
  });
  const dyed = mix(phosphate, indicatorStock('bromothymol-blue', { massPercent: 0.1, volume_mL: 0.5 }));
  expect(roomLeft(dyed, 'real')).toMatchObject({ family: 'phosphoric', acid: 'H2PO4-', base: 'HPO4-2' });
});

test('what holds no pair has none', () => {
  expect(roomLeft(water('boiled', 50), 'textbook')).toBeNull();
  expect(
    roomLeft(
      createSolution({ parts: [{ substance: 'HCl', concentration_molL: 0.1 }], volume_mL: 50 }),
      'real',
    ),
  ).toBeNull();
  expect(roomLeft(buffer(0.1, 0), 'textbook')).toBeNull();
});

test.each([
  [{ titrant_molL: 0 }, /titrant_molL is a number of mol\/L above 0; found 0/],
  [{ titrant_molL: NaN }, /titrant_molL/],
  [{ space_mL: -1 }, /space_mL is a number of mL, 0 or more; found -1/],
])('%o is refused with its name', (options, message) => {
  expect(() => roomLeft(buffer(0.1, 0.1), 'textbook', options)).toThrow(message);
});
