/**
 * Acid families: stepwise pKa from the most protonated form on, with ΔrH° (kJ/mol) and ΔrCp° (J/(K mol)), at 25 °C and I = 0.
 * The source of every row stands in data/familySources.ts. ΔrCp° is left out where nobody was found to give it.
 */
export interface Step {
  readonly pKa: number;
  readonly dH: number;
  readonly dCp: number;
}

/** An acid family as the solver sees it: pKa at a temperature are filled in by the model. */
export interface AcidFamily {
  readonly id: string;
  /** Of the acid, as it is said in a sentence. */
  readonly name: string;
  /** Charge of the most protonated form. */
  readonly charge: number;
  /** Formulae from the most protonated form on, one more than steps. */
  readonly forms: readonly string[];
  readonly steps: readonly Step[];
}

type Row = readonly [pKa: number, dH?: number, dCp?: number];

const family = (id: string, name: string, charge: number, forms: string, ...rows: Row[]): AcidFamily => ({
  id,
  name,
  charge,
  forms: forms.split(' '),
  steps: rows.map(([pKa, dH = 0, dCp = 0]) => ({ pKa, dH, dCp })),
});

const all: readonly AcidFamily[] = [
  family(
    'phosphoric',
    'phosphoric acid',
    0,
    'H3PO4 H2PO4- HPO4-2 PO4-3',
    [2.148, -8, -141],
    [7.198, 3.6, -230],
    [12.35, 16, -242],
  ),
  family('ethanoic', 'ethanoic acid', 0, 'CH3COOH CH3COO-', [4.756, -0.41, -142]),
  family(
    'citric',
    'citric acid',
    0,
    'H3C6H5O7 H2C6H5O7- HC6H5O7-2 C6H5O7-3',
    [3.128, 4.07, -131],
    [4.761, 2.23, -178],
    [6.396, -3.38, -254],
  ),
  family('carbonic', 'carbonic acid', 0, 'CO2 HCO3- CO3-2', [6.351, 9.15, -371], [10.329, 14.7, -249]),
  family('ammonium', 'ammonium ion', 1, 'NH4+ NH3', [9.245, 51.95, 8]),
  family('boric', 'boric acid', 0, 'B(OH)3 B(OH)4-', [9.237, 13.8, -240]),
  family('tris', 'tris', 1, 'trisH+ tris', [8.072, 47.45, -59]),
  family(
    'phthalic',
    'phthalic acid',
    0,
    'H2C8H4O4 HC8H4O4- C8H4O4-2',
    [2.95, -2.7, -91],
    [5.408, -2.17, -295],
  ),
  family('methanoic', 'methanoic acid', 0, 'HCOOH HCOO-', [3.751, -0.1]),
  family('lactic', 'lactic acid', 0, 'C2H4(OH)COOH C2H4(OH)COO-', [3.86, -0.3]),
  family('glycine', 'glycine', 1, 'H2gly+ Hgly gly-', [2.351, 4, -139], [9.78, 44.2, -57]),
  family('hepes', 'HEPES', 1, 'H2HEPES+ HHEPES HEPES-', [3], [7.564, 20.4, 47]),
  family('mes', 'MES', 0, 'HMES MES-', [6.27, 14.8, 5]),
  family('sulfuric', 'hydrogensulfate ion', -1, 'HSO4- SO4-2', [1.987, -22.4, -258]),
  family('oxalic', 'oxalic acid', 0, 'H2C2O4 HC2O4- C2O4-2', [1.27, -3.9, -231], [4.266, -7, -231]),
  family(
    'tartaric',
    'tartaric acid',
    0,
    'H2C4H4O6 HC4H4O6- C4H4O6-2',
    [3.036, 3.19, -147],
    [4.366, 0.93, -218],
  ),
  family('hypochlorous', 'hypochlorous acid', 0, 'HOCl OCl-', [7.53, 13.9]),
  family('succinic', 'succinic acid', 0, 'H2C4H4O4 HC4H4O4- C4H4O4-2', [4.207, 3, -121], [5.636, -0.5, -217]),
  family('imidazole', 'imidazole', 1, 'C3H5N2+ C3H4N2', [6.993, 36.64, -9]),
  family('bicine', 'bicine', 0, 'Hbicine bicine-', [8.334, 26.34, 0]),
  family('tricine', 'tricine', 0, 'Htricine tricine-', [8.135, 31.37, -53]),
  family('ches', 'CHES', 0, 'HCHES CHES-', [9.394, 39.55, 9]),
  family('caps', 'CAPS', 0, 'HCAPS CAPS-', [10.499, 48.1, 57]),
  family('benzoic', 'benzoic acid', 0, 'C6H5COOH C6H5COO-', [4.202, 0.5]),
  family('propanoic', 'propanoic acid', 0, 'C2H5COOH C2H5COO-', [4.874, -0.7]),
  family('malic', 'malic acid', 0, 'H2C4H4O5 HC4H4O5- C4H4O5-2', [3.46, 2.9], [5.1, -1.2]),
  family('ascorbic', 'ascorbic acid', 0, 'H2C6H6O6 HC6H6O6- C6H6O6-2', [4.17], [11.57]),
  family('edta', 'EDTA', 0, 'H4Y H3Y- H2Y-2 HY-3 Y-4', [2], [2.68], [6.11], [10.17]),
  family(
    'pyrophosphoric',
    'pyrophosphoric acid',
    0,
    'H4P2O7 H3P2O7- H2P2O7-2 HP2O7-3 P2O7-4',
    [0.91],
    [2.1],
    [6.7],
    [9.32],
  ),
];

export const families: Readonly<Record<string, AcidFamily>> = Object.fromEntries(all.map((f) => [f.id, f]));
