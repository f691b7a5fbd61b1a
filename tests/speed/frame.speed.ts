/** How long one frame of a bench takes: twelve vessels, each solved anew and coloured. */
import { colour, createSolution, indicatorStock, mix, solve } from '../../src/chemistry/index.ts';
import { medianOf } from './samples.ts';

const DYES = ['bromothymol-blue', 'bromocresol-green', 'phenol-red', 'methyl-orange'];

/** Twelve buffers from acid to base, each with one of four indicators, each a little different in every frame. */
const frames = Array.from({ length: 16 }, (_, frame) =>
  Array.from({ length: 12 }, (__, vessel) =>
    mix(
      createSolution({
        parts: [
          { substance: 'CH3COOH', concentration_molL: 0.1 },
          { substance: 'NaH2PO4', concentration_molL: 0.05 },
          { substance: 'NaOH', concentration_molL: 0.014 * vessel + 0.0004 * frame },
        ],
        volume_mL: 50,
      }),
      indicatorStock(DYES[vessel % DYES.length]!, { volume_mL: 0.5 }),
    ),
  ),
);
let next = 0;

function frame(): number {
  let light = 0;
  for (const vessel of frames[next++ & 15]!) light += colour(vessel, 5, solve(vessel, 'real')).xyz[1];
  return light;
}

export const benchmarks = [
  { name: 'frame', unit: 'us', run: () => medianOf(frame, { count: 50, perSecond: 1e6 }) },
];
