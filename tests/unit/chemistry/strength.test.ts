/** Molar masses, and mass percent against mol/L. */
import { describe, expect, test } from 'vitest';
import { molarMass, hydrateFormula } from '../../../src/chemistry/preparation/molarMass.ts';
import { massPercentOf, molarityOf } from '../../../src/chemistry/preparation/strength.ts';
import { published } from '../../reference/published.ts';
import { substances } from '../../../src/chemistry/substances.ts';

const FORMULAE: Readonly<Record<string, string>> = {
  'Hydrogen chloride': 'HCl',
  'Sodium hydroxide': 'NaOH',
  'Sulfuric acid': 'H2SO4',
  'Acetic acid': 'CH3COOH',
  Ammonia: 'NH3',
  'Phosphoric acid': 'H3PO4',
  'Sodium chloride': 'NaCl',
  'Sodium acetate': 'CH3COONa',
  'Citric acid': 'C6H8O7',
  'Tris(hydroxymethyl)methylamine': 'C4H11NO3',
  'Sodium carbonate': 'Na2CO3',
  'Sodium hydrogen carbonate': 'NaHCO3',
  'Potassium hydroxide': 'KOH',
};

describe('molar mass', () => {
  // Standard atomic weights 2021, abridged (Prohaska et al. 2022).
  const rows = published<{ formula: string; g_per_mol: number }>(7, 'molar_mass');
  test.each(rows.map((row) => [row.formula, row.g_per_mol] as const))('%s %d g/mol', (formula, value) => {
    expect(molarMass(formula)).toBeCloseTo(value, 6);
  });

  test('of everything in the catalogue', () => {
    for (const { formula } of substances) expect(molarMass(formula), formula).toBeGreaterThan(15);
  });

  test('hydrates, with either dot', () => {
    expect(molarMass(hydrateFormula('Na2CO3', 10))).toBeCloseTo(molarMass('Na2CO3.10H2O'), 9);
    expect(hydrateFormula('C6H8O7', 1)).toBe('C6H8O7·H2O');
    expect(hydrateFormula('NaOH', 0)).toBe('NaOH');
  });

  test.each(['', '·', 'NaOH)', '(NaOH', 'nacl', 'Na-Cl', '2'])('%j is no formula', (formula) => {
    expect(() => molarMass(formula)).toThrow(expect.objectContaining({ field: 'formula' }));
  });

  test('an unknown element is named', () => {
    expect(() => molarMass('UCl4')).toThrow(/element 'U'/);
  });
});

describe('strength', () => {
  // CRC Handbook, 102nd ed., 20 °C: its molarity is 10 w ρ / M of the same row.
  const rows = published<{ solute: string; mass_percent: number; molarity: number; density_g_mL: number }>(
    7,
    'solution_density',
  );
  test.each(rows.map((row) => [row.solute, row.mass_percent, row.molarity] as const))(
    '%s %d %%',
    (solute, percent, molarity) => {
      const formula = FORMULAE[solute]!;
      expect(Math.abs(molarityOf(formula, percent) / molarity - 1)).toBeLessThan(0.006);
      expect(Math.abs(massPercentOf(formula, molarityOf(formula, percent)) - percent)).toBeLessThan(1e-6);
    },
  );

  // OpenStax Chemistry 2e (2019), Appendix F, commercial acids and bases: three figures.
  const REAGENTS: Readonly<Record<string, string>> = {
    'glacial acetic acid': 'CH3COOH',
    ammonia: 'NH3',
    'hydrochloric acid': 'HCl',
    'nitric acid': 'HNO3',
    'phosphoric acid': 'H3PO4',
    'sodium hydroxide': 'NaOH',
    'sulfuric acid': 'H2SO4',
  };
  const bottles = published<{ reagent: string; mass_percent: number; molarity: number }>(
    7,
    'concentrated_reagent',
  ).filter((row) => row.reagent in REAGENTS);
  test.each(bottles.map((row) => [row.reagent, row] as const))('bottle of %s', (reagent, row) => {
    expect(Math.abs(molarityOf(REAGENTS[reagent]!, row.mass_percent) / row.molarity - 1)).toBeLessThan(0.012);
  });

  test.each([-1, NaN, 101])('%d %% is no strength', (percent) => {
    expect(() => molarityOf('HCl', percent)).toThrow(expect.objectContaining({ field: 'massPercent' }));
  });
});
