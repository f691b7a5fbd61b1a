import type { BenchSpec } from '../bench';

/** The bench on the home page: nothing to reach, nothing kept. Real model, as on every free bench. */
export const homeBench: BenchSpec = {
  id: 'home',
  title: 'Try it',
  model: 'real',
  temperature_C: 25,
  vessels: [
    {
      id: 'water',
      label: 'Water',
      glass: 'beaker-100',
      probe: true,
      stirrer: 'on',
      contents: {
        volume_mL: 50,
        water: 'boiled',
        indicators: [{ indicator: 'bromocresol-green', volume_mL: 0.5 }],
      },
    },
    {
      id: 'buffer',
      label: 'Buffer',
      glass: 'beaker-100',
      probe: true,
      stirrer: 'on',
      contents: {
        volume_mL: 50,
        water: 'boiled',
        parts: [
          { substance: 'CH3COOH', concentration_molL: 0.005 },
          { substance: 'CH3COONa', concentration_molL: 0.005 },
        ],
        indicators: [{ indicator: 'bromocresol-green', volume_mL: 0.5 }],
      },
    },
  ],
  shelf: [
    {
      id: 'acid',
      label: 'Hydrochloric acid',
      kind: 'reagent',
      contents: { volume_mL: 250, parts: [{ substance: 'HCl', concentration_molL: 0.1 }] },
    },
  ],
  aims: [],
};
