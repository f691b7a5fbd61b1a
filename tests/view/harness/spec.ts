import type { BenchSpec } from '../../../src/bench/types.ts';

const query = new URLSearchParams(globalThis.location?.search ?? '');

/** The first lesson's two beakers, and variations of them by the address' query. */
export const spec: BenchSpec = {
  id: 'water-or-buffer',
  title: 'Water or buffer?',
  intro: 'Same acid, same volume. Which one notices?',
  model: 'textbook',
  temperature_C: 25,
  vessels: [
    {
      id: 'water',
      label: 'Water',
      glass: 'beaker-100',
      probe: true,
      ...(query.has('unstirred') ? {} : { stirrer: 'on' as const }),
      contents: {
        volume_mL: 50,
        water: 'boiled',
        indicators: [{ indicator: 'bromocresol-green', volume_mL: 0.5 }],
      },
    },
    {
      id: 'buffer',
      label: 'Ethanoate buffer',
      glass: 'beaker-100',
      probe: true,
      ...(query.has('unstirred') ? {} : { stirrer: 'on' as const }),
      contents: {
        volume_mL: 50,
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
    {
      id: 'base',
      label: 'Sodium hydroxide',
      kind: 'reagent',
      contents: { volume_mL: 250, parts: [{ substance: 'NaOH', concentration_molL: 0.1 }] },
    },
    {
      id: 'bcg',
      label: 'Bromocresol green',
      kind: 'indicator',
      indicator: { id: 'bromocresol-green', volume_mL: 30 },
    },
    { id: 'wash', label: 'Boiled water', kind: 'wash', contents: { volume_mL: 500, water: 'boiled' } },
  ],
  ...(query.has('hidden') ? { hide: [{ what: ['pH'], until: 'prediction' }] as const } : {}),
  aims: [
    { id: 'yellow', text: 'Turn the water yellow', kind: 'colour', vessel: 'water', words: ['yellow'] },
    {
      id: 'ph',
      text: 'Bring the buffer to pH 4.50 ± 0.02',
      kind: 'pH',
      vessel: 'buffer',
      min: 4.48,
      max: 4.52,
    },
  ],
};
