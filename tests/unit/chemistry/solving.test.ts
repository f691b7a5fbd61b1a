/** What holds for every mixture, whatever is in it: seeded random ones, both models, with and without a gas. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  bufferCapacity,
  createSolution,
  mix,
  pHOf,
  solve,
  type Model,
} from '../../../src/chemistry/index.ts';
import { strongIons } from '../../../src/chemistry/components.ts';
import { substances } from '../../../src/chemistry/substances.ts';

const RUNS = { numRuns: 400, seed: 19230611 };

const part = fc.record({
  substance: fc.constantFrom(...substances.map((s) => s.formula)),
  // From traces to what a school shelf holds.
  concentration_molL: fc.double({ min: -8, max: -0.3, noNaN: true }).map((x) => 10 ** x),
});
const mixture = fc
  .record({
    parts: fc.array(part, { minLength: 1, maxLength: 4 }),
    volume_mL: fc.constantFrom(0.05, 50, 1000),
    temperature_C: fc.double({ min: 0, max: 60, noNaN: true }),
  })
  .map(createSolution);
const model = fc.constantFrom<Model>('textbook', 'real');
const gas = fc.option(fc.constantFrom(4.2e-4, 1));

describe('an equilibrium', () => {
  test('balances charges and keeps the amount of every component', () =>
    fc.assert(
      fc.property(mixture, model, gas, (plain, by, co2_atm) => {
        const solution = co2_atm === null ? plain : { ...plain, gas: { co2_atm } };
        const { species, pH, ionicStrength } = solve(solution, by);
        expect(Number.isFinite(pH)).toBe(true);
        expect(ionicStrength).toBeGreaterThan(0);
        let net = 0;
        let all = 0;
        const found: Record<string, number> = {};
        for (const { component, charge, amount_mol } of species) {
          expect(amount_mol).toBeGreaterThanOrEqual(0);
          net += charge * amount_mol;
          all += Math.abs(charge) * amount_mol;
          found[component] = (found[component] ?? 0) + amount_mol;
        }
        expect(Math.abs(net)).toBeLessThan(1e-9 * all);
        for (const id in solution.amounts) {
          if (co2_atm !== null && id === 'carbonic') continue;
          const n = solution.amounts[id]!;
          expect(Math.abs(found[id]! - n)).toBeLessThanOrEqual(1e-12 * n);
        }
      }),
      RUNS,
    ));

  test('does not depend on the order of mixing', () =>
    fc.assert(
      fc.property(mixture, mixture, mixture, model, (a, b, c, by) => {
        expect(Math.abs(pHOf(mix(mix(a, b), c), by) - pHOf(mix(c, mix(b, a)), by))).toBeLessThan(1e-8);
      }),
      RUNS,
    ));
});

describe('titrating', () => {
  test('with strong base never lowers the textbook pH, with strong acid never raises it', () =>
    fc.assert(
      fc.property(mixture, fc.constantFrom('Na+', 'Cl-'), (analyte, ion) => {
        // Amounts alone: a titrant's water dilutes too, and so may move pH towards neutral.
        const step = 1e-4 * analyte.volume_nL * 1e-9;
        let last = pHOf(analyte, 'textbook');
        for (let i = 1; i <= 5; i++) {
          const amounts = { ...analyte.amounts, [ion]: (analyte.amounts[ion] ?? 0) + i * step };
          const pH = pHOf({ ...analyte, amounts }, 'textbook');
          expect((pH - last) * Math.sign(strongIons[ion]!)).toBeGreaterThan(-1e-9);
          last = pH;
        }
      }),
      RUNS,
    ));

  test('has the slope that buffer capacity says (textbook)', () =>
    fc.assert(
      fc.property(mixture, (solution) => {
        const litres = solution.volume_nL * 1e-9;
        const capacity = bufferCapacity(solution, 'textbook');
        const step = capacity * litres * 1e-4;
        const at = (n: number) =>
          pHOf(
            { ...solution, amounts: { ...solution.amounts, 'Na+': (solution.amounts['Na+'] ?? 0) + n } },
            'textbook',
          );
        const slope = step / litres / (at(step) - at(0));
        expect(Math.abs(slope / capacity - 1)).toBeLessThan(2e-3);
      }),
      RUNS,
    ));
});

describe('strong liquids', () => {
  test.each(['textbook', 'real'] as const)('%s: pH below 0 and above 14', (by) => {
    const strong = (substance: string) =>
      createSolution({ parts: [{ substance, concentration_molL: 6 }], volume_mL: 10 });
    expect(pHOf(strong('HCl'), by)).toBeLessThan(-0.5);
    expect(pHOf(strong('NaOH'), by)).toBeGreaterThan(14.5);
    const { warnings } = solve(strong('HCl'), by);
    expect(warnings.length > 0).toBe(by === 'real');
  });
});
