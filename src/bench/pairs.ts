/** Weak acids and their conjugate bases in a liquid, by amount: for the pair bar and for aims on a ratio. */
import type { Model, Solution, Species } from '../chemistry/types.ts';
import { solve } from './liquid.ts';

export interface Pair {
  /** Component id of the acid family. */
  readonly family: string;
  readonly acid: string;
  readonly base: string;
  readonly acid_mmol: number;
  readonly base_mmol: number;
}

/** Less than this is not in the bottle: rounding of a balance, not chemistry. */
const LEAST_MMOL = 1e-9;

/**
 * Every conjugate pair, for families of several steps one pair for each step. Water's own ions are no pair.
 * @returns in the order of the species
 */
export function pairsOf(liquid: Solution, model: Model): Pair[] {
  if (liquid.volume_nL === 0) return [];
  const families = new Map<string, Species[]>();
  for (const s of solve(liquid, model).species) {
    if (s.component === 'water') continue;
    families.set(s.component, [...(families.get(s.component) ?? []), s]);
  }
  return [...families].flatMap(([family, forms]) => {
    const steps = [...forms].sort((a, b) => b.charge - a.charge);
    return steps.slice(1).flatMap((base, i) => {
      const acid = steps[i];
      if (!acid) return [];
      const acid_mmol = acid.amount_mol * 1000;
      const base_mmol = base.amount_mol * 1000;
      return acid_mmol + base_mmol > LEAST_MMOL
        ? [{ family, acid: acid.name, base: base.name, acid_mmol, base_mmol }]
        : [];
    });
  });
}
