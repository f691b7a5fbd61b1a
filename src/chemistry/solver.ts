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
const EXACT = 1e-13;
const ROUNDS = 600;

/** Results of `charges`, kept outside so that a trial allocates nothing. */
let positive = 0;
let negative = 0;
let positiveSlope = 0;
let negativeSlope = 0;

/** Sums of charges at a(H+) and their derivatives by ln a(H+). */
function charges(s: ChemicalSystem, a: number, h: number, oh: number, strong: number): void {
  positive = h;
  positiveSlope = h;
  negative = oh;
  negativeSlope = -oh;
  if (strong > 0) positive += strong;
  else negative -= strong;
  const { first, steps, firstStep, mixed, open, totals, gasMolality, charges: z } = s;
  for (let f = 0; f < first.length; f++) {
    const n = steps[f]!;
    const z0 = z[first[f]!]!;
    const k0 = firstStep[f]!;
    // Forms against the most protonated one; mean and slopes follow from the weights alone.
    let term = 1;
    let sum = 1;
    let mean = 0;
    let up = z0 > 0 ? z0 : 0;
    let upFirst = 0;
    let down = z0 < 0 ? -z0 : 0;
    let downFirst = 0;
    for (let k = 1; k <= n; k++) {
      term *= mixed[k0 + k - 1]! / a;
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
}

/** Renews ln γ from molalities; answers with the greatest change. `weight` below 1 damps. */
function renewActivities(s: ChemicalSystem, weight: number): number {
  const { charges: z, molality: m, lnGamma, pairI, pairJ, pairEpsilon } = s;
  const count = z.length;
  let I = 0;
  for (let i = 0; i < count; i++) I += z[i]! * z[i]! * m[i]!;
  I *= 0.5;
  s.ionicStrength = I;
  if (s.activity === 'none') return 0;
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
  return change / weight;
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
function distribute(s: ChemicalSystem, a: number, h: number, oh: number): void {
  const { first, steps, firstStep, mixed, open, totals, molality: m } = s;
  m[0] = h;
  m[1] = oh;
  for (let f = 0; f < first.length; f++) {
    const at = first[f]!;
    const n = steps[f]!;
    const k0 = firstStep[f]!;
    let term = 1;
    let sum = 1;
    m[at] = 1;
    for (let k = 1; k <= n; k++) {
      term *= mixed[k0 + k - 1]! / a;
      m[at + k] = term;
      sum += term;
    }
    const scale = open[f] ? s.gasMolality : totals[f]! / sum;
    for (let k = 0; k <= n; k++) m[at + k]! *= scale;
  }
}

/**
 * Solves a system in place: molalities, ln γ, pH and ionic strength. Allocates nothing.
 * @returns pH, -log10 a(H+)
 * @throws ChemistryError where no pH between -6 and 20 balances the charges
 */
export function solveInPlace(s: ChemicalSystem): number {
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
  renewActivities(s, 1);
  const ideal = s.activity === 'none';
  let x = FIRST_GUESS;
  let tolerance = ideal ? EXACT : 1e-3;
  for (let round = 0; round < ROUNDS; round++) {
    renewConstants(s);
    const gammaH = Math.exp(lnGamma[0]!);
    const kw = Math.exp(s.lnKw - lnGamma[1]!);
    let low = LEAST;
    let high = MOST;
    let step = Infinity;
    for (let k = 0; k < 200 && step > tolerance; k++) {
      const a = Math.exp(x);
      charges(s, a, a / gammaH, kw / a, strong);
      const difference = Math.log(positive / negative);
      if (difference > 0) high = x;
      else low = x;
      const slope = positiveSlope / positive - negativeSlope / negative;
      let next = x - difference / slope;
      if (!(next > low && next < high)) {
        if (difference === 0) break;
        next = (low + high) / 2;
      }
      step = Math.abs(next - x);
      x = next;
    }
    const a = Math.exp(x);
    distribute(s, a, a / gammaH, kw / a);
    if (ideal) break;
    const change = renewActivities(s, round < 15 ? 1 : round < 60 ? 0.5 : 0.2);
    if (change < EXACT * 4 && tolerance <= EXACT) break;
    tolerance = Math.max(EXACT, Math.min(tolerance, change * 1e-3));
  }
  if (ideal) renewActivities(s, 1);
  return judge(s, x);
}

/** Judges the answer after solving: charges balance, and pH lies where a liquid can be. */
function judge(s: ChemicalSystem, x: number): number {
  let net = 0;
  let all = 0;
  for (let i = 0; i < s.charges.length; i++) {
    const charge = s.charges[i]! * s.molality[i]!;
    net += charge;
    all += charge < 0 ? -charge : charge;
  }
  s.residual = net / all;
  s.pH = -x / LN10;
  if (!(Math.abs(s.residual) < 1e-9))
    throw new ChemistryError(
      'amounts',
      `No pH balances these charges (left over: ${s.residual.toExponential(1)}).`,
    );
  return s.pH;
}
