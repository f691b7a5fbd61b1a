/** What holds for any list of moves. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  apply,
  createState,
  glassware,
  judge,
  movesOf,
  notebook,
  read,
  replay,
  statesOf,
  trace,
  type BenchSpec,
  type BenchState,
  type Move,
  type Scene,
} from '../../../src/bench/index.ts';
import { carbonateOf } from '../../../src/bench/liquid.ts';
import { volumeOf } from '../../../src/bench/moves/hands.ts';
import type { Solution } from '../../../src/chemistry/types.ts';
import { fullBench } from './benches.ts';

const vessels = fullBench.vessels.map((v) => v.id);
const bottles = fullBench.shelf.map((s) => s.id);
const vessel = fc.constantFrom(...vessels);
const source = fc.constantFrom(...bottles, ...vessels);
const volume_uL = fc.oneof(fc.integer({ min: 1, max: 60_000 }), fc.constantFrom(1000, 5000, 10_000, 25_000));
const drops = fc.oneof(fc.integer({ min: 1, max: 40 }), fc.constant(1));
const two = fc.tuple(vessel, vessel).map(([a, b]) => [a, b] as const);

/** Moves that mean something on the bench with everything, though many are refused. */
const sensible: fc.Arbitrary<Move> = fc.oneof(
  {
    weight: 6,
    arbitrary: fc.record({ kind: fc.constant('pour' as const), from: source, into: vessel, volume_uL }),
  },
  {
    weight: 6,
    arbitrary: fc.record({ kind: fc.constant('drip' as const), from: source, into: vessel, drops }),
  },
  {
    weight: 2,
    arbitrary: fc.record({
      kind: fc.constant('pourToMark' as const),
      from: source,
      into: vessel,
      mark_mL: fc.constantFrom(5, 10, 20, 25, 60, 80, 100),
    }),
  },
  {
    weight: 2,
    arbitrary: fc.record({ kind: fc.constant('addToBoth' as const), from: source, into: two, drops }),
  },
  {
    weight: 3,
    arbitrary: fc.record({
      kind: fc.constant('dispense' as const),
      burette: fc.constant('burette'),
      into: vessel,
      volume_uL,
    }),
  },
  {
    weight: 2,
    arbitrary: fc.record({
      kind: fc.constant('pipette' as const),
      pipette: fc.constant('pipette'),
      from: source,
      into: vessel,
    }),
  },
  { weight: 2, arbitrary: fc.record({ kind: fc.constant('fill' as const), from: source, into: vessel }) },
  {
    weight: 2,
    arbitrary: fc.record({
      kind: fc.constant('addIndicator' as const),
      indicator: fc.constantFrom('green', 'acid'),
      into: vessel,
      drops,
    }),
  },
  { weight: 4, arbitrary: fc.record({ kind: fc.constant('swirl' as const), vessel }) },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('stir' as const), vessel, on: fc.boolean() }) },
  { weight: 3, arbitrary: fc.record({ kind: fc.constant('dipProbe' as const), vessel }) },
  {
    weight: 2,
    arbitrary: fc.constantFrom<Move>(
      { kind: 'liftProbe' },
      { kind: 'rinseProbe' },
      { kind: 'wipe' },
      { kind: 'calibrate', value_pH: 4.01 },
    ),
  },
  {
    weight: 1,
    arbitrary: fc.record({
      kind: fc.constant('setTemperature' as const),
      vessel,
      temperature_C: fc.constantFrom(4, 25, 37.5),
    }),
  },
  { weight: 1, arbitrary: fc.record({ kind: fc.constant('stopper' as const), vessel, on: fc.boolean() }) },
  { weight: 3, arbitrary: fc.record({ kind: fc.constant('discard' as const), vessel }) },
  { weight: 2, arbitrary: fc.record({ kind: fc.constant('rinse' as const), vessel, with: source }) },
  {
    weight: 1,
    arbitrary: fc.record({ kind: fc.constant('label' as const), vessel, text: fc.string({ maxLength: 12 }) }),
  },
  {
    weight: 1,
    arbitrary: fc.record({
      kind: fc.constant('enterReading' as const),
      vessel,
      value_mL: fc.constantFrom(0, 12.35, 50),
    }),
  },
  { weight: 4, arbitrary: fc.constantFrom<Move>({ kind: 'undo' }, { kind: 'startAgain' }) },
);

const specs = fc.constantFrom<BenchSpec>(fullBench, { ...fullBench, careful: true });
const runs = fc.record({
  spec: specs,
  seed: fc.integer({ min: 0, max: 1e6 }),
  list: fc.array(sensible, { maxLength: 60 }),
});

/** Does what is accepted and skips what is refused. */
function work(spec: BenchSpec, seed: number, list: readonly Move[]): BenchState {
  let state = createState(spec, { seed });
  for (const move of list) {
    const outcome = apply(state, move);
    if (outcome.ok) state = outcome.state;
  }
  return state;
}

/** Every liquid of a scene, wherever it is. */
const liquids = (scene: Scene): Solution[] => [
  ...Object.values(scene.vessels).flatMap((v) => [v.liquid, ...(v.layer ? [v.layer] : [])]),
  ...Object.values(scene.bottles),
  scene.waste,
  ...scene.spills.map((s) => s.liquid),
  ...(scene.probe.film ? [scene.probe.film] : []),
];

/** Volume and amounts over the whole bench; carbonate left out where a vessel breathes. */
function matter(scene: Scene): { volume_nL: number; amounts: Record<string, number> } {
  const amounts: Record<string, number> = {};
  let volume_nL = 0;
  for (const liquid of liquids(scene)) {
    volume_nL += liquid.volume_nL;
    for (const [component, n] of Object.entries(liquid.amounts))
      if (component !== 'carbonic') amounts[component] = (amounts[component] ?? 0) + n;
  }
  return { volume_nL, amounts };
}

describe('for any list of moves', () => {
  test('R03 no move loses or makes matter', () => {
    fc.assert(
      fc.property(runs, ({ spec, seed, list }) => {
        const start = matter(createState(spec, { seed }).scene);
        const end = matter(work(spec, seed, list).scene);
        expect(end.volume_nL).toBe(start.volume_nL);
        for (const [component, n] of Object.entries(start.amounts)) {
          expect(Math.abs((end.amounts[component] ?? 0) - n)).toBeLessThanOrEqual(1e-12 * n + 1e-21);
        }
        expect(Object.keys(end.amounts).sort()).toEqual(Object.keys(start.amounts).sort());
      }),
      { numRuns: 150 },
    );
  });

  test('R03 carbonate is conserved where nothing breathes', () => {
    const closed: BenchSpec = {
      ...fullBench,
      vessels: fullBench.vessels.map(({ openTo: _open, ...v }) => v),
    };
    const total = (scene: Scene) => liquids(scene).reduce((sum, l) => sum + carbonateOf(l, 'textbook'), 0);
    fc.assert(
      fc.property(fc.array(sensible, { maxLength: 40 }), (list) => {
        const start = total(createState(closed, { seed: 1 }).scene);
        expect(Math.abs(total(work(closed, 1, list).scene) - start)).toBeLessThanOrEqual(1e-12 * start);
      }),
      { numRuns: 60 },
    );
  });

  test('R04 R05 volumes stay between nothing and the capacity, in whole nanolitres', () => {
    fc.assert(
      fc.property(runs, ({ spec, seed, list }) => {
        for (const { scene } of statesOf(work(spec, seed, list))) {
          for (const v of spec.vessels) {
            const held = scene.vessels[v.id];
            if (!held) throw new Error(v.id);
            expect(volumeOf(held)).toBeLessThanOrEqual(Math.round(glassware[v.glass].capacity_mL * 1e6));
            expect(Number.isInteger(held.liquid.volume_nL) && held.liquid.volume_nL >= 0).toBe(true);
          }
          for (const b of Object.values(scene.bottles)) expect(b.volume_nL).toBeGreaterThanOrEqual(0);
        }
      }),
      { numRuns: 60 },
    );
  });

  test('R08 undo of any move gives the scene before', () => {
    fc.assert(
      fc.property(fc.array(sensible, { maxLength: 25 }), sensible, fc.integer(), (list, move, seed) => {
        const before = work(fullBench, seed, list);
        const done = apply(before, move);
        fc.pre(done.ok && move.kind !== 'undo');
        if (!done.ok) return;
        const back = apply(done.state, { kind: 'undo' });
        expect(back.ok && back.state.scene).toBe(before.scene);
      }),
      { numRuns: 150 },
    );
  });

  test('R01 R18 replaying an accepted list gives the live state', () => {
    fc.assert(
      fc.property(runs, ({ spec, seed, list }) => {
        const live = work(spec, seed, list);
        const again = replay(spec, seed, JSON.parse(JSON.stringify(movesOf(live))) as Move[]);
        expect(again.ok).toBe(true);
        expect(again.state.scene).toEqual(live.scene);
        expect(read(again.state)).toEqual(read(live));
      }),
      { numRuns: 80 },
    );
  });

  test('R01 replaying goes on from any kept state', () => {
    fc.assert(
      fc.property(runs, fc.nat(), ({ spec, seed, list }, cut) => {
        const live = work(spec, seed, list);
        const states = statesOf(live);
        const kept = states[cut % states.length];
        if (!kept) return;
        const rest = replay(kept, seed, movesOf(live).slice(kept.count));
        expect(rest.ok && rest.state.scene).toEqual(live.scene);
      }),
      { numRuns: 40 },
    );
  });

  test('R06 R14 nothing ever throws, and every reading is a number that can be shown', () => {
    fc.assert(
      fc.property(runs, ({ spec, seed, list }) => {
        const state = work(spec, seed, list);
        judge(spec, state, []);
        trace(state);
        expect(notebook(state)).toHaveLength(state.count + 1);
        for (const v of read(state).vessels) {
          for (const n of [v.volume_mL, v.pH, v.temperature_C, v.level_cm])
            if (n !== undefined) expect(Number.isFinite(n)).toBe(true);
          if (v.pH !== undefined) expect(v.probe).toBe(true);
        }
      }),
      { numRuns: 60 },
    );
  });

  test('R06 whatever is given as a move is refused with a sentence or done, never thrown at', () => {
    const kinds = [
      'pour',
      'pourToMark',
      'drip',
      'addToBoth',
      'dispense',
      'pipette',
      'fill',
      'addIndicator',
      'swirl',
      'stir',
      'dipProbe',
      'liftProbe',
      'rinseProbe',
      'calibrate',
      'setTemperature',
      'bubble',
      'stopper',
      'wear',
      'rinse',
      'discard',
      'label',
      'enterReading',
      'wipe',
      'undo',
      'startAgain',
      'toString',
      '__proto__',
      'constructor',
    ];
    const id = fc.oneof(source, fc.constantFrom('__proto__', 'constructor', ''), fc.anything());
    const junk = fc.oneof(
      fc.anything(),
      fc.record(
        {
          kind: fc.constantFrom(...kinds),
          from: id,
          into: fc.oneof(id, fc.array(id, { maxLength: 3 })),
          vessel: id,
          burette: id,
          indicator: id,
          pipette: id,
          with: id,
          volume_uL: fc.anything(),
          drops: fc.anything(),
          mark_mL: fc.anything(),
          on: fc.anything(),
          gas: fc.anything(),
          seconds: fc.anything(),
          what: fc.anything(),
          text: fc.anything(),
          value_mL: fc.anything(),
          value_pH: fc.anything(),
          temperature_C: fc.anything(),
        },
        { requiredKeys: ['kind'] },
      ),
    );
    fc.assert(
      fc.property(fc.array(sensible, { maxLength: 8 }), junk, (list, move) => {
        const state = work(fullBench, 1, list);
        const outcome = apply(state, move as Move);
        if (!outcome.ok) expect(outcome.refusal.sentence).toMatch(/^["A-Z].*[.?]$/s);
        else read(outcome.state);
      }),
      { numRuns: 1500 },
    );
  });
});
