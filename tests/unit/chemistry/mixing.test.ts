/** Mixing and parting: associative, commutative, nothing lost or gained (amounts to 1e-12, volumes exactly). */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { createSolution, mix, take, type Solution } from '../../../src/chemistry/index.ts';
import { substances } from '../../../src/chemistry/substances.ts';

const RUNS = { numRuns: 300, seed: 20260412 };

const part = fc.record({
  substance: fc.constantFrom(...substances.map((s) => s.formula)),
  concentration_molL: fc.double({ min: 0, max: 2, noNaN: true }),
});
const solution = fc
  .record({
    parts: fc.array(part, { maxLength: 5 }),
    volume_mL: fc.integer({ min: 1, max: 500_000 }).map((uL) => uL / 1000),
    temperature_C: fc.constantFrom(0, 18.5, 25, 60),
  })
  .map(createSolution);

const near = (a: number, b: number, scale: number) =>
  expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-12 * Math.max(scale, 1e-30));

/** Same volume exactly, same amounts and temperature to 1e-12. A component that is absent counts as none. */
function same(a: Solution, b: Solution): void {
  expect(a.volume_nL).toBe(b.volume_nL);
  near(a.temperature_C, b.temperature_C, 100);
  for (const id of new Set([...Object.keys(a.amounts), ...Object.keys(b.amounts)])) {
    const [x, y] = [a.amounts[id] ?? 0, b.amounts[id] ?? 0];
    near(x, y, Math.max(x, y));
  }
}

describe('mixing', () => {
  test('commutes', () =>
    fc.assert(
      fc.property(solution, solution, (a, b) => same(mix(a, b), mix(b, a))),
      RUNS,
    ));

  test('associates', () =>
    fc.assert(
      fc.property(solution, solution, solution, (a, b, c) => same(mix(mix(a, b), c), mix(a, mix(b, c)))),
      RUNS,
    ));

  test('conserves every amount', () =>
    fc.assert(
      fc.property(solution, solution, (a, b) => {
        const mixed = mix(a, b);
        expect(mixed.volume_nL).toBe(a.volume_nL + b.volume_nL);
        for (const id in mixed.amounts) {
          const sum = (a.amounts[id] ?? 0) + (b.amounts[id] ?? 0);
          near(mixed.amounts[id]!, sum, sum);
        }
      }),
      RUNS,
    ));
});

test('an empty vessel adds nothing', () =>
  fc.assert(
    fc.property(solution, (s) => {
      const empty = take(s, 0).taken;
      expect(mix(s, empty)).toBe(s);
      expect(mix(empty, s)).toBe(s);
    }),
    RUNS,
  ));

describe('parting', () => {
  test('and mixing again gives the same', () =>
    fc.assert(
      fc.property(solution, fc.double({ min: 0, max: 1, noNaN: true }), (s, share) => {
        const { taken, left } = take(s, Math.round(share * s.volume_nL));
        same(mix(taken, left), s);
      }),
      RUNS,
    ));

  test('keeps concentrations', () =>
    fc.assert(
      fc.property(solution, fc.double({ min: 0.01, max: 1, noNaN: true }), (s, share) => {
        const { taken } = take(s, Math.round(share * s.volume_nL));
        for (const id in s.amounts) {
          const c = s.amounts[id]! / s.volume_nL;
          near(taken.amounts[id]! / taken.volume_nL, c, c);
        }
      }),
      RUNS,
    ));
});
