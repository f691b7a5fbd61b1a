/**
 * The engine's arithmetic against an independent speciation program, with the constants given in each case.
 * Source: USGS PHREEQC 3.8.9 (Parkhurst D.L., Appelo C.A.J., USGS Techniques and Methods 6-A43, 2013), activity of water = 1.
 */
import { describe, expect, test } from 'vitest';
import { solveRaw, type RawProblem } from '../../src/chemistry/raw.ts';
import { answerLine } from '../../scripts/equilibrate/answer.ts';
import speciation from './data/speciation.json' with { type: 'json' };

type Case = RawProblem & { id: string; pH: number; ionicStrength: number };
const cases = speciation.cases as unknown as Case[];

describe('PHREEQC 3.8.9', () => {
  test('there are 186 cases', () => expect(cases).toHaveLength(186));

  test.each(cases.map((c) => [c.id, c] as const))('%s', (_, c) => {
    const answer = solveRaw(c);
    expect(Math.abs(answer.pH - c.pH)).toBeLessThan(1e-6);
    expect(Math.abs(answer.ionicStrength - c.ionicStrength)).toBeLessThan(1e-6);
  });

  test('the command line gives the same numbers', () => {
    for (const c of cases) {
      const answer = JSON.parse(answerLine(JSON.stringify(c))) as { id: string; pH: number };
      expect(answer.id).toBe(c.id);
      expect(Math.abs(answer.pH - c.pH), c.id).toBeLessThan(1e-6);
    }
  });
});
