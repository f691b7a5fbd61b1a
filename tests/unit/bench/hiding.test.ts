import { describe, expect, test } from 'vitest';
import {
  describe as describeScene,
  fairness,
  forBrowser,
  ledger,
  notebook,
  notebookCsv,
  pairBar,
  read,
  speciesBars,
  trace,
  type BenchSpec,
  type Hideable,
  type HideSpec,
  type Seen,
} from '../../../src/bench/index.ts';
import { waterOrBuffer } from './benches.ts';
import { benchOf } from './driver.ts';

const hiding = (what: Hideable[], until: HideSpec['until'] = 'prediction', of?: string[]): BenchSpec => ({
  ...waterOrBuffer,
  hide: [of ? { what, until, of } : { what, until }],
  aims: [{ id: 'low', text: 'Bring it below 4.5', kind: 'pH', vessel: 'buffer', max: 4.5 }],
});

/** Everything that any output says of a run. */
function everything(spec: BenchSpec, seen: Seen = {}): string {
  const { state } = benchOf(spec)
    .pickUp('acid')
    .pour('1.37 mL')
    .into('buffer')
    .pickUp('acid')
    .drip(3)
    .into('water')
    .do({ kind: 'discard', vessel: 'water' });
  const rows = notebook(state, seen);
  return JSON.stringify([
    read(state, seen),
    trace(state, seen),
    ledger(state, 'buffer', seen),
    pairBar(state, 'buffer', seen),
    speciesBars(state, 'buffer', seen),
    rows,
    notebookCsv(rows),
    describeScene(read(state, seen)),
    fairness(state, ['water', 'buffer'], 'contents', seen),
  ]);
}

const open = everything(waterOrBuffer);

describe('hidden means absent', () => {
  test.each<[Hideable, RegExp]>([
    ['pH', /"pH":\d|pH \d|"base_mmol"|"curve"/],
    ['colour', /"hex"|"words"|#[0-9a-f]{6}/],
    ['volume', /51\.87|1\.37/],
    ['contents', /0\.0050 mol|"base_mmol":/],
    ['ledger', /"change_mmol"|"base_mmol"|"mmol"/],
    ['trace', /"curve"/],
  ])('R23 %s is in no output until the prediction is locked, and is there afterwards', (what, sign) => {
    expect(open).toMatch(sign);
    expect(everything(hiding([what]))).not.toMatch(sign);
    expect(everything(hiding([what]), { predicted: true })).toMatch(sign);
  });

  test('R23 the tag knows that something is hidden, so that it can show "?"', () => {
    const tag = benchOf(hiding(['pH'], 'prediction', ['buffer'])).vessel('buffer');
    expect(tag.hidden).toEqual(['pH']);
    expect(tag.probe).toBe(true);
    expect('pH' in tag).toBe(false);
  });

  test('R23 hidden until an aim is met, until the end, for one vessel alone, for good', () => {
    const until = (u: HideSpec['until'], metAims: string[]) =>
      read(benchOf(hiding(['pH'], u, ['buffer'])).state, { metAims }).vessels[1]?.pH;
    expect(until({ aim: 'low' }, [])).toBeUndefined();
    expect(until({ aim: 'low' }, ['low'])).toBe(4.76);
    expect(until('end', ['low'])).toBe(4.76);
    expect(until('never', ['low'])).toBeUndefined();
    expect(read(benchOf(hiding(['pH'], 'never', ['buffer'])).state).vessels[0]?.pH).toBeDefined();
  });

  test('R23 an aim is judged also while its reading is hidden', () => {
    benchOf(hiding(['pH', 'colour']))
      .pickUp('acid')
      .pour('1 mL')
      .into('buffer')
      .expectMet('low');
  });
});

describe('samples', () => {
  const unknown: BenchSpec = {
    ...waterOrBuffer,
    shelf: [],
    vessels: [
      { id: 'x', label: 'X', glass: 'beaker-50', probe: true },
      { id: 'y', label: 'Y', glass: 'beaker-50', probe: true },
      { id: 'z', label: 'Z', glass: 'beaker-50', probe: true },
    ],
    samples: [
      {
        id: 'three',
        into: ['x', 'y', 'z'],
        graded: true,
        contents: [
          { name: 'strong', volume_mL: 20, parts: [{ substance: 'HCl', concentration_molL: 0.01 }] },
          {
            name: 'weak',
            volume_mL: 20,
            parts: [{ substance: 'CH3COOH', concentration_molL: { from: 0.05, to: 0.15, step: 0.01 } }],
          },
          { name: 'plain', volume_mL: 20 },
        ],
      },
    ],
  };
  const order = (seed: number) => read(benchOf(unknown, seed).state).vessels.map((v) => v.pH);

  test('R24 the same run deals the same, other runs deal otherwise', () => {
    expect(order(4)).toEqual(order(4));
    expect(new Set(Array.from({ length: 40 }, (_, s) => order(s).join())).size).toBeGreaterThan(10);
    const places = Array.from({ length: 300 }, (_, s) => order(s).indexOf(2));
    for (const place of [0, 1, 2]) expect(places.filter((p) => p === place).length).toBeGreaterThan(60);
  });

  test('R23 what was dealt is not named until the end', () => {
    const { state } = benchOf(unknown, 1);
    expect(JSON.stringify([read(state), notebook(state), describeScene(read(state))])).not.toMatch(
      /strong|weak|plain|mol\/L|HCl/,
    );
  });

  test('R25 the browser gets neither contents nor names of graded samples', () => {
    expect(JSON.stringify(forBrowser(unknown))).not.toMatch(/strong|weak|plain|HCl|CH3COOH/);
    expect(forBrowser(waterOrBuffer)).toBe(waterOrBuffer);
  });
});
