/**
 * Worked examples of textbooks, in the textbook's own terms: activities are concentrations, Kw = 1.0e-14, the Ka that is given.
 * Their printed answers are rounded to two decimals.
 */
import { describe, expect, test } from 'vitest';
import { solveRaw, type RawAcid, type RawIon } from '../../src/chemistry/raw.ts';
import { published } from './published.ts';

interface Example {
  readonly id: string;
  readonly given: Readonly<Record<string, unknown>>;
  readonly quantity: string;
  readonly printed: number | null;
}

const pH = (acids: readonly RawAcid[], charge: number, volume_L = 1, pKw = 14) =>
  solveRaw({
    volume_L,
    pKw,
    activity: 'none',
    acids,
    ions: charge === 0 ? [] : [{ charge: Math.sign(charge), amount_mol: Math.abs(charge) } satisfies RawIon],
  }).pH;
const acid = (Ka: number, amount_mol: number, charge = 0): RawAcid => ({
  pKa: [-Math.log10(Ka)],
  charge,
  amount_mol,
});
/** The conjugate acid of a base that Kb is given for. */
const base = (Kb: number, amount_mol: number): RawAcid => acid(1e-14 / Kb, amount_mol, 1);

/** pH while an acid is titrated with sodium hydroxide. */
function titrated(given: Example['given']): number {
  const { Ka, C_M, V_mL, C_titrant_M, V_added_mL } = given as Record<string, number>;
  const n = (C_M! * V_mL!) / 1000;
  const sodium = (C_titrant_M! * V_added_mL!) / 1000;
  const litres = (V_mL! + V_added_mL!) / 1000;
  return Ka === undefined ? pH([], sodium - n, litres) : pH([acid(Ka, n)], sodium, litres);
}

/** What each other example describes, as a mixture: answers with pH. */
const DESCRIBED: Readonly<Record<string, () => number>> = {
  'OSX-B1': () => pH([acid(1.8e-5, 0.2)], 0.1),
  'OSX-B7': () => pH([base(1.8e-5, 0.6)], -0.4),
  'OSX-B9': () => pH([acid(1.8e-5, 0.4)], 0.3),
  'OSX-P1': () => pH([], -0.0012),
  'OSX-P2': () => pH([], 0.0125),
  'OSX-P4': () => pH([], 0, 1, -Math.log10(9.311e-14)),
  'OSX-P5': () => pH([], 0, 1, -Math.log10(2.9e-14)),
  'OSX-P7': () => pH([], -0.000259),
  'OSX-P9': () => pH([], 2 * 7.1e-5),
  'OSX-P10': () => pH([], 2.5),
  'OSX-S2': () => pH([base(6.3e-5, 0.25)], 0),
  'OSX-S5': () => pH([base(2.5e-4, 0.01)], 0),
  'OSX-H1': () => pH([acid(2.3e-5, 0.233, 1)], -0.233),
  'OSX-H2': () => pH([base(1.8e-5, 0.1)], -0.1),
  'OSX-Y1': () => pH([{ pKa: [-Math.log10(4.3e-7), -Math.log10(4.7e-11)], charge: 0, amount_mol: 0.033 }], 0),
  'OSX-Y2': () => pH([acid(8.9e-8, 0.1)], 0),
  'OSX-Y3': () => pH([{ pKa: [-Math.log10(1.1e-3), -Math.log10(3.9e-6)], charge: 0, amount_mol: 0.01 }], 0),
  'COURSE-3': () => pH([], 0.045 * 0.15 - 0.035 * 0.125, 0.08),
};

/*
 * Left out: OSX-H4 and LIB-1, whose printed answers are approximations; OSX-P12 and OSX-S9, which convert a pH that is given and
 * ask nothing of an engine.
 */
const LEFT_OUT = ['OSX-H4', 'LIB-1', 'OSX-P12', 'OSX-S9'];
const examples = published<Example>(4, 'worked_example').filter(
  (row) => row.printed !== null && row.printed !== undefined && !LEFT_OUT.includes(row.id),
);
const answer = (row: Example) => ('analyte' in row.given ? titrated(row.given) : DESCRIBED[row.id]!());

const acidity = examples.filter((row) => row.quantity === 'pH');
const concentrations = examples.filter((row) => row.quantity === '[H3O+]');

describe('pH', () => {
  // OSX-T3 and others print the root of an approximation: 0.0053 is the largest rounding among them.
  test.each(acidity.map((row) => [row.id, row.given['V_added_mL'] ?? '', row] as const))(
    '%s %s',
    (_, __, row) => {
      expect(Math.abs(answer(row) - row.printed!)).toBeLessThan(0.006);
    },
  );
});

describe('[H3O+], two figures', () => {
  test.each(concentrations.map((row) => [row.id, row] as const))('%s', (_, row) => {
    expect(Math.abs(10 ** -answer(row) / row.printed! - 1)).toBeLessThan(0.015);
  });
});

test('no example goes unasked', () => {
  expect(acidity.length + concentrations.length).toBe(examples.length);
  expect(examples.length).toBeGreaterThan(50);
});
