/** Room left: how much strong acid and strong base a buffer takes before its pH leaves pKa ± 1. */
import { solve } from './equilibrium.ts';
import { checked } from './errors.ts';
import { families } from './families.ts';
import { createSolution, mix } from './solution.ts';
import type { Model, Solution } from './types.ts';

export interface Room {
  /** Strong acid or base, mol. */
  readonly amount_mol: number;
  /** The same as titrant, mL. */
  readonly volume_mL: number;
  /** What ends it: the ratio of the partners passes 1 : 10 or 10 : 1, or the vessel is full before. */
  readonly endedBy: 'ratio' | 'space';
}

export interface RoomLeft {
  /** Id of the acid family, and the names of the two partners. */
  readonly family: string;
  readonly acid: string;
  readonly base: string;
  readonly forAcid: Room;
  readonly forBase: Room;
}

/** One pH unit either side of pKa is a ratio of ten between the partners (Henderson L.J., Am. J. Physiol. 21 (1908) 173). */
const RATIO = 10;
const HALVINGS = 60;

interface Pair {
  readonly family: string;
  readonly acid: string;
  readonly base: string;
  readonly acid_mol: number;
  readonly base_mol: number;
}

/** Neighbouring forms of every acid family in a solution, indicators left out: there is too little of them to hold a pH. */
function pairsIn(solution: Solution, model: Model): Pair[] {
  const { species } = solve(solution, model);
  const pairs: Pair[] = [];
  for (const [i, one] of species.entries()) {
    const next = species[i + 1];
    if (!next || next.component !== one.component || one.component === 'water') continue;
    if (!Object.hasOwn(families, one.component)) continue;
    pairs.push({
      family: one.component,
      acid: one.name,
      base: next.name,
      acid_mol: one.amount_mol,
      base_mol: next.amount_mol,
    });
  }
  return pairs;
}

/**
 * How much strong acid and strong base a buffer takes before one partner outnumbers the other ten to one.
 * @param options.titrant_molL concentration of the acid (HCl) and base (NaOH) that is added, mol/L, above 0 (default 0.1)
 * @param options.space_mL what the vessel still takes, mL, 0 or more (default: as much as one likes)
 * @returns null where no pair stands between 1 : 10 and 10 : 1: then it buffers nothing
 * @throws ChemistryError as `solve` does, and where an option is no such number
 */
export function roomLeft(
  solution: Solution,
  model: Model,
  options: { readonly titrant_molL?: number; readonly space_mL?: number } = {},
): RoomLeft | null {
  const strength = checked(
    'titrant_molL',
    options.titrant_molL ?? 0.1,
    'a number of mol/L',
    Number.MIN_VALUE,
  );
  const space_mL =
    options.space_mL === undefined ? Infinity : checked('space_mL', options.space_mL, 'a number of mL', 0);
  const pair = pairsIn(solution, model)
    .filter(({ acid_mol, base_mol }) => base_mol <= RATIO * acid_mol && acid_mol <= RATIO * base_mol)
    .sort((a, b) => Math.min(b.acid_mol, b.base_mol) - Math.min(a.acid_mol, a.base_mol))[0];
  if (!pair) return null;
  const after = (substance: 'HCl' | 'NaOH', volume_mL: number): Pair =>
    pairsIn(
      mix(
        solution,
        createSolution({
          parts: [{ substance, concentration_molL: strength }],
          volume_mL,
          temperature_C: solution.temperature_C,
        }),
      ),
      model,
    ).find(({ acid, base }) => acid === pair.acid && base === pair.base)!;
  const room = (substance: 'HCl' | 'NaOH'): Room => {
    const within = (volume_mL: number): boolean => {
      if (volume_mL < 1e-6) return true;
      const { acid_mol, base_mol } = after(substance, volume_mL);
      return substance === 'HCl' ? acid_mol <= RATIO * base_mol : base_mol <= RATIO * acid_mol;
    };
    const told = (volume_mL: number, endedBy: Room['endedBy']): Room => ({
      amount_mol: (volume_mL / 1000) * strength,
      volume_mL,
      endedBy,
    });
    // As much as turns every molecule of one partner is more than enough, and so is what fits.
    let high = (1000 * 2 * (pair.acid_mol + pair.base_mol)) / strength;
    while (high < space_mL && within(high)) high *= 2;
    if (high >= space_mL && within(space_mL)) return told(space_mL, 'space');
    high = Math.min(high, space_mL);
    let low = 0;
    for (let i = 0; i < HALVINGS; i++) {
      const middle = (low + high) / 2;
      if (within(middle)) low = middle;
      else high = middle;
    }
    return told(low, 'ratio');
  };
  const { family, acid, base } = pair;
  return { family, acid, base, forAcid: room('HCl'), forBase: room('NaOH') };
}
