/** What a person should know about a computed number: constants used outside the range that they were fitted in. */
import type { AcidFamily } from './components.ts';
import { indicators } from './indicators.ts';
import type { Model, Solution } from './types.ts';

/** Ionic strength up to which the activity coefficients were tried against measured ones, mol/L. */
const TRIED_IONIC_STRENGTH = 1;
/** Distance from 25 °C above which a missing heat capacity may move pKa by a hundredth, K. */
const WITHOUT_HEAT_CAPACITY_K = 15;
/** Total borate above which polyborates matter, mol/L (Goldberg et al. 2002, boric acid). */
const POLYBORATE = 0.025;

/** Plain sentences; empty where every constant is used inside its range. */
export function warningsFor(
  solution: Solution,
  model: Model,
  ionicStrength: number,
  families: readonly AcidFamily[],
): string[] {
  if (model === 'textbook') return [];
  const warnings: string[] = [];
  const { temperature_C: t } = solution;
  if (ionicStrength > TRIED_IONIC_STRENGTH)
    warnings.push(
      `Activity coefficients are tried up to an ionic strength of 1 mol/L; this liquid has ${ionicStrength.toPrecision(2)} mol/L.`,
    );
  const boric = (solution.amounts['boric'] ?? 0) / (solution.volume_nL * 1e-9);
  if (boric > POLYBORATE)
    warnings.push('Above 0.025 mol/L boric acid forms polyborates, which are left out.');
  if (Math.abs(t - 25) > WITHOUT_HEAT_CAPACITY_K)
    for (const family of families) {
      if (Object.hasOwn(indicators, family.id))
        warnings.push(
          `The pKa of ${family.name} is that at 25 °C; how it follows the temperature is not known.`,
        );
      else if (family.steps.some((step) => step.dCp === 0))
        warnings.push(
          `The pKa of ${family.name} at ${Math.round(t)} °C is extrapolated without a heat capacity.`,
        );
    }
  return warnings;
}
