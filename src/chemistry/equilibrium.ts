/** pH and species of a solution: the one question that every other room asks. */
import { CARBONIC, solveInto, type CompiledSystem } from './compiled.ts';
import type { Activity } from './system.ts';
import type { Equilibrium, Model, Solution, Species } from './types.ts';
import { warningsFor } from './warnings.ts';

/** Activity coefficients that a model uses where the caller names none. */
const usual = (model: Model): Activity => (model === 'textbook' ? 'none' : 'sit');

/**
 * pH and species of a solution: charge balance in pH with the mass balances of every acid family, water's own ions and the
 * indicators.
 *
 * Textbook: activities are concentrations (mol/L), pKw is 14.00, pKa those at 25 °C. Real: specific ion interaction theory on the
 * molal scale, pKw of IAPWS R11-24 and pKa at the solution's temperature; one litre counts as the density of pure water in
 * kilograms of water, which at 1 mol/L is off by 2 to 4 % or less than 0.02 in pH.
 * @param options.activity other activity coefficients for comparison: 'davies', 'none'
 * @returns species of every component, mol; worked out when they are read
 * @throws ChemistryError where the volume is 0, an amount is no amount, a component is unknown or the temperature lies outside 0
 *   to 60 °C
 */
export function solve(
  solution: Solution,
  model: Model,
  options?: { readonly activity?: Activity },
): Equilibrium {
  const compiled = solveInto(solution, model, options?.activity ?? usual(model));
  const { system } = compiled;
  const kg = solution.volume_nL * 1e-9 * compiled.density;
  return new Answer(
    solution,
    model,
    compiled,
    system.pH,
    system.ionicStrength * compiled.density,
    system.molality.slice(),
    kg,
  );
}

/** pH alone, for searches that ask thousands of times. @throws as `solve` does */
export const pHOf = (solution: Solution, model: Model): number =>
  solveInto(solution, model, usual(model)).system.pH;

/**
 * All carbonate in a solution, in every form, mol; in an open one as much as its gas holds there.
 * @throws as `solve` does
 */
export function carbonateOf(solution: Solution, model: Model): number {
  if (!solution.gas) return solution.amounts[CARBONIC] ?? 0;
  const { species } = solve(solution, model);
  return species.reduce((sum, s) => (s.component === CARBONIC ? sum + s.amount_mol : sum), 0);
}

class Answer implements Equilibrium {
  readonly model: Model;
  readonly pH: number;
  readonly ionicStrength: number;
  readonly #solution: Solution;
  readonly #compiled: CompiledSystem;
  readonly #molality: Float64Array;
  readonly #kg: number;
  #species: readonly Species[] | undefined;

  constructor(
    solution: Solution,
    model: Model,
    compiled: CompiledSystem,
    pH: number,
    ionicStrength: number,
    molality: Float64Array,
    kg: number,
  ) {
    this.model = model;
    this.pH = pH;
    this.ionicStrength = ionicStrength;
    this.#solution = solution;
    this.#compiled = compiled;
    this.#molality = molality;
    this.#kg = kg;
  }

  get species(): readonly Species[] {
    const { names, components, system } = this.#compiled;
    return (this.#species ??= names.map((name, i) => ({
      name,
      component: components[i]!,
      charge: system.charges[i]!,
      amount_mol: this.#molality[i]! * this.#kg,
    })));
  }

  get warnings(): readonly string[] {
    return warningsFor(this.#solution, this.model, this.ionicStrength, this.#compiled.families);
  }

  toJSON(): Equilibrium {
    const { model, pH, ionicStrength, species, warnings } = this;
    return { model, pH, ionicStrength, species, warnings };
  }
}
