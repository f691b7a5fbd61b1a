/**
 * The engine beside published values, for people who want to see how far to trust it. The published columns are rows of
 * tests/reference/data, and tests/reference/comparisons.test.ts holds them to that; the engine's column is computed when asked for.
 */
import { solveInto } from '../compiled.ts';
import { solve } from '../equilibrium.ts';
import { createSolution } from '../solution.ts';
import { pKw, waterDensity } from '../water.ts';

export interface ComparisonRow {
  readonly name: string;
  readonly published: number;
  readonly ours: number;
}

export interface Comparison {
  readonly id: 'standards' | 'pitzer' | 'water' | 'activity';
  readonly title: string;
  readonly unit: string;
  /** Decimals that the published values have. */
  readonly decimals: number;
  readonly source: string;
  readonly rows: readonly ComparisonRow[];
}

type Mixture = Readonly<Record<string, number>>;

/** Name, id in the data, mol in a kilogram of water, published pH. */
export const STANDARDS: readonly (readonly [name: string, id: string, mixture: Mixture, pH: number])[] = [
  ['Potassium tetroxalate 0.05', 'tetroxalate_0.05', { 'KH3(C2O4)2': 0.05 }, 1.68],
  ['Potassium hydrogentartrate, saturated', 'tartrate_sat25', { KC4H5O6: 0.0341 }, 3.56],
  ['Potassium dihydrogencitrate 0.05', 'citrate_0.05', { KC6H7O7: 0.05 }, 3.78],
  ['Potassium hydrogenphthalate 0.05', 'phthalate_0.05', { KC8H5O4: 0.05 }, 4.01],
  ['Phosphate 0.025 + 0.025', 'phosphate_equimolal', { KH2PO4: 0.025, Na2HPO4: 0.025 }, 6.87],
  ['Phosphate 0.0087 + 0.0304', 'phosphate_physiological', { KH2PO4: 0.008695, Na2HPO4: 0.03043 }, 7.41],
  ['Borax 0.01', 'borax_0.01', { Na2B4O7: 0.01 }, 9.18],
  ['Carbonate 0.025 + 0.025', 'carbonate_0.025', { NaHCO3: 0.025, Na2CO3: 0.025 }, 10.01],
  ['Calcium hydroxide, saturated', 'CaOH2_sat25', { 'Ca(OH)2': 0.0203 }, 12.45],
];

/** The solution as the data names it, mol in a kilogram of water, pH by the Pitzer model. */
export const PITZER: readonly (readonly [name: string, mixture: Mixture, pH: number])[] = [
  ['0.05 mol NaH2PO4 + 0.05 mol Na2HPO4', { NaH2PO4: 0.05, Na2HPO4: 0.05 }, 6.792],
  ['0.25 mol NaH2PO4 + 0.25 mol Na2HPO4', { NaH2PO4: 0.25, Na2HPO4: 0.25 }, 6.546],
  ['0.1 mol NaHCO3 + 0.1 mol Na2CO3', { NaHCO3: 0.1, Na2CO3: 0.1 }, 9.832],
  ['0.1 mol NaOH', { NaOH: 0.1 }, 12.884],
  ['0.5 mol NaOH', { NaOH: 0.5 }, 13.529],
];

/** °C and pKw at 0.101325 MPa. */
export const WATER: readonly (readonly [temperature_C: number, pKw: number])[] = [
  [0, 14.9465],
  [25, 13.9944],
  [60, 13.0206],
];

/** Salt, molality, mean activity coefficient at 25 °C. */
export const ACTIVITY: readonly (readonly [salt: 'HCl' | 'NaCl', molality: number, gamma: number])[] = [
  ['HCl', 0.1, 0.797],
  ['HCl', 0.5, 0.759],
  ['HCl', 1, 0.811],
  ['NaCl', 0.1, 0.779],
  ['NaCl', 0.5, 0.681],
  ['NaCl', 1, 0.657],
];

/** A solution that holds one kilogram of water at 25 °C. */
const ofOneKilogram = (mixture: Mixture) =>
  createSolution({
    parts: Object.entries(mixture).map(([substance, amount_mol]) => ({ substance, amount_mol })),
    volume_mL: 1000 / waterDensity(25),
  });

function meanGamma(salt: 'HCl' | 'NaCl', molality: number): number {
  const { system, names } = solveInto(ofOneKilogram({ [salt]: molality }), 'real', 'sit');
  const of = (ion: string) => system.lnGamma[names.indexOf(ion)]!;
  return Math.exp((of(salt === 'HCl' ? 'H3O+' : 'Na+') + of('Cl-')) / 2);
}

/** The tables, computed now. */
export const comparisons = (): readonly Comparison[] => [
  {
    id: 'standards',
    title: 'Standard buffers at 25 °C, mol in a kilogram of water',
    unit: 'pH',
    decimals: 2,
    source: 'European Pharmacopoeia 5.0 (2004), chapter 2.2.3',
    rows: STANDARDS.map(([name, , mixture, published]) => ({
      name,
      published,
      ours: solve(ofOneKilogram(mixture), 'real').pH,
    })),
  },
  {
    id: 'pitzer',
    title: 'Concentrated solutions at 25 °C, in a kilogram of water',
    unit: 'pH',
    decimals: 3,
    source: 'Pitzer model, PHREEQC 3.8.9 with pitzer.dat',
    rows: PITZER.map(([name, mixture, published]) => ({
      name,
      published,
      ours: solve(ofOneKilogram(mixture), 'real').pH,
    })),
  },
  {
    id: 'water',
    title: 'Pure water',
    unit: 'pKw',
    decimals: 4,
    source: 'IAPWS R11-24 (2024)',
    rows: WATER.map(([T, published]) => ({ name: `${T} °C`, published, ours: pKw(T) })),
  },
  {
    id: 'activity',
    title: 'Mean activity coefficients at 25 °C',
    unit: 'γ±',
    decimals: 3,
    source: 'HCl: CRC Handbook, 92nd ed. (2011); NaCl: Hamer and Wu, J. Phys. Chem. Ref. Data 1 (1972) 1047',
    rows: ACTIVITY.map(([salt, molality, published]) => ({
      name: `${salt} ${molality} mol/kg`,
      published,
      ours: meanGamma(salt, molality),
    })),
  },
];
