/**
 * Charge balance of a chemical system in pH.
 *
 * Unknown: x = ln a(H+). For given activity coefficients the sum of positive charges P rises against the sum of negative charges N
 * as x rises, so x lies in a bracket that every trial narrows. Newton's step is taken on ln(P/N), which is straight for strong
 * acids and bases and gently bent elsewhere; a step that leaves the bracket is replaced by its middle. Activity coefficients are
 * renewed from the species around that, until both stand still.
 */
import { LN10 } from './constants.ts';
import { ChemistryError } from './errors.ts';
import type { ChemicalSystem } from './system.ts';

/** pH 20 and pH -6: no liquid lies beyond. */
const LEAST = -20 * LN10;
const MOST = 6 * LN10;
const FIRST_GUESS = -7 * LN10;
/**
 * What may be left of ln a(H+) and of ln γ. A step of Newton's leaves about its own square, and a renewal of the activity
 * coefficients moves the answer by a hundredth of itself, so that the answer is good to 1e-11.
 */
const LAST_STEP = 1e-6;
const LAST_CHANGE = 1e-10;
const ROUNDS = 600;

/**
 * What the steps of a solve hand to one another. Numbers in a typed array cost nothing; numbers handed over as arguments, results
 * or variables of the module are objects on the heap, a new one for each.
 */
const w = new Float64Array(10);
/** In: activity and molality of H3O+, molality of OH-, net molality of strong ions' charges. */
const A = 0;
const H = 1;
const OH = 2;
const STRONG = 3;
/** Out: sums of positive and negative charges, and their derivatives by ln a(H+). */
const POSITIVE = 4;
const NEGATIVE = 5;
const POSITIVE_SLOPE = 6;
const NEGATIVE_SLOPE = 7;
/** In and out: what part of a change of ln γ is made; the greatest one. */
const WEIGHT = 8;
const CHANGE = 9;

/** Sums of charges at a(H+) and their derivatives by ln a(H+). */
function charges(s: ChemicalSystem): void {
  const strong = w[STRONG]!;
  let positive = w[H]!;
  let positiveSlope = positive;
  let negative = w[OH]!;
  let negativeSlope = -negative;
  if (strong > 0) positive += strong;
  else negative -= strong;
  const { first, steps, firstStep, mixed, open, totals, gasMolality, charges: z } = s;
  const inverse = 1 / w[A]!;
  for (let f = 0; f < first.length; f++) {
    const n = steps[f]!;
    const z0 = z[first[f]!]!;
    const k0 = firstStep[f]!;
    // Forms against the most protonated one; mean and slopes follow from the weights alone.
    let term = 1;
    let sum = 1;
    let mean = 0;
    let up: number;
    let upFirst: number;
    let down: number;
    let downFirst: number;
    if (z0 <= 0) {
      // No form is positive: all charge follows from the mean number of steps.
      let square = 0;
      for (let k = 1; k <= n; k++) {
        term *= mixed[k0 + k - 1]! * inverse;
        sum += term;
        mean += k * term;
        square += k * k * term;
      }
      up = 0;
      upFirst = 0;
      down = mean - z0 * sum;
      downFirst = square - z0 * mean;
    } else {
      up = z0;
      upFirst = 0;
      down = 0;
      downFirst = 0;
      for (let k = 1; k <= n; k++) {
        term *= mixed[k0 + k - 1]! * inverse;
        sum += term;
        mean += k * term;
        const charge = z0 - k;
        if (charge > 0) {
          up += charge * term;
          upFirst += charge * k * term;
        } else {
          down -= charge * term;
          downFirst -= charge * k * term;
        }
      }
    }
    if (open[f]) {
      positive += gasMolality * up;
      negative += gasMolality * down;
      positiveSlope -= gasMolality * upFirst;
      negativeSlope -= gasMolality * downFirst;
    } else {
      const scale = totals[f]! / sum;
      mean /= sum;
      positive += scale * up;
      negative += scale * down;
      positiveSlope += scale * (up * mean - upFirst);
      negativeSlope += scale * (down * mean - downFirst);
    }
  }
  w[POSITIVE] = positive;
  w[NEGATIVE] = negative;
  w[POSITIVE_SLOPE] = positiveSlope;
  w[NEGATIVE_SLOPE] = negativeSlope;
}

/** Renews ln γ from molalities, by that part of the change which WEIGHT says. */
function renewActivities(s: ChemicalSystem): void {
  const { charges: z, molality: m, lnGamma, pairI, pairJ, pairEpsilon } = s;
  const count = z.length;
  let I = 0;
  for (let i = 0; i < count; i++) I += z[i]! * z[i]! * m[i]!;
  I *= 0.5;
  s.ionicStrength = I;
  w[CHANGE] = 0;
  if (s.activity === 'none') return;
  const weight = w[WEIGHT]!;
  const root = Math.sqrt(I);
  const fresh = scratch;
  if (s.activity === 'davies') {
    // Davies C.W., Ion Association (1962): log10 γ = -A z² (√I/(1 + √I) - 0.3 I)
    const d = s.slope * (root / (1 + root) - 0.3 * I);
    for (let i = 0; i < count; i++) fresh[i] = -z[i]! * z[i]! * d;
  } else {
    // Specific ion interaction theory: Ciavatta L., Ann. Chim. (Rome) 70 (1980) 551; 1.5 (kg/mol)^0.5 as in the NEA reviews
    const d = (s.slope * root) / (1 + 1.5 * root);
    for (let i = 0; i < count; i++) fresh[i] = -z[i]! * z[i]! * d;
    for (let p = 0; p < pairI.length; p++) {
      const i = pairI[p]!;
      const j = pairJ[p]!;
      const e = pairEpsilon[p]!;
      fresh[i]! += e * m[j]!;
      fresh[j]! += e * m[i]!;
    }
  }
  let change = 0;
  for (let i = 0; i < count; i++) {
    const by = (fresh[i]! - lnGamma[i]!) * weight;
    lnGamma[i]! += by;
    const size = by < 0 ? -by : by;
    if (size > change) change = size;
  }
  w[CHANGE] = change / weight;
}
let scratch = new Float64Array(64);

/** Mixed constants from ln K and ln γ. */
function renewConstants(s: ChemicalSystem): void {
  const { first, steps, firstStep, lnK, lnGamma, mixed } = s;
  for (let f = 0; f < first.length; f++) {
    const at = first[f]!;
    const k0 = firstStep[f]!;
    for (let k = 0; k < steps[f]!; k++)
      mixed[k0 + k] = Math.exp(lnK[k0 + k]! + lnGamma[at + k]! - lnGamma[at + k + 1]!);
  }
}

/** Molalities of every species but strong ions at a(H+). */
function distribute(s: ChemicalSystem): void {
  const { first, steps, firstStep, mixed, open, totals, molality: m } = s;
  m[0] = w[H]!;
  m[1] = w[OH]!;
  const inverse = 1 / w[A]!;
  for (let f = 0; f < first.length; f++) {
    const at = first[f]!;
    const n = steps[f]!;
    const k0 = firstStep[f]!;
    let term = 1;
    let sum = 1;
    m[at] = 1;
    for (let k = 1; k <= n; k++) {
      term *= mixed[k0 + k - 1]! * inverse;
      m[at + k] = term;
      sum += term;
    }
    const scale = open[f] ? s.gasMolality : totals[f]! / sum;
    for (let k = 0; k <= n; k++) m[at + k]! *= scale;
  }
}

/**
 * Solves a system in place: molalities, ln γ, pH (-log10 a(H+)) and ionic strength. Allocates nothing.
 * @throws ChemistryError where no pH between -6 and 20 balances the charges
 */
export function solveInPlace(s: ChemicalSystem): void {
  const { charges: z, totals, molality: m, lnGamma, firstIon } = s;
  const families = s.first.length;
  if (scratch.length < z.length) scratch = new Float64Array(2 * z.length);
  let strong = 0;
  for (let i = firstIon; i < z.length; i++) {
    const molality = totals[families + i - firstIon]!;
    m[i] = molality;
    strong += z[i]! * molality;
  }
  // Cold start: only the strong ions and what balances them are known to be there.
  for (let i = 0; i < firstIon; i++) m[i] = 0;
  lnGamma.fill(0);
  if (strong > 0) m[1] = strong;
  else m[0] = -strong;
  w[STRONG] = strong;
  w[WEIGHT] = 1;
  renewActivities(s);
  const ideal = s.activity === 'none';
  let x = FIRST_GUESS;
  let enough = ideal ? LAST_STEP : 0.03;
  for (let round = 0; round < ROUNDS; round++) {
    renewConstants(s);
    const toH = Math.exp(-lnGamma[0]!);
    const kw = Math.exp(s.lnKw - lnGamma[1]!);
    let low = LEAST;
    let high = MOST;
    let step = Infinity;
    let a = Math.exp(x);
    for (let k = 0; k < 200 && step > enough; k++) {
      w[A] = a;
      w[H] = a * toH;
      w[OH] = kw / a;
      charges(s);
      const positive = w[POSITIVE]!;
      const negative = w[NEGATIVE]!;
      const difference = Math.log(positive / negative);
      if (difference > 0) high = x;
      else low = x;
      const slope = w[POSITIVE_SLOPE]! / positive - w[NEGATIVE_SLOPE]! / negative;
      let next = x - difference / slope;
      if (next === x) break;
      if (next > low && next < high) step = Math.abs(next - x);
      else {
        // The middle says nothing about how near the answer is.
        next = (low + high) / 2;
        step = Infinity;
      }
      x = next;
      a = Math.exp(x);
    }
    w[A] = a;
    w[H] = a * toH;
    w[OH] = kw / a;
    distribute(s);
    if (ideal) break;
    w[WEIGHT] = round < 15 ? 1 : round < 60 ? 0.5 : 0.2;
    renewActivities(s);
    const change = w[CHANGE]!;
    if (change < LAST_CHANGE && enough <= LAST_STEP) break;
    enough = Math.max(LAST_STEP, Math.min(enough, change * 0.1));
  }
  if (ideal) renewActivities(s);
  s.pH = -x / LN10;
  judge(s);
}

/** Judges the answer after solving: charges balance, and pH lies where a liquid can be. */
function judge(s: ChemicalSystem): void {
  let net = 0;
  let all = 0;
  for (let i = 0; i < s.charges.length; i++) {
    const charge = s.charges[i]! * s.molality[i]!;
    net += charge;
    all += charge < 0 ? -charge : charge;
  }
  s.residual = net / all;
  if (!(Math.abs(s.residual) < 1e-9))
    throw new ChemistryError(
      'amounts',
      `No pH balances these charges (left over: ${s.residual.toExponential(1)}).`,
    );
}
