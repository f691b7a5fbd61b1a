/**
 * A set of acid families and strong ions, laid out in typed arrays for the solver. What does not depend on the amounts is worked
 * out once; a solve fills the same arrays again and allocates nothing.
 */
import { LN10 } from './constants.ts';

/** How activity coefficients are computed. */
export type Activity = 'none' | 'davies' | 'sit';

/** An acid family for the solver. */
export interface FamilyInput {
  /** Charge of the most protonated form; each step lowers it by one. */
  readonly charge: number;
  /** Number of steps. */
  readonly steps: number;
  /** True where the amount follows from a gas: the most protonated form's molality is then held. */
  readonly open?: boolean;
}

/** ln γ of species i takes `epsilon` times the molality of species j, and the other way round (kg/mol). */
export interface InteractionPair {
  readonly i: number;
  readonly j: number;
  readonly epsilon: number;
}

export class ChemicalSystem {
  /** Species in the order: H+, OH-, each family's forms from the most protonated on, strong ions. */
  readonly charges: Float64Array;
  readonly molality: Float64Array;
  readonly lnGamma: Float64Array;
  /** Species index of each family's most protonated form, its number of steps, its first pKa, whether it is open to a gas. */
  readonly first: Int32Array;
  readonly steps: Int32Array;
  readonly firstStep: Int32Array;
  readonly open: Uint8Array;
  readonly firstIon: number;
  /** Natural logarithms of the constants, set by `setConstants`. */
  readonly lnK: Float64Array;
  lnKw = 0;
  /** Debye-Hückel slope times ln 10. */
  slope = 0;
  activity: Activity = 'none';
  /** Molality of each family, then of each strong ion, in the order they were given; set before a solve. */
  readonly totals: Float64Array;
  /** Molality of the dissolved gas of open families; set before a solve. */
  gasMolality = 0;
  /** Mixed constants K γ(k-1)/γ(k) on the scale of a(H+), renewed when activity coefficients change. */
  readonly mixed: Float64Array;
  readonly pairI: Int32Array;
  readonly pairJ: Int32Array;
  readonly pairEpsilon: Float64Array;
  /** Results of the last solve. Ionic strength in mol/kg. */
  pH = NaN;
  ionicStrength = 0;
  /** Net charge over the sum of all charges, after the last solve. */
  residual = 0;

  constructor(
    families: readonly FamilyInput[],
    ionCharges: readonly number[],
    pairs: readonly InteractionPair[] = [],
  ) {
    const charges = [1, -1];
    const firsts: number[] = [];
    const firstSteps: number[] = [];
    let steps = 0;
    for (const family of families) {
      firsts.push(charges.length);
      firstSteps.push(steps);
      steps += family.steps;
      for (let k = 0; k <= family.steps; k++) charges.push(family.charge - k);
    }
    this.firstIon = charges.length;
    charges.push(...ionCharges);
    this.charges = Float64Array.from(charges);
    this.molality = new Float64Array(charges.length);
    this.lnGamma = new Float64Array(charges.length);
    this.first = Int32Array.from(firsts);
    this.steps = Int32Array.from(families, (f) => f.steps);
    this.firstStep = Int32Array.from(firstSteps);
    this.open = Uint8Array.from(families, (f) => (f.open ? 1 : 0));
    this.lnK = new Float64Array(steps);
    this.mixed = new Float64Array(steps);
    this.totals = new Float64Array(families.length + ionCharges.length);
    this.pairI = Int32Array.from(pairs, (p) => p.i);
    this.pairJ = Int32Array.from(pairs, (p) => p.j);
    this.pairEpsilon = Float64Array.from(pairs, (p) => p.epsilon * LN10);
  }

  /**
   * Sets the constants of one temperature.
   * @param pKa of every step of every family, in their order
   * @param A Debye-Hückel slope for log10 γ, (kg/mol)^0.5
   */
  setConstants(pKa: ArrayLike<number>, pKw: number, activity: Activity, A: number): void {
    for (let k = 0; k < this.lnK.length; k++) this.lnK[k] = -pKa[k]! * LN10;
    this.lnKw = -pKw * LN10;
    this.activity = activity;
    this.slope = A * LN10;
  }
}
