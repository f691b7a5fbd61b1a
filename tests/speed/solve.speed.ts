/** How long one mixture of three acid families takes: real model, 25 °C, no memory of the last pH; beside it a plain bisection. */
import { createSolution, solve } from '../../src/chemistry/index.ts';
import { debyeHuckelA, pKw, waterDensity } from '../../src/chemistry/water.ts';
import { medianOf } from './samples.ts';

/** Ethanoate, phosphate and citrate, half neutralised, with salt: 64 strengths, so that no two calls in a row are alike. */
const mixtures = Array.from({ length: 64 }, (_, i) =>
  createSolution({
    parts: [
      { substance: 'CH3COOH', concentration_molL: 0.05 },
      { substance: 'NaH2PO4', concentration_molL: 0.05 },
      { substance: 'citric acid', concentration_molL: 0.02 },
      { substance: 'NaOH', concentration_molL: 0.02 + 0.002 * i },
      { substance: 'NaCl', concentration_molL: 0.05 },
    ],
    volume_mL: 50,
  }),
);
let next = 0;
const mixture = () => mixtures[next++ & 63]!;

/**
 * The plainest program for the same balance: halves the pH from 0 to 14 until 1e-9 is left, and repeats that until ionic strength
 * stands still. Davies coefficients, which cost less than the engine's.
 */
function bisection(): number {
  const { amounts, volume_nL } = mixture();
  const kg = volume_nL * 1e-9 * waterDensity(25);
  const acids = [
    [[4.756], amounts['ethanoic']! / kg],
    [[2.148, 7.198, 12.35], amounts['phosphoric']! / kg],
    [[3.128, 4.761, 6.396], amounts['citric']! / kg],
  ] as const;
  const sodium = amounts['Na+']! / kg;
  const chloride = amounts['Cl-']! / kg;
  const A = debyeHuckelA(25);
  const lnKw = pKw(25);
  let I = 0.1;
  let pH = 7;
  for (let round = 0; round < 50; round++) {
    const root = Math.sqrt(I);
    const d = A * (root / (1 + root) - 0.3 * I);
    let low = 0;
    let high = 14;
    let strength = 0;
    while (high - low > 1e-9) {
      pH = (low + high) / 2;
      const h = 10 ** (d - pH);
      const oh = 10 ** (pH - lnKw + d);
      let charge = sodium - chloride + h - oh;
      strength = sodium + chloride + h + oh;
      for (const [pKa, total] of acids) {
        const weights = [1];
        for (let k = 1; k <= pKa.length; k++)
          weights.push(weights[k - 1]! * 10 ** (pH - pKa[k - 1]! + d * (k * k - (k - 1) * (k - 1))));
        const sum = weights.reduce((a, b) => a + b, 0);
        weights.forEach((w, k) => {
          charge -= (k * w * total) / sum;
          strength += (k * k * w * total) / sum;
        });
      }
      if (charge > 0) low = pH;
      else high = pH;
    }
    if (Math.abs(strength / 2 - I) < 1e-9) break;
    I = strength / 2;
  }
  return pH;
}

export const benchmarks = [
  {
    name: 'solve',
    unit: 'us',
    run: () => medianOf(() => solve(mixture(), 'real').pH, { count: 2000, perSecond: 1e6 }),
  },
  {
    name: 'solve, plain bisection',
    unit: 'us',
    run: () => medianOf(bisection, { count: 50, perSecond: 1e6 }),
  },
];
