import { ChemistryError } from './errors';
import { indicatorData } from './indicatorData';
import { findSubstance } from './substances';
import type { Solution } from './types';

export interface Part {
  readonly substance: string;
  readonly concentration_molL?: number;
  readonly amount_mol?: number;
}

/** A solution from its parts, made up to a volume. */
export function createSolution(o: {
  parts: readonly Part[];
  volume_mL: number;
  temperature_C?: number;
}): Solution {
  if (!(o.volume_mL >= 0) || !Number.isFinite(o.volume_mL))
    throw new ChemistryError('volume_mL', 'A volume is a number of mL, 0 or more.');
  const amounts: Record<string, number> = {};
  for (const part of o.parts) {
    const substance = findSubstance(part.substance);
    if (!substance) throw new ChemistryError('substance', `There is no substance '${part.substance}'.`);
    const n = part.amount_mol ?? ((part.concentration_molL ?? NaN) * o.volume_mL) / 1000;
    if (!(n >= 0) || !Number.isFinite(n))
      throw new ChemistryError('amount_mol', 'An amount is a number of mol, 0 or more.');
    for (const [c, k] of Object.entries(substance.gives)) amounts[c] = (amounts[c] ?? 0) + k * n;
  }
  return { volume_nL: Math.round(o.volume_mL * 1e6), temperature_C: o.temperature_C ?? 25, amounts };
}

/** Pure water: boiled and cooled (no carbon dioxide), aired (420 ppm) or sparkling. */
export function water(
  kind: 'boiled' | 'aired' | 'sparkling',
  volume_mL: number,
  temperature_C = 25,
): Solution {
  const co2 = { boiled: 0, aired: 1.43e-5, sparkling: 0.12 }[kind];
  return {
    volume_nL: Math.round(volume_mL * 1e6),
    temperature_C,
    amounts: co2 ? { carbonic: (co2 * volume_mL) / 1000 } : {},
  };
}

/** Aqueous stock of an indicator as its fully neutralised sodium salt; mass percent counts the acid form. */
export function indicatorStock(
  id: string,
  o: { massPercent?: number; volume_mL: number; temperature_C?: number },
): Solution {
  const d = indicatorData[id];
  if (!d) throw new ChemistryError('indicator', `There is no indicator '${id}'.`);
  const n = ((o.massPercent ?? 0.1) / 100 / d.molarMass) * o.volume_mL;
  const sodium = d.pKa.length - d.charge;
  return {
    volume_nL: Math.round(o.volume_mL * 1e6),
    temperature_C: o.temperature_C ?? 25,
    amounts: { [id]: n, 'Na+': sodium * n },
  };
}

/** Adds amounts and volumes; temperatures are volume-weighted. */
export function mix(a: Solution, b: Solution): Solution {
  if (a.volume_nL === 0) return b;
  if (b.volume_nL === 0) return a;
  const amounts: Record<string, number> = { ...a.amounts };
  for (const [c, n] of Object.entries(b.amounts)) amounts[c] = (amounts[c] ?? 0) + n;
  const volume_nL = a.volume_nL + b.volume_nL;
  return {
    volume_nL,
    temperature_C: (a.temperature_C * a.volume_nL + b.temperature_C * b.volume_nL) / volume_nL,
    amounts,
  };
}

/** Parts a solution without changing its concentrations. */
export function take(s: Solution, volume_nL: number): { taken: Solution; left: Solution } {
  if (!(volume_nL >= 0 && volume_nL <= s.volume_nL))
    throw new ChemistryError('volume_nL', 'More than there is cannot be taken.');
  const f = s.volume_nL === 0 ? 0 : volume_nL / s.volume_nL;
  const taken: Record<string, number> = {};
  const left: Record<string, number> = {};
  for (const [c, n] of Object.entries(s.amounts)) {
    taken[c] = n * f;
    left[c] = n - n * f;
  }
  return {
    taken: { ...s, volume_nL, amounts: taken },
    left: { ...s, volume_nL: s.volume_nL - volume_nL, amounts: left },
  };
}
