/** How long the server takes to replay and judge a run of 500 moves. */
import { judge, read, replay, type BenchSpec, type Move } from '../../src/bench/index.ts';

const dye = [{ indicator: 'bromocresol-green', volume_mL: 0.5 }];

/** The bench of the lesson that meets a buffer, with aims that have to be judged after every move until the last. */
const spec: BenchSpec = {
  id: 'water-or-buffer',
  title: 'Water or buffer?',
  model: 'real',
  temperature_C: 25,
  vessels: [
    {
      id: 'water',
      label: 'Water',
      glass: 'beaker-250',
      probe: true,
      stirrer: 'on',
      contents: { volume_mL: 50, indicators: dye },
    },
    {
      id: 'buffer',
      label: 'Ethanoate buffer',
      glass: 'beaker-250',
      probe: true,
      contents: {
        volume_mL: 50,
        indicators: dye,
        parts: [
          { substance: 'CH3COOH', concentration_molL: 0.1 },
          { substance: 'CH3COONa', concentration_molL: 0.1 },
        ],
      },
    },
  ],
  shelf: ['HCl', 'NaOH'].map((substance) => ({
    id: substance,
    label: substance,
    kind: 'reagent',
    contents: { volume_mL: 500, parts: [{ substance, concentration_molL: 0.1 }] },
  })),
  aims: [
    { id: 'low', text: 'Bring the buffer below 3', kind: 'pH', vessel: 'buffer', max: 3 },
    { id: 'ratio', text: 'A ratio of 9', kind: 'ratio', vessel: 'buffer', family: 'ethanoic', min: 9 },
    { id: 'equal', text: 'Equal', kind: 'equal', quantity: 'pH', vessels: ['water', 'buffer'], within: 0 },
  ],
};

const MOVES = 500;

/** Drops and pours into a stirred and an unstirred beaker, swirls, and every tenth move taken back. */
function moves(): Move[] {
  return Array.from({ length: MOVES }, (_, i): Move => {
    if (i % 10 === 9) return { kind: 'undo' };
    if (i % 10 === 8) return { kind: 'swirl', vessel: 'buffer' };
    const from = i % 40 < 20 ? 'HCl' : 'NaOH';
    return i % 3 === 0
      ? { kind: 'pour', from, into: 'buffer', volume_uL: 250 }
      : { kind: 'drip', from, into: i % 2 === 0 ? 'water' : 'buffer', drops: 1 + (i % 4) };
  });
}

/** One replay as the server does it: every move applied and judged, the last state read. */
function once(list: readonly Move[]): void {
  const met: string[] = [];
  const done = replay(spec, 1, list, (state) => met.push(...judge(spec, state, met)));
  if (!done.ok) throw new Error(`Move ${done.index} was refused: ${done.refusal.sentence}`);
  read(done.state);
}

const WARM_UP = 10;
const SAMPLES = 60;

export const benchmarks = [
  {
    name: 'replay',
    unit: 'ms',
    run: async (): Promise<{ median: number; samples: number }> => {
      const list = moves();
      for (let i = 0; i < WARM_UP; i++) once(list);
      const times: number[] = [];
      for (let i = 0; i < SAMPLES; i++) {
        const begun = performance.now();
        once(list);
        times.push(performance.now() - begun);
        await new Promise((resolve) => setImmediate(resolve));
      }
      times.sort((a, b) => a - b);
      return { median: times[Math.floor(SAMPLES / 2)] ?? NaN, samples: SAMPLES };
    },
  },
];
