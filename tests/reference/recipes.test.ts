/** Published recipes of buffers: what the tables say they give, against what the real model says. */
import { describe, expect, test } from 'vitest';
import { createSolution, solve } from '../../src/chemistry/index.ts';
import { published, type Row } from './published.ts';

type Recipe = Row & {
  readonly table: string;
  readonly pH: number;
  readonly T_C?: number;
  readonly total_mL: number;
  readonly components: Readonly<Record<string, number>>;
};

/** 'KH2PO4_0.1M_mL': a substance, the strength of its solution in mol/L, and how many mL of it. */
const STOCK = /^(.+)_([\d.]+|M\/15)M?_mL$/;
const NAMES: Readonly<Record<string, string>> = {
  KHP: 'potassium hydrogenphthalate',
  acetic_acid: 'acetic acid',
  sodium_acetate: 'sodium acetate',
};

function made(recipe: Recipe) {
  const parts = Object.entries(recipe.components).map(([key, mL]) => {
    const [, name, strength] = STOCK.exec(key)!;
    const concentration = strength === 'M/15' ? 1 / 15 : Number(strength);
    return { substance: NAMES[name!] ?? name!, amount_mol: (concentration * mL) / 1000 };
  });
  return createSolution({ parts, volume_mL: recipe.total_mL, temperature_C: recipe.T_C ?? 25 });
}

/** How far the tables agree with theory; older ones carry the old pH scale's + 0.04 to + 0.06. */
const BOUNDS: Readonly<Record<string, number>> = {
  'Bower-Bates KCl-HCl': 0.03,
  'Bower-Bates phthalate-HCl': 0.03,
  'Bower-Bates KH2PO4-NaOH': 0.04,
  'Gomori 0.1 M sodium phosphate': 0.06,
  'Sorensen phosphate M/15': 0.07,
  'Walpole acetate 0.1 N': 0.07,
  'Clark-Lubs KH2PO4-NaOH': 0.07,
};
const rows = published<Omit<Recipe, keyof Row>>(3, 'recipe') as Recipe[];

describe.each(Object.entries(BOUNDS))('%s', (table, bound) => {
  const recipes = rows.filter((row) => row.table === table);
  test('is in the tables', () => expect(recipes.length).toBeGreaterThan(6));
  test.each(recipes.map((recipe) => [recipe.pH, recipe] as const))('pH %d', (pH, recipe) => {
    const solution = made(recipe);
    expect(Math.abs(solve(solution, 'real').pH - pH)).toBeLessThan(bound);
    expect(Math.abs(solve(solution, 'real', { activity: 'davies' }).pH - pH)).toBeLessThan(bound);
  });
});
