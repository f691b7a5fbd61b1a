/** How sure a prepared solution is: glassware and balance into concentration, concentrations into pH. */
import { pHOf } from '../equilibrium.ts';
import { checked } from '../errors.ts';
import type { Model, Solution } from '../types.ts';

/** A measured quantity with the tolerance of what it was measured in, in the same unit. */
export interface Measured {
  readonly value: number;
  readonly tolerance: number;
}

const relative = (field: string, { value, tolerance }: Measured): number =>
  checked(`${field}.tolerance`, tolerance, 'a tolerance') /
  checked(`${field}.value`, value, 'a number', Number.MIN_VALUE);

/**
 * Standard uncertainty of a concentration that is a product and quotient of measured quantities, each known within a tolerance: a
 * rectangular distribution, half-width / √3, added in quadrature.
 * JCGM 100:2008 (GUM), sections 4.3.7 and 5.1.6.
 * @returns relative: 0.003 is 0.3 %
 */
export function relativeUncertainty(factors: readonly Measured[]): number {
  return Math.sqrt(factors.reduce((sum, factor, i) => sum + relative(`factors[${i}]`, factor) ** 2 / 3, 0));
}

/**
 * Standard uncertainty of pH from that of each component's amount, by differences of one tenth of an uncertainty to both sides, added
 * in quadrature (GUM, section 5.1.3). It says nothing of the constants, nor of the meter.
 * @param relativeOf relative standard uncertainty of each component's amount; one that is left out counts as exact
 * @throws ChemistryError as `solve` does
 */
export function pHUncertainty(
  solution: Solution,
  model: Model,
  relativeOf: Readonly<Record<string, number>>,
): number {
  let sum = 0;
  for (const component in relativeOf) {
    const n = solution.amounts[component];
    const u = checked(`relativeOf.${component}`, relativeOf[component], 'a relative uncertainty', 0, 1);
    if (n === undefined || n === 0 || u === 0) continue;
    const step = u / 10;
    const at = (factor: number) =>
      pHOf({ ...solution, amounts: { ...solution.amounts, [component]: n * factor } }, model);
    const slope = (at(1 + step) - at(1 - step)) / (2 * step);
    sum += (slope * u) ** 2;
  }
  return Math.sqrt(sum);
}
