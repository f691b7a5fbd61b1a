/** Buffer capacity: how much strong base moves a liquid's pH by one unit. */
import { solveInto } from './compiled.ts';
import { LN10 } from './constants.ts';
import type { ChemicalSystem } from './system.ts';
import type { Model, Solution } from './types.ts';

/**
 * Buffer capacity of a solved system, mol/kg and unit of pH: ln 10 times the variance of every family's charge and water's own ions,
 * at constant activity coefficients. An open family also gains what its gas dissolves.
 * Van Slyke D.D., J. Biol. Chem. 52 (1922) 525.
 */
export function capacityInPlace(s: ChemicalSystem): number {
  const { molality: m, first, steps, open } = s;
  let sum = m[0]! + m[1]!;
  for (let f = 0; f < first.length; f++) {
    let total = 0;
    let mean = 0;
    let square = 0;
    for (let k = 0; k <= steps[f]!; k++) {
      const n = m[first[f]! + k]!;
      total += n;
      mean += k * n;
      square += k * k * n;
    }
    if (total > 0) sum += open[f] ? square : square - (mean * mean) / total;
  }
  return LN10 * sum;
}

/**
 * Buffer capacity of a solution, mol of strong base for each litre and unit of pH: the slope of strong base added against pH at this
 * point, at constant activity coefficients.
 * @throws ChemistryError as `solve` does
 */
export function bufferCapacity(solution: Solution, model: Model): number {
  const compiled = solveInto(solution, model, model === 'textbook' ? 'none' : 'sit');
  return capacityInPlace(compiled.system) * compiled.density;
}
