/** Activity coefficients against measured ones, and concentrated solutions against the Pitzer model. */
import { describe, expect, test } from 'vitest';
import { solveInto } from '../../src/chemistry/compiled.ts';
import { createSolution, solve } from '../../src/chemistry/index.ts';
import type { Activity } from '../../src/chemistry/system.ts';
import { waterDensity } from '../../src/chemistry/water.ts';
import { published } from './published.ts';
import sit from './data/sit.json' with { type: 'json' };

const KILOGRAM_mL = 1000 / waterDensity(25);
const IONS: Readonly<Record<string, readonly [string, string]>> = {
  HCl: ['H3O+', 'Cl-'],
  NaCl: ['Na+', 'Cl-'],
  NaOH: ['Na+', 'OH-'],
  KCl: ['K+', 'Cl-'],
};

/** Mean activity coefficient of a 1:1 electrolyte at 25 °C. */
function meanGamma(substance: string, molality: number, activity: Activity): number {
  const solution = createSolution({ parts: [{ substance, amount_mol: molality }], volume_mL: KILOGRAM_mL });
  const { system, names } = solveInto(solution, 'real', activity);
  const [plus, minus] = IONS[substance]!.map((ion) => system.lnGamma[names.indexOf(ion)]!);
  return Math.exp((plus! + minus!) / 2);
}

const measured = published<{ salt: string; molality: number; gamma: number }>(6, 'mean_gamma').filter(
  (row) => row.molality < 1.01,
);
const titled = (rows: typeof measured) =>
  rows.map((row) => [row.salt, row.molality, row.source_id, row.gamma] as const);

describe('Davies, up to 0.1 mol/kg', () => {
  const rows = measured.filter((row) => row.molality <= 0.1 && (row.salt === 'HCl' || row.salt === 'NaCl'));
  test.each(titled(rows))('%s %d mol/kg, %s', (salt, molality, _, gamma) => {
    expect(Math.abs(meanGamma(salt, molality, 'davies') - gamma)).toBeLessThan(0.02);
  });
});

describe('specific ion interaction theory, up to 1 mol/kg', () => {
  test.each(titled(measured))('%s %d mol/kg, %s', (salt, molality, _, gamma) => {
    // The source gives no interaction of K+ with Cl-, and counts it as 0.
    const bound = salt === 'KCl' ? 0.022 : 0.02;
    expect(Math.abs(meanGamma(salt, molality, 'sit') - gamma)).toBeLessThan(bound);
  });
});

// PHREEQC 3.8.9 with pitzer.dat, 25 °C, per kg of water; tolerances as published with the values.
describe('Pitzer model', () => {
  test.each(sit.checks.rows.map((row) => [row.solution, row] as const))('%s', (text, row) => {
    const parts = text.split(' + ').map((part) => {
      const [, amount, substance] = /^([\d.]+) mol (\S+)$/.exec(part)!;
      return { substance: substance!, amount_mol: Number(amount) };
    });
    const { pH } = solve(createSolution({ parts, volume_mL: KILOGRAM_mL }), 'real');
    expect(Math.abs(pH - row.pH)).toBeLessThan(row.tolerance);
  });
});

test('Davies fails where the README of the checks says so: concentrated phosphate', () => {
  const parts = ['NaH2PO4', 'Na2HPO4'].map((substance) => ({ substance, amount_mol: 0.25 }));
  const solution = createSolution({ parts, volume_mL: KILOGRAM_mL });
  expect(solve(solution, 'real', { activity: 'davies' }).pH - 6.546).toBeGreaterThan(0.3);
});
