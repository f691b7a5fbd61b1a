import { describe, expect, test } from 'vitest';
import {
  definitionOf,
  listMoves,
  moves,
  offeredMoves,
  type BenchSpec,
  type ShelfItem,
} from '../../../src/bench/index.ts';
import { fullBench, waterOrBuffer } from './benches.ts';
import { benchOf } from './driver.ts';

const strong = (id: string, substance: string, concentration_molL: number): ShelfItem => ({
  id,
  label: id,
  kind: 'reagent',
  contents: { volume_mL: 100, parts: [{ substance, concentration_molL }] },
});
const said = (bench: ReturnType<typeof benchOf>) => bench.readings.notices.map((n) => n.sentence).join(' ');

describe('safety', () => {
  test('R26 goggles first', () => {
    const spec: BenchSpec = { ...waterOrBuffer, safety: { goggles: 'first', gloves: 'first' } };
    const bench = benchOf(spec).refused(
      { kind: 'drip', from: 'acid', into: 'water', drops: 1 },
      'goggles-first',
    );
    bench
      .do({ kind: 'wear', what: 'goggles', on: true })
      .refused({ kind: 'drip', from: 'acid', into: 'water', drops: 1 }, 'gloves-first');
    bench.do({ kind: 'wear', what: 'gloves', on: true }).pickUp('acid').drip(1).into('water');
    expect(bench.readings).toMatchObject({ goggles: true, gloves: true });
    bench.refused({ kind: 'wear', what: 'goggles', on: true }, 'already-so');
  });

  test('R27 swirling a brim-full beaker spills, and the spill has to be wiped up', () => {
    const bench = benchOf(waterOrBuffer)
      .pickUp('acid')
      .pour('49.5 mL')
      .into('water')
      .swirl('water')
      .expectVolume('water', 99.8);
    expect(bench.readings.spills).toEqual([
      { from: 'water', volume_mL: 0.2, sentence: '0.20 mL spilt beside Water. Wipe it up.' },
    ]);
    bench
      .refused({ kind: 'drip', from: 'acid', into: 'buffer', drops: 1 }, 'wipe-first')
      .do({ kind: 'wipe' });
    expect(bench.readings.spills).toEqual([]);
    expect(bench.readings.waste.volume_mL).toBe(0.2);
    bench.pickUp('acid').drip(1).into('buffer').refused({ kind: 'wipe' }, 'nothing-to-wipe');
  });

  test('R28 water into concentrated acid is cautioned, acid into water is not that caution', () => {
    const spec: BenchSpec = {
      ...fullBench,
      shelf: [strong('conc', 'HCl', 6), strong('lye', 'NaOH', 2), ...fullBench.shelf],
    };
    const wrong = benchOf(spec).pickUp('conc').pour('20 mL').into('flask');
    expect(said(wrong)).toMatch(/corrosive: goggles and gloves on.*eyes, rinse at once/);
    wrong.pickUp('wash').pour('10 mL').into('flask');
    expect(said(wrong)).toMatch(
      /Always pour acid into water.*local rules and your school's licensed practice/,
    );
    const right = benchOf(spec).pickUp('conc').pour('5 mL').into('beaker');
    expect(said(right)).not.toMatch(/Always pour/);
    expect(said(benchOf(spec).pickUp('lye').pour('5 mL').into('beaker'))).toMatch(/This alkali is corrosive/);
    expect(said(benchOf(spec).pickUp('acid').pour('5 mL').into('beaker'))).toBe('');
  });

  test('R30 emptied glass keeps one drop until it is rinsed', () => {
    const bench = benchOf(fullBench)
      .pickUp('acid')
      .pour('20 mL')
      .into('flask')
      .do({ kind: 'discard', vessel: 'flask' });
    expect(bench.vessel('flask')).toMatchObject({ empty: true, volume_mL: 0.05 });
    const before = bench.state.scene.vessels['flask']?.liquid.amounts['Cl-'] ?? NaN;
    bench.do({ kind: 'rinse', vessel: 'flask', with: 'wash' });
    const after = bench.state.scene.vessels['flask']?.liquid.amounts['Cl-'] ?? NaN;
    expect(after / before).toBeCloseTo(0.05 / 5.05, 6);
    bench
      .refused({ kind: 'rinse', vessel: 'beaker', with: 'wash' }, 'wrong-vessel')
      .refused({ kind: 'discard', vessel: 'flask' }, 'vessel-empty');
  });

  test('R31 the waste shows its mixed pH and volume and what to do with it', () => {
    const bench = benchOf(waterOrBuffer)
      .pickUp('acid')
      .pour('5 mL')
      .into('water')
      .do({ kind: 'discard', vessel: 'water' });
    expect(bench.readings.waste.volume_mL).toBe(55.45);
    expect(bench.readings.waste.sentence).toMatch(
      /^The waste holds 55\.45 mL at pH 2\.05\. Bring it to between pH 6 and 9 with dilute alkali.*local rules/,
    );
    expect(said(bench)).toBe(bench.readings.waste.sentence);
  });
});

describe('the registry', () => {
  test('R40 every move has a name, a sentence and a key of its own', () => {
    const all = [...Object.values(moves), ...Object.values(listMoves)];
    for (const m of all) {
      expect(m.name).toMatch(/^[A-Z][a-z ]+$/);
      expect(m.label).toMatch(/^[A-Z].*\.$/);
    }
    const keys = all.flatMap((m) => m.key ?? []);
    expect(new Set(keys).size).toBe(keys.length);
    expect(definitionOf('toString')).toBeNull();
  });

  test('a bench offers what its glass and shelf allow, and no more than it lists', () => {
    expect(offeredMoves(waterOrBuffer)).toEqual([
      'pour',
      'pourToMark',
      'drip',
      'addToBoth',
      'addIndicator',
      'swirl',
      'stir',
      'bubble',
      'wear',
      'rinse',
      'discard',
      'label',
      'wipe',
      'undo',
      'startAgain',
    ]);
    const few: BenchSpec = { ...waterOrBuffer, moves: ['drip'] };
    expect(offeredMoves(few)).toEqual(['drip', 'wear', 'wipe', 'undo', 'startAgain']);
    benchOf(few)
      .refused({ kind: 'pour', from: 'acid', into: 'water', volume_uL: 100 }, 'not-offered')
      .pickUp('acid')
      .drip(1)
      .into('water')
      .undo();
  });
});
