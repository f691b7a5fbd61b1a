/** Solutions: made from substances, mixed, parted. Amounts of components are all that is kept; the rest is computed. */
import { strongIons } from './components.ts';
import { TEMPERATURES_C } from './constants.ts';
import { carbonateOf } from './equilibrium.ts';
import { checked, ChemistryError, nearestWord } from './errors.ts';
import { AIR_CO2_ATM } from './henry.ts';
import { indicatorData } from './indicatorData.ts';
import { findSubstance, substanceWords } from './substances.ts';
import type { Solution } from './types.ts';

export interface Part {
  /** Formula or any name of the catalogue. */
  readonly substance: string;
  /** mol of substance in a litre of the whole solution, 0 or more. */
  readonly concentration_molL?: number;
  /** mol, 0 or more; either this or the concentration. */
  readonly amount_mol?: number;
}

/** An ion by itself, as in a water analysis. The ions of one solution must balance. */
export interface IonPart {
  readonly ion: string;
  readonly concentration_molL?: number;
  readonly amount_mol?: number;
}

const NL_PER_ML = 1e6;

function amountOf(
  part: { concentration_molL?: number; amount_mol?: number },
  litres: number,
  where: string,
): number {
  if (part.amount_mol !== undefined) {
    if (part.concentration_molL !== undefined)
      throw new ChemistryError(where, `${where} has an amount and a concentration; give one of them.`);
    return checked(`${where}.amount_mol`, part.amount_mol, 'a number of mol');
  }
  return checked(`${where}.concentration_molL`, part.concentration_molL, 'a number of mol/L') * litres;
}

/**
 * A solution from its parts, made up to a volume.
 * @param o.volume_mL 0 or more; kept as whole nanolitres
 * @param o.temperature_C 0 to 60, 25 where it is left out
 * @param o.ions strong ions by themselves; their charges must balance to 1e-9
 * @throws ChemistryError naming the field: an unknown substance (with the nearest known word), a negative or missing amount, ions
 *   whose charges do not balance
 */
export function createSolution(o: {
  parts: readonly Part[];
  ions?: readonly IonPart[];
  volume_mL: number;
  temperature_C?: number;
}): Solution {
  const volume_mL = checked('volume_mL', o.volume_mL, 'a number of mL');
  const litres = volume_mL / 1000;
  const amounts: Record<string, number> = {};
  o.parts.forEach((part, i) => {
    const where = `parts[${i}]`;
    const { gives } = knownSubstance(part.substance, `${where}.substance`);
    const n = amountOf(part, litres, where);
    for (const component in gives) amounts[component] = (amounts[component] ?? 0) + gives[component]! * n;
  });
  let net = 0;
  let all = 0;
  o.ions?.forEach((part, i) => {
    const charge = Object.hasOwn(strongIons, part.ion) ? strongIons[part.ion]! : undefined;
    if (charge === undefined)
      throw unknown(
        `ions[${i}].ion`,
        `There is no strong ion '${part.ion}'.`,
        part.ion,
        Object.keys(strongIons),
      );
    const n = amountOf(part, litres, `ions[${i}]`);
    amounts[part.ion] = (amounts[part.ion] ?? 0) + n;
    net += charge * n;
    all += Math.abs(charge) * n;
  });
  if (Math.abs(net) > 1e-9 * all)
    throw new ChemistryError(
      'ions',
      `The charges of these ions do not balance: ${net > 0 ? 'positive' : 'negative'} by ${Math.abs(net).toPrecision(2)} mol.`,
    );
  return {
    volume_nL: Math.round(volume_mL * NL_PER_ML),
    temperature_C: temperatureOf(o.temperature_C),
    amounts,
  };
}

const unknown = (
  field: string,
  sentence: string,
  written: string,
  words: Iterable<string>,
): ChemistryError => {
  const nearest = nearestWord(String(written), words);
  return new ChemistryError(field, nearest ? `${sentence} Did you mean '${nearest}'?` : sentence, nearest);
};

function knownSubstance(name: string, field: string) {
  const substance = typeof name === 'string' ? findSubstance(name) : undefined;
  if (!substance) throw unknown(field, `There is no substance '${name}'.`, name, substanceWords());
  return substance;
}

const temperatureOf = (temperature_C = 25): number =>
  checked('temperature_C', temperature_C, 'a temperature in °C', TEMPERATURES_C.from, TEMPERATURES_C.to);

/**
 * Total carbonate of opened sparkling water, mol/L: what about 3.5 atm of carbon dioxide dissolves at room temperature (common
 * practice, from memory).
 */
const SPARKLING = 0.12;

/**
 * Pure water: boiled and cooled (no carbon dioxide), aired (what 420 ppm of carbon dioxide dissolve) or sparkling. The carbonate is
 * kept as an amount: the water is stoppered.
 * @param temperature_C 0 to 60
 */
export function water(
  kind: 'boiled' | 'aired' | 'sparkling',
  volume_mL: number,
  temperature_C = 25,
): Solution {
  const volume_nL = Math.round(checked('volume_mL', volume_mL, 'a number of mL') * NL_PER_ML);
  const plain: Solution = { volume_nL, temperature_C: temperatureOf(temperature_C), amounts: {} };
  if (kind === 'boiled' || volume_nL === 0) return plain;
  const carbonic =
    kind === 'aired'
      ? carbonateOf({ ...plain, gas: { co2_atm: AIR_CO2_ATM } }, 'real')
      : (SPARKLING * volume_nL) / 1e9;
  return { ...plain, amounts: { carbonic } };
}

/**
 * Aqueous stock of an indicator as its fully neutralised sodium salt (disodium for the sulfonephthaleins).
 * @param o.massPercent g of the indicator in 100 mL, counted as the acid form; 0.1 where it is left out
 * @throws ChemistryError where the indicator is unknown
 */
export function indicatorStock(
  id: string,
  o: { massPercent?: number; volume_mL: number; temperature_C?: number },
): Solution {
  const d = Object.hasOwn(indicatorData, id) ? indicatorData[id] : undefined;
  if (!d) throw unknown('indicator', `There is no indicator '${id}'.`, id, Object.keys(indicatorData));
  const massPercent = checked('massPercent', o.massPercent ?? 0.1, 'a number of g in 100 mL');
  const volume_mL = checked('volume_mL', o.volume_mL, 'a number of mL');
  const n = (massPercent / 100 / d.molarMass) * volume_mL;
  const sodium = d.pKa.length - d.charge;
  return {
    volume_nL: Math.round(volume_mL * NL_PER_ML),
    temperature_C: temperatureOf(o.temperature_C),
    amounts: { [id]: n, 'Na+': sodium * n },
  };
}

/** A solution cut off from its gas: it keeps the carbonate that the model finds in it at that moment. */
export function seal(s: Solution, model: 'textbook' | 'real'): Solution {
  if (!s.gas) return s;
  const { volume_nL, temperature_C, amounts } = s;
  if (volume_nL === 0) return { volume_nL, temperature_C, amounts };
  return { volume_nL, temperature_C, amounts: { ...amounts, carbonic: carbonateOf(s, model) } };
}

/**
 * Adds amounts and volumes; temperatures are volume-weighted. Both stay open where both stand under the same gas; otherwise each is
 * sealed first, with the real model (seal them yourself to choose another).
 */
export function mix(a: Solution, b: Solution): Solution {
  if (a.volume_nL === 0) return b;
  if (b.volume_nL === 0) return a;
  const open = a.gas !== undefined && a.gas.co2_atm === b.gas?.co2_atm;
  const left = open ? a : seal(a, 'real');
  const right = open ? b : seal(b, 'real');
  const amounts: Record<string, number> = { ...left.amounts };
  for (const component in right.amounts)
    amounts[component] = (amounts[component] ?? 0) + right.amounts[component]!;
  const volume_nL = a.volume_nL + b.volume_nL;
  const temperature_C =
    a.temperature_C === b.temperature_C
      ? a.temperature_C
      : (a.temperature_C * a.volume_nL + b.temperature_C * b.volume_nL) / volume_nL;
  return { volume_nL, temperature_C, amounts, ...(open ? { gas: a.gas } : {}) };
}

/**
 * Parts a solution without changing its concentrations.
 * @param volume_nL 0 to the solution's volume; rounded to whole nanolitres
 * @throws ChemistryError where more is asked for than there is
 */
export function take(s: Solution, volume_nL: number): { taken: Solution; left: Solution } {
  const whole_nL = Math.round(volume_nL);
  if (!(whole_nL >= 0 && whole_nL <= s.volume_nL))
    throw new ChemistryError('volume_nL', 'More than there is cannot be taken.');
  const f = s.volume_nL === 0 ? 0 : whole_nL / s.volume_nL;
  const taken: Record<string, number> = {};
  const left: Record<string, number> = {};
  for (const component in s.amounts) {
    const n = s.amounts[component]!;
    taken[component] = n * f;
    left[component] = f === 1 ? 0 : n - n * f;
  }
  return {
    taken: { ...s, volume_nL: whole_nL, amounts: taken },
    left: { ...s, volume_nL: s.volume_nL - whole_nL, amounts: left },
  };
}
