/** Chemical systems for the components of solutions, compiled once for each set of components and kept. */
import { carbonDioxideSolubility } from './henry.ts';
import { familyOf, strongIons, type AcidFamily } from './components.ts';
import { KELVIN, LN10, R, T25, TEMPERATURES_C } from './constants.ts';
import { ChemistryError } from './errors.ts';
import { sitEpsilon } from './sit.ts';
import { solveInPlace } from './solver.ts';
import { ChemicalSystem, type Activity, type InteractionPair } from './system.ts';
import type { Model, Solution } from './types.ts';
import { debyeHuckelA, pKw, waterDensity } from './water.ts';

export const CARBONIC = 'carbonic';

/** A chemical system with the names of its species. */
export interface CompiledSystem {
  readonly system: ChemicalSystem;
  readonly model: Model;
  /** True where carbon dioxide follows from a gas. */
  readonly open: boolean;
  /** Component ids in the order of the solution's amounts, and where each one's total stands in the system. */
  readonly ids: readonly string[];
  readonly slots: Int32Array;
  readonly families: readonly AcidFamily[];
  readonly names: readonly string[];
  readonly components: readonly string[];
  /** Temperature that the constants are set for, °C. */
  temperature_C: number;
  /** kg of water for each litre of liquid. */
  density: number;
  /** Solubility of carbon dioxide at that temperature, mol/(kg atm). */
  henry: number;
}

/**
 * pKa at a temperature from its values at 25 °C, with constant ΔrCp°.
 * Goldberg R.N., Kishore N., Lennen R.M., J. Phys. Chem. Ref. Data 31 (2002) 231, section 5.
 */
export function pKaAt(step: { pKa: number; dH: number; dCp: number }, temperature_C: number): number {
  const T = temperature_C + KELVIN;
  const dH = step.dH * 1000;
  return step.pKa + ((dH - step.dCp * T25) * (1 / T - 1 / T25) - step.dCp * Math.log(T / T25)) / (R * LN10);
}

function compile(ids: readonly string[], open: boolean, model: Model, activity: Activity): CompiledSystem {
  const families: AcidFamily[] = [];
  const ions: string[] = [];
  for (const id of ids) {
    const family = familyOf(id);
    if (family) families.push(family);
    else if (Object.hasOwn(strongIons, id)) ions.push(id);
    else throw new ChemistryError('amounts', `There is no component '${id}'.`);
  }
  if (open && !ids.includes(CARBONIC)) families.push(familyOf(CARBONIC)!);
  const names = ['H3O+', 'OH-'];
  const sitNames = ['H+', 'OH-'];
  const components = ['water', 'water'];
  const charges = [1, -1];
  for (const family of families)
    family.forms.forEach((form, k) => {
      names.push(form);
      sitNames.push(form);
      components.push(family.id);
      charges.push(family.charge - k);
    });
  for (const ion of ions) {
    names.push(ion);
    sitNames.push(ion);
    components.push(ion);
    charges.push(strongIons[ion]!);
  }
  const pairs: InteractionPair[] = [];
  if (activity === 'sit')
    for (let i = 0; i < names.length; i++)
      for (let j = i + 1; j < names.length; j++) {
        const epsilon = sitEpsilon(sitNames[i]!, charges[i]!, sitNames[j]!, charges[j]!);
        if (epsilon !== 0) pairs.push({ i, j, epsilon });
      }
  const inputs = families.map((f) => ({
    charge: f.charge,
    steps: f.steps.length,
    open: open && f.id === CARBONIC,
  }));
  const slots = Int32Array.from(ids, (id) => {
    const family = families.findIndex((f) => f.id === id);
    return family >= 0 ? family : families.length + ions.indexOf(id);
  });
  const system = new ChemicalSystem(
    inputs,
    ions.map((ion) => strongIons[ion]!),
    pairs,
  );
  system.activity = activity;
  return {
    system,
    model,
    open,
    ids,
    slots,
    families,
    names,
    components,
    temperature_C: NaN,
    density: 1,
    henry: 0,
  };
}

/** Sets the constants of a temperature; the textbook knows 25 °C alone. */
function warm(compiled: CompiledSystem, temperature_C: number): void {
  const { system, families, model } = compiled;
  compiled.temperature_C = temperature_C;
  const real = model === 'real';
  const pKa: number[] = [];
  for (const family of families)
    for (const step of family.steps) pKa.push(real ? pKaAt(step, temperature_C) : step.pKa);
  compiled.density = real ? waterDensity(temperature_C) : 1;
  compiled.henry = carbonDioxideSolubility(real ? temperature_C : 25);
  system.setConstants(
    pKa,
    real ? pKw(temperature_C) : 14,
    system.activity,
    system.activity === 'none' ? 0 : debyeHuckelA(temperature_C),
  );
}

const KEPT = 400;
const caches: Record<string, Map<string, CompiledSystem>> = {
  none: new Map(),
  sit: new Map(),
  davies: new Map(),
};

/** The system of the last solve for each kind of activity: a titration asks for the same one again and again. */
const newest: Record<string, CompiledSystem | undefined> = {};

/** True where a system has just these components, in this order, under this model. */
function fits(compiled: CompiledSystem, { amounts }: Solution, open: boolean, model: Model): boolean {
  if (compiled.open !== open || compiled.model !== model) return false;
  const { ids } = compiled;
  let i = 0;
  for (const id in amounts) if (ids[i++] !== id) return false;
  return i === ids.length;
}

/** The compiled system of a solution's components, with the constants of its temperature. */
function systemOf(solution: Solution, model: Model, activity: Activity): CompiledSystem {
  const open = solution.gas !== undefined;
  const last = newest[activity];
  const compiled = last && fits(last, solution, open, model) ? last : kept(solution, open, model, activity);
  newest[activity] = compiled;
  const temperature_C = model === 'real' ? solution.temperature_C : 25;
  if (compiled.temperature_C !== temperature_C) {
    if (!(temperature_C >= TEMPERATURES_C.from && temperature_C <= TEMPERATURES_C.to))
      throw new ChemistryError(
        'temperature_C',
        `The constants hold from ${TEMPERATURES_C.from} to ${TEMPERATURES_C.to} °C; found ${temperature_C} °C.`,
      );
    warm(compiled, temperature_C);
  }
  return compiled;
}

/** From the cache, or compiled and kept there. */
function kept(solution: Solution, open: boolean, model: Model, activity: Activity): CompiledSystem {
  let key = open ? 'open' : model === 'real' && activity === 'none' ? 'ideal' : '';
  for (const id in solution.amounts) key += `|${id}`;
  const cache = caches[activity]!;
  let compiled = cache.get(key);
  if (!compiled) {
    compiled = compile(Object.keys(solution.amounts), open, model, activity);
    if (cache.size >= KEPT) cache.clear();
    cache.set(key, compiled);
  }
  return compiled;
}

/**
 * Solves a solution and leaves the answer in the compiled system's own arrays, where the next solve of the same components
 * overwrites it. For callers who need one number of many solves: nothing is allocated once the system is compiled.
 */
export function solveInto(solution: Solution, model: Model, activity: Activity): CompiledSystem {
  if (!(solution.volume_nL > 0)) throw new ChemistryError('volume_nL', 'An empty vessel has no pH.');
  const compiled = systemOf(solution, model, activity);
  const { system, ids, slots } = compiled;
  const kg = solution.volume_nL * 1e-9 * compiled.density;
  for (let i = 0; i < ids.length; i++) {
    const amount = solution.amounts[ids[i]!]!;
    if (!(amount >= 0 && amount < Infinity))
      throw new ChemistryError(
        'amounts',
        `The amount of ${ids[i]} is a number of mol, 0 or more; found ${amount}.`,
      );
    system.totals[slots[i]!] = amount / kg;
  }
  system.gasMolality = solution.gas ? compiled.henry * solution.gas.co2_atm : 0;
  solveInPlace(system);
  return compiled;
}
