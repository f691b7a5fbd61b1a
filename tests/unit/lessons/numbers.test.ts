import { describe, expect, it } from 'vitest';
import {
  formatNumber,
  formatProse,
  formatQuantity,
  USUAL,
  type Conventions,
} from '../../../src/lessons/format.ts';
import { readNumber } from '../../../src/lessons/numberInput.ts';

const READ: readonly (readonly [typed: string, unit: string, base: number])[] = [
  ['4.76', '', 4.76],
  ['4,76', '', 4.76],
  ['pH = 4.76', '', 4.76],
  ['−0.30', '', -0.3],
  ['0,125', '', 0.125],
  ['1000', '', 1000],
  ['12 345,6', '', 12345.6],
  ['1e-5', 'mol/L', 1e-5],
  ['1·10^-5', 'mol/L', 1e-5],
  ['1,0·10^-5', 'mol/L', 1e-5],
  ['1.7x10^(-5)', 'mol/L', 1.7e-5],
  ['1.0 × 10⁻⁵ mol dm⁻³', 'mol/L', 1e-5],
  ['10^-5', 'mol/L', 1e-5],
  ['10⁻⁵ M', 'mol/L', 1e-5],
  ['5 mM', 'mol/L', 5e-3],
  ['0.25', 'mmol/L', 2.5e-4],
  ['25 cm3', 'mL', 0.025],
  ['25 cm³', 'mL', 0.025],
  ['0.025 dm³', 'mL', 0.025],
  ['3 drops', 'drops', 3],
  ['1.3 %', '%', 0.013],
];

const ASKED_BACK: readonly (readonly [typed: string, unit: string, sentence: string])[] = [
  ['', '', 'Type a number.'],
  ['abc', '', "'abc' is not a number. Write it like 4.76, 4,76 or 1.7e-5."],
  ['1,000', '', "Is '1,000' 1000 or 1.000? Write 1000, or 1.000 with a point."],
  [
    '1.234.567',
    '',
    "'1.234.567' has more than one point or comma. Write it with one, for the decimals, like 1234.5.",
  ],
  ['1 2', '', "'1 2' looks like more than one number. Type one."],
  ['1.7*10-5', 'mol/L', "Is '1.7*10-5' a power of ten? Write it like 1.7e-5 or 1.7·10^-5."],
  ['0.02 mol', 'mol/L', "'mol' does not measure what is asked. Answer in mol/L."],
  ['3 mL', '', "No unit is needed here: 'mL'. Type the number alone."],
  ['3 buckets', 'mL', "The unit 'buckets' is not known here. Type the number in mL."],
  ['3 constructor', 'mL', "The unit 'constructor' is not known here. Type the number in mL."],
  ['1e999', '', 'That number is too large.'],
];

describe('a number as a learner types it', () => {
  it.each(READ)('%s in %s', (typed, unit, base) => {
    const read = readNumber(typed, unit);
    expect(read).toMatchObject({ ok: true });
    expect(read.ok && read.base).toBeCloseTo(base, 12);
  });
  it.each(ASKED_BACK)('%s is asked back', (typed, unit, ask) =>
    expect(readNumber(typed, unit)).toEqual({ ok: false, ask }),
  );
});

describe('a number as a reader sees it', () => {
  const schools: Conventions = {
    decimal: ',',
    concentration: 'mol dm⁻³',
    volume: 'cm³',
    pH: 'significant figures',
  };
  it.each([
    [0.0000123, 3, 'figures', '1.23 × 10⁻⁵'],
    [0.1, 3, 'figures', '0.100'],
    [123456, 3, 'figures', '1.23 × 10⁵'],
    [2.675, 2, 'decimals', '2.68'],
    [-0.001, 2, 'decimals', '0.00'],
    [-0.3, 2, 'decimals', '−0.30'],
    [0, 2, 'figures', '0.0'],
  ] as const)('%f to %i %s', (value, digits, by, text) =>
    expect(formatNumber(value, { digits, by }, USUAL)).toBe(text),
  );
  it('follows the conventions of course and reader', () => {
    expect(formatQuantity(0.0251, { unit: 'mL', digits: 3, by: 'figures' }, schools)).toBe('25,1\u00a0cm³');
    expect(formatQuantity(0.005, { unit: 'mmol/L', digits: 2, by: 'figures' }, schools)).toBe(
      '5,0\u00a0mmol dm⁻³',
    );
    expect(formatQuantity(1, { unit: 'drops', digits: 0, by: 'decimals' })).toBe('1 drop');
  });
  it('is filled into prose for each request, and nothing else is touched', () => {
    const html =
      '<p>4.76 stays, <data value="0.0251" data-unit="mL" data-digits="3" data-by="figures">25.1 mL</data></p>';
    expect(formatProse(html, schools)).toBe(html.replace('25.1 mL', '25,1\u00a0cm³'));
  });
});
