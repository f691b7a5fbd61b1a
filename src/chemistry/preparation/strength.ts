/** Mass percent and mol/L, one from the other, by the density of the solution at 20 °C. */
import { densities } from '../data/densities.ts';
import { checked } from '../errors.ts';
import { waterDensity } from '../water.ts';
import { molarMass } from './molarMass.ts';

/**
 * Density of a solution of one substance at 20 °C, g/mL: straight between the handbook's rows, from pure water on and level beyond the
 * last. A substance that is not in the handbook counts as 0.007 g/mL more for each percent, the usual slope of salts (from memory).
 * @param formula of the anhydrous substance
 * @param massPercent 0 to 100
 */
export function solutionDensity(formula: string, massPercent: number): number {
  checked('massPercent', massPercent, 'a percentage', 0, 100);
  const water = waterDensity(20);
  const rows = Object.hasOwn(densities, formula) ? densities[formula] : undefined;
  if (!rows) return water + 0.007 * massPercent;
  let [percent, density]: readonly [number, number] = [0, water];
  for (const [nextPercent, nextDensity] of rows) {
    if (massPercent <= nextPercent)
      return density + ((nextDensity - density) * (massPercent - percent)) / (nextPercent - percent);
    [percent, density] = [nextPercent, nextDensity];
  }
  return density;
}

/** mol/L of a mass percentage at 20 °C. @throws ChemistryError as `molarMass` and for a percentage outside 0 to 100 */
export const molarityOf = (formula: string, massPercent: number): number =>
  (10 * massPercent * solutionDensity(formula, massPercent)) / molarMass(formula);

/** Mass percentage of a concentration at 20 °C, at most 100. @throws ChemistryError for a concentration below 0 */
export function massPercentOf(formula: string, concentration_molL: number): number {
  checked('concentration_molL', concentration_molL, 'a number of mol/L');
  if (concentration_molL >= molarityOf(formula, 100)) return 100;
  let low = 0;
  let high = 100;
  while (high - low > 1e-10) {
    const middle = (low + high) / 2;
    if (molarityOf(formula, middle) < concentration_molL) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
