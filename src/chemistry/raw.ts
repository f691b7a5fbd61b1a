/** Solutions described by bare constants instead of the catalogue: to lay other programs' results beside this one's. */
import { capacityInPlace } from './capacity.ts';
import { checked, ChemistryError } from './errors.ts';
import { solveInPlace } from './solver.ts';
import { ChemicalSystem, type Activity } from './system.ts';

export interface RawAcid {
  readonly name?: string;
  /** From the most protonated form on; any order is kept as it is given. */
  readonly pKa: readonly number[];
  /** Of the most protonated form. */
  readonly charge: number;
  /** Total, mol; may be left out for the first family (carbonic) where `co2` is given. */
  readonly amount_mol?: number;
}

export interface RawIon {
  readonly name?: string;
  readonly charge: number;
  readonly amount_mol: number;
}

export interface RawProblem {
  /** L of solution, or kg of water: amounts are divided by it. */
  readonly volume_L: number;
  readonly pKw: number;
  readonly activity: 'none' | 'davies';
  /** Slope A of log10 γ; needed for 'davies'. */
  readonly debyeHuckelA?: number;
  readonly acids: readonly RawAcid[];
  readonly ions: readonly RawIon[];
  /** Open to carbon dioxide: log10 of mol/kg and atm. The family without an amount follows from it. */
  readonly co2?: { readonly partialPressure_atm: number; readonly log10Henry: number };
}

export interface RawAnswer {
  readonly pH: number;
  readonly ionicStrength: number;
  readonly species: readonly {
    readonly name: string;
    readonly charge: number;
    readonly amount_mol: number;
  }[];
  /** mol of strong base for each litre and unit of pH, at constant activity coefficients. */
  readonly bufferCapacity: number;
}

const charge = (field: string, value: unknown): number => {
  const z = checked(field, value, 'a whole number', -8, 8);
  if (!Number.isInteger(z)) throw new ChemistryError(field, `${field} is a whole number; found ${z}.`);
  return z;
};

const list = <T>(field: string, value: readonly T[] | undefined): readonly T[] => {
  if (value === undefined) return [];
  if (!Array.isArray(value)) throw new ChemistryError(field, `${field} is a list.`);
  return value;
};

const signed = (z: number): string => (z === 0 ? '0' : z > 0 ? `+${z}` : `${z}`);

/**
 * Solves a raw problem.
 * @throws ChemistryError naming the field that is wrong
 */
export function solveRaw(problem: RawProblem): RawAnswer {
  const volume = checked('volume_L', problem.volume_L, 'a number of litres', Number.MIN_VALUE);
  const acids = list('acids', problem.acids);
  const ions = list('ions', problem.ions);
  const co2 = problem.co2;
  const gasMolality = co2
    ? checked('co2.partialPressure_atm', co2.partialPressure_atm, 'a pressure in atm') *
      10 ** checked('co2.log10Henry', co2.log10Henry, 'a logarithm', -20, 20)
    : 0;
  const openIndex = co2 ? carbonicAmong(acids) : -1;
  acids.forEach((acid, i) => {
    const pKa = list(`acids[${i}].pKa`, acid?.pKa);
    if (pKa.length < 1 || pKa.length > 8)
      throw new ChemistryError(`acids[${i}].pKa`, `acids[${i}].pKa is a list of 1 to 8 numbers.`);
    pKa.forEach((value, k) => checked(`acids[${i}].pKa[${k}]`, value, 'a number', -10, 30));
  });
  const system = new ChemicalSystem(
    acids.map((acid, i) => ({
      charge: charge(`acids[${i}].charge`, acid.charge),
      steps: acid.pKa.length,
      open: i === openIndex,
    })),
    ions.map((ion, i) => charge(`ions[${i}].charge`, ion?.charge)),
  );
  acids.forEach((acid, i) => {
    system.totals[i] =
      i === openIndex ? 0 : checked(`acids[${i}].amount_mol`, acid.amount_mol, 'a number of mol') / volume;
  });
  ions.forEach((ion, i) => {
    system.totals[acids.length + i] =
      checked(`ions[${i}].amount_mol`, ion.amount_mol, 'a number of mol') / volume;
  });
  system.gasMolality = gasMolality;
  system.setConstants(
    acids.flatMap((acid) => acid.pKa),
    checked('pKw', problem.pKw, 'a number', 5, 25),
    activityOf(problem.activity),
    problem.activity === 'davies' ? checked('debyeHuckelA', problem.debyeHuckelA, 'a slope', 0, 5) : 0,
  );
  solveInPlace(system);
  const { pH } = system;
  const names = [
    'H+',
    'OH-',
    ...acids.flatMap((acid, i) =>
      Array.from(
        { length: acid.pKa.length + 1 },
        (_, k) => `${acid.name ?? `acid ${i + 1}`} (${signed(acid.charge - k)})`,
      ),
    ),
    ...ions.map((ion, i) => ion.name ?? `ion ${i + 1} (${signed(ion.charge)})`),
  ];
  return {
    pH,
    ionicStrength: system.ionicStrength,
    species: names.map((name, i) => ({
      name,
      charge: system.charges[i]!,
      amount_mol: system.molality[i]! * volume,
    })),
    bufferCapacity: capacityInPlace(system),
  };
}

function activityOf(word: unknown): Activity {
  if (word === 'none' || word === 'davies') return word;
  throw new ChemistryError(
    'activity',
    `activity is 'none' or 'davies'; found ${JSON.stringify(word)}.`,
    'davies',
  );
}

/** The family that the gas decides: the one without an amount, else the one called carbonic. */
function carbonicAmong(acids: readonly RawAcid[]): number {
  const without = acids.findIndex((acid) => acid?.amount_mol === undefined || acid.amount_mol === null);
  const named = acids.findIndex((acid) => /carbon|CO2/i.test(acid?.name ?? ''));
  const index = without >= 0 ? without : named;
  if (index < 0)
    throw new ChemistryError('co2', 'With co2, one of the acids is carbonic acid: leave out its amount_mol.');
  return index;
}
