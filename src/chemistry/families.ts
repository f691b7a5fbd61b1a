/** Acid families: stepwise pKa from the most protonated form on, ΔrH° (kJ/mol) and ΔrCp° (J/(K mol)) at 25 °C, I = 0.
 * Goldberg R.N., Kishore N., Lennen R.M., J. Phys. Chem. Ref. Data 31 (2002) 231, section 8, where not marked otherwise. */
import type { AcidFamily } from './components';

export const families: Readonly<Record<string, AcidFamily>> = {
  phosphoric: {
    id: 'phosphoric',
    charge: 0,
    forms: ['H3PO4', 'H2PO4-', 'HPO4-2', 'PO4-3'],
    steps: [
      { pKa: 2.148, dH: -8.0, dCp: -141 }, // from memory
      { pKa: 7.198, dH: 3.6, dCp: -230 },
      { pKa: 12.35, dH: 16.0, dCp: -242 }, // from memory
    ],
  },
  ethanoic: {
    id: 'ethanoic',
    charge: 0,
    forms: ['CH3COOH', 'CH3COO-'],
    steps: [{ pKa: 4.756, dH: -0.41, dCp: -142 }],
  },
  citric: {
    id: 'citric',
    charge: 0,
    forms: ['H3C6H5O7', 'H2C6H5O7-', 'HC6H5O7-2', 'C6H5O7-3'],
    steps: [
      { pKa: 3.128, dH: 4.07, dCp: -131 },
      { pKa: 4.761, dH: 2.23, dCp: -178 },
      { pKa: 6.396, dH: -3.38, dCp: -254 },
    ],
  },
  carbonic: {
    id: 'carbonic',
    charge: 0,
    forms: ['CO2', 'HCO3-', 'CO3-2'],
    steps: [
      { pKa: 6.351, dH: 9.15, dCp: -371 }, // from memory
      { pKa: 10.329, dH: 14.7, dCp: -249 },
    ],
  },
  ammonium: { id: 'ammonium', charge: 1, forms: ['NH4+', 'NH3'], steps: [{ pKa: 9.245, dH: 51.95, dCp: 8 }] },
  boric: {
    id: 'boric',
    charge: 0,
    forms: ['B(OH)3', 'B(OH)4-'],
    steps: [{ pKa: 9.237, dH: 13.8, dCp: -240 }],
  },
  tris: { id: 'tris', charge: 1, forms: ['trisH+', 'tris'], steps: [{ pKa: 8.072, dH: 47.45, dCp: -59 }] },
  phthalic: {
    id: 'phthalic',
    charge: 0,
    forms: ['H2C8H4O4', 'HC8H4O4-', 'C8H4O4-2'],
    steps: [
      { pKa: 2.95, dH: -2.7, dCp: -91 }, // from memory
      { pKa: 5.408, dH: -2.17, dCp: -295 }, // from memory
    ],
  },
  methanoic: {
    id: 'methanoic',
    charge: 0,
    forms: ['HCOOH', 'HCOO-'],
    steps: [
      { pKa: 3.751, dH: -0.1, dCp: 0 }, // from memory
    ],
  },
  lactic: {
    id: 'lactic',
    charge: 0,
    forms: ['C2H4(OH)COOH', 'C2H4(OH)COO-'],
    steps: [
      { pKa: 3.86, dH: -0.3, dCp: 0 }, // from memory
    ],
  },
  glycine: {
    id: 'glycine',
    charge: 1,
    forms: ['H2gly+', 'Hgly', 'gly-'],
    steps: [
      { pKa: 2.351, dH: 4.0, dCp: -139 }, // from memory
      { pKa: 9.78, dH: 44.2, dCp: -57 },
    ],
  },
  hepes: {
    id: 'hepes',
    charge: 1,
    forms: ['H2HEPES+', 'HHEPES', 'HEPES-'],
    steps: [
      { pKa: 3.0, dH: 0, dCp: 0 }, // from memory
      { pKa: 7.564, dH: 20.4, dCp: 47 },
    ],
  },
  mes: { id: 'mes', charge: 0, forms: ['HMES', 'MES-'], steps: [{ pKa: 6.27, dH: 14.8, dCp: 5 }] },
  sulfuric: {
    id: 'sulfuric',
    charge: -1,
    forms: ['HSO4-', 'SO4-2'],
    steps: [
      { pKa: 1.987, dH: -22.4, dCp: -258 }, // from memory
    ],
  },
  oxalic: {
    id: 'oxalic',
    charge: 0,
    forms: ['H2C2O4', 'HC2O4-', 'C2O4-2'],
    steps: [
      { pKa: 1.27, dH: -3.9, dCp: -231 }, // from memory
      { pKa: 4.266, dH: -7.0, dCp: -231 }, // from memory
    ],
  },
  tartaric: {
    id: 'tartaric',
    charge: 0,
    forms: ['H2C4H4O6', 'HC4H4O6-', 'C4H4O6-2'],
    steps: [
      { pKa: 3.036, dH: 3.19, dCp: -147 }, // from memory
      { pKa: 4.366, dH: 0.93, dCp: -218 }, // from memory
    ],
  },
  hypochlorous: {
    id: 'hypochlorous',
    charge: 0,
    forms: ['HOCl', 'OCl-'],
    steps: [{ pKa: 7.53, dH: 13.9, dCp: 0 }],
  }, // from memory
};
