import { ChemistryError } from './errors';
import { familyOf, strongIons, type AcidFamily } from './components';
import { sitEpsilon } from './sit';
import type { Equilibrium, Model, Solution, Species } from './types';
import { debyeHuckelA, pKw, waterDensity } from './water';

const LN10 = Math.LN10;
const R = 8.31446; // J/(K mol), CODATA 2018
const T25 = 298.15;

/** pKa at T from 25 °C values; Goldberg et al. 2002, equation of section 5 (ΔrCp° constant). */
function pKaAt(step: { pKa: number; dH: number; dCp: number }, T: number): number {
  const dH = step.dH * 1000;
  return step.pKa + ((dH - step.dCp * T25) * (1 / T - 1 / T25) - step.dCp * Math.log(T / T25)) / (R * LN10);
}

/** Everything about a set of components at one temperature and model that does not depend on amounts. */
interface System {
  readonly ids: readonly string[];
  readonly acids: { family: AcidFamily; index: number; pKa: Float64Array; first: number }[];
  readonly strong: { index: number; charge: number; species: number }[];
  readonly names: string[];
  readonly charges: Float64Array;
  readonly component: string[];
  readonly pKw: number;
  readonly A: number;
  readonly density: number;
  /** Sparse interaction pairs: species i, species j, epsilon. */
  readonly pairs: { i: number; j: number; epsilon: number }[];
  readonly molality: Float64Array;
  readonly logGamma: Float64Array;
}

const systems = new Map<string, System>();

function systemFor(ids: readonly string[], temperature_C: number, model: Model): System {
  const key = `${model}|${temperature_C}|${ids.join()}`;
  const known = systems.get(key);
  if (known) return known;
  const T = temperature_C + 273.15;
  const names = ['H+', 'OH-'];
  const charges = [1, -1];
  const component = ['water', 'water'];
  const acids: System['acids'] = [];
  const strong: System['strong'] = [];
  ids.forEach((id, index) => {
    const family = familyOf(id);
    if (family) {
      acids.push({
        family,
        index,
        first: names.length,
        pKa: Float64Array.from(family.steps, (s) => (model === 'real' ? pKaAt(s, T) : s.pKa)),
      });
      family.forms.forEach((form, k) => {
        names.push(form);
        charges.push(family.charge - k);
        component.push(id);
      });
    } else {
      const charge = strongIons[id];
      if (charge === undefined) throw new ChemistryError('component', `There is no component '${id}'.`);
      strong.push({ index, charge, species: names.length });
      names.push(id);
      charges.push(charge);
      component.push(id);
    }
  });
  const pairs: System['pairs'] = [];
  for (let i = 0; i < names.length; i++)
    for (let j = i + 1; j < names.length; j++) {
      const epsilon = sitEpsilon(names[i]!, charges[i]!, names[j]!, charges[j]!);
      if (epsilon !== 0) pairs.push({ i, j, epsilon });
    }
  const real = model === 'real';
  const system: System = {
    ids,
    acids,
    strong,
    names,
    charges: Float64Array.from(charges),
    component,
    pKw: real ? pKw(temperature_C) : 14,
    A: real ? debyeHuckelA(temperature_C) : 0,
    density: real ? waterDensity(temperature_C) : 1,
    pairs,
    molality: new Float64Array(names.length),
    logGamma: new Float64Array(names.length),
  };
  if (systems.size > 500) systems.clear();
  systems.set(key, system);
  return system;
}

/** Activity coefficients (log10) of every species for the molalities held in the system. */
function updateActivities(s: System, ionicStrength: number): void {
  const root = Math.sqrt(ionicStrength);
  const dh = (s.A * root) / (1 + 1.5 * root);
  for (let i = 0; i < s.charges.length; i++) {
    const z = s.charges[i]!;
    s.logGamma[i] = -z * z * dh;
  }
  for (const { i, j, epsilon } of s.pairs) {
    s.logGamma[i]! += epsilon * s.molality[j]!;
    s.logGamma[j]! += epsilon * s.molality[i]!;
  }
}

/** Fills molalities at a pH; returns net charge (mol/kg) and leaves its derivative in `slope`. */
let slope = 0;
function netCharge(s: System, pH: number, totals: Float64Array): number {
  const m = s.molality;
  const g = s.logGamma;
  const h = 10 ** (-pH - g[0]!);
  const oh = 10 ** (pH - s.pKw - g[1]!);
  m[0] = h;
  m[1] = oh;
  let charge = h - oh;
  let d = h + oh;
  for (const strong of s.strong) charge += strong.charge * m[strong.species]!;
  for (const acid of s.acids) {
    const total = totals[acid.index]!;
    const n = acid.pKa.length;
    // log10 of each form's weight against the most protonated one; shifted by the largest so nothing overflows
    let log = -g[acid.first]!;
    let largest = log;
    const logs = scratch;
    logs[0] = log;
    let sumPK = 0;
    for (let k = 1; k <= n; k++) {
      sumPK += acid.pKa[k - 1]!;
      log = k * pH - sumPK - g[acid.first + k]!;
      logs[k] = log;
      if (log > largest) largest = log;
    }
    let sum = 0;
    for (let k = 0; k <= n; k++) sum += logs[k] = 10 ** (logs[k]! - largest);
    let mean = 0;
    let square = 0;
    for (let k = 0; k <= n; k++) {
      const fraction = logs[k]! / sum;
      m[acid.first + k] = fraction * total;
      mean += fraction * k;
      square += fraction * k * k;
    }
    charge += total * (acid.family.charge - mean);
    d += total * (square - mean * mean);
  }
  slope = -LN10 * d;
  return charge;
}
const scratch = new Float64Array(8);
const totalsScratch = new Float64Array(64);

/**
 * pH and species of a solution: charge balance in pH with mass balances of every acid family.
 * @throws ChemistryError where the volume is 0 or a component is unknown.
 */
export function solve(solution: Solution, model: Model): Equilibrium {
  const ids = Object.keys(solution.amounts);
  const s = systemFor(ids, model === 'real' ? solution.temperature_C : 25, model);
  const litres = solution.volume_nL * 1e-9;
  if (!(litres > 0)) throw new ChemistryError('volume_nL', 'An empty vessel has no pH.');
  const kg = litres * s.density;
  const totals = totalsScratch;
  ids.forEach((id, i) => (totals[i] = solution.amounts[id]! / kg));
  for (const strong of s.strong) s.molality[strong.species] = totals[strong.index]!;
  s.logGamma.fill(0);
  let pH = 7;
  let ionic = 0;
  for (let round = 0; round < 60; round++) {
    let low = -3;
    let high = 18;
    const before = pH;
    for (let k = 0; k < 100; k++) {
      const charge = netCharge(s, pH, totals);
      if (charge > 0) low = pH;
      else high = pH;
      let next = pH - charge / slope;
      if (!(next > low && next < high)) next = (low + high) / 2;
      const stepSize = Math.abs(next - pH);
      pH = next;
      if (stepSize < 1e-12) break;
    }
    if (model === 'textbook') break;
    let sum = 0;
    for (let i = 0; i < s.charges.length; i++) sum += s.charges[i]! ** 2 * s.molality[i]!;
    ionic = round < 8 ? sum / 2 : (ionic + sum / 2) / 2;
    updateActivities(s, ionic);
    if (round > 0 && Math.abs(pH - before) < 1e-11) break;
  }
  let sum = 0;
  const species: Species[] = s.names.map((name, i) => {
    sum += s.charges[i]! ** 2 * s.molality[i]!;
    return { name, component: s.component[i]!, charge: s.charges[i]!, amount_mol: s.molality[i]! * kg };
  });
  return { model, pH, ionicStrength: (sum / 2) * s.density, species, warnings: [] };
}
