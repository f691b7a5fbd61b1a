/** What one mole of a substance adds to a solution. */
export interface Substance {
  readonly formula: string;
  readonly names: readonly string[];
  readonly gives: Readonly<Record<string, number>>;
}

const s = (formula: string, names: string[], gives: Record<string, number>): Substance => ({
  formula,
  names,
  gives,
});

export const substances: readonly Substance[] = [
  s('HCl', ['hydrochloric acid', 'hydrogen chloride'], { 'Cl-': 1 }),
  s('NaOH', ['sodium hydroxide'], { 'Na+': 1 }),
  s('KOH', ['potassium hydroxide'], { 'K+': 1 }),
  s('CH3COOH', ['ethanoic acid', 'acetic acid'], { ethanoic: 1 }),
  s('CH3COONa', ['sodium ethanoate', 'sodium acetate'], { ethanoic: 1, 'Na+': 1 }),
  s('NaCl', ['sodium chloride'], { 'Na+': 1, 'Cl-': 1 }),
  s('NH3', ['ammonia'], { ammonium: 1 }),
  s('NH4Cl', ['ammonium chloride'], { ammonium: 1, 'Cl-': 1 }),
  s('NaHCO3', ['sodium hydrogencarbonate'], { 'Na+': 1, carbonic: 1 }),
];
const byName = new Map<string, Substance>();
for (const x of substances) for (const n of [x.formula, ...x.names]) byName.set(n.toLowerCase(), x);
export function findSubstance(name: string): Substance | undefined {
  return byName.get(name.toLowerCase());
}
