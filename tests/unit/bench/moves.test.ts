import { describe, expect, test } from 'vitest';
import { apply, applyJoined, createState, movesOf, replay, type Move } from '../../../src/bench/index.ts';
import { fullBench, waterOrBuffer } from './benches.ts';
import { benchOf } from './driver.ts';

describe('pouring and dripping', () => {
  test('R01 water and buffer answer a drop of acid as their chemistry does', () => {
    const bench = benchOf(waterOrBuffer);
    bench.expectPH('buffer', 4.76);
    bench.pickUp('acid').pour('1.00 mL').into('buffer').pickUp('acid').pour('1.00 mL').into('water');
    bench.expectVolume('buffer', 51.5).expectVolume('water', 51.5);
    // 0.25 mmol each, 0.10 mmol H+ added: pKa 4.756 + lg(0.15 / 0.35) = 4.39 (arithmetic of the ratio; pKa Goldberg 2002)
    bench.expectPH('buffer', 4.39, 0.01);
    // 0.10 mmol in 51.5 mL, a little of it taken by the dye: 2.71
    bench.expectPH('water', 2.71, 0.01);
  });

  test('R09 drops in a row become one move, and the result is the same', () => {
    let joined = createState(waterOrBuffer, { seed: 1 });
    const single = benchOf(waterOrBuffer);
    for (let i = 0; i < 7; i++) {
      const move: Move = { kind: 'drip', from: 'acid', into: 'buffer', drops: 1 };
      const outcome = applyJoined(joined, move);
      if (!outcome.ok) throw new Error(outcome.refusal.sentence);
      joined = outcome.state;
      single.do(move);
    }
    expect(movesOf(joined)).toEqual([{ kind: 'drip', from: 'acid', into: 'buffer', drops: 7 }]);
    expect(joined.scene.vessels['buffer']?.liquid.volume_nL).toBe(
      single.state.scene.vessels['buffer']?.liquid.volume_nL,
    );
    single.expectVolume('buffer', 50.85);
  });

  test('R10 a drop is 0.05 mL and volumes are whole microlitres', () => {
    benchOf(waterOrBuffer)
      .pickUp('acid')
      .drip(20)
      .into('water')
      .expectVolume('water', 51.5)
      .refused({ kind: 'pour', from: 'acid', into: 'water', volume_uL: 0.5 }, 'bad-value')
      .refused({ kind: 'drip', from: 'acid', into: 'water', drops: 1.5 }, 'bad-value');
  });

  test('R04 what would overflow is refused and what fits is said', () => {
    const bench = benchOf(waterOrBuffer).refused(
      { kind: 'pour', from: 'acid', into: 'water', volume_uL: 60_000 },
      'overflow',
    );
    expect(bench.lastRefusal?.possible_uL).toBe(49_500);
    expect(bench.lastRefusal?.sentence).toBe('Water is full at 100.0 mL. At most 49.50 mL more fits.');
    bench.pickUp('acid').pour('49.5 mL').into('water').expectVolume('water', 100);
    expect(bench.vessel('water').full).toBe(true);
    bench.refused({ kind: 'drip', from: 'acid', into: 'water', drops: 1 }, 'overflow');
  });

  test('R05 an empty vessel and an emptied bottle refuse, and say what they hold', () => {
    const bench = benchOf(fullBench);
    bench.refused({ kind: 'pour', from: 'flask', into: 'tube', volume_uL: 1000 }, 'vessel-empty');
    bench
      .do({ kind: 'pour', from: 'acid', into: 'flask', volume_uL: 245_000 })
      .refused({ kind: 'pour', from: 'acid', into: 'beaker', volume_uL: 10_000 }, 'bottle-empty');
    expect(bench.lastRefusal?.sentence).toContain('5.00 mL');
    expect(bench.lastRefusal?.possible_uL).toBe(5000);
  });

  test('R29 nothing goes back into a bottle, a burette runs by its tap, a pipette delivers its whole volume', () => {
    const bench = benchOf(fullBench)
      .refused({ kind: 'pour', from: 'beaker', into: 'acid', volume_uL: 1000 }, 'wrong-vessel')
      .refused({ kind: 'pour', from: 'beaker', into: 'beaker', volume_uL: 1000 }, 'same-vessel')
      .do({ kind: 'fill', from: 'alkali', into: 'burette' })
      .refused({ kind: 'pour', from: 'burette', into: 'flask', volume_uL: 1000 }, 'wrong-vessel')
      .do({ kind: 'dispense', burette: 'burette', into: 'flask', volume_uL: 12_350 });
    expect(bench.vessel('burette').burette_mL).toBe(12.35);
    bench
      .do({ kind: 'pipette', pipette: 'pipette', from: 'second', into: 'flask' })
      .expectVolume('flask', 22.35)
      .expectVolume('second', 15);
    bench.refused({ kind: 'dispense', burette: 'flask', into: 'beaker', volume_uL: 1000 }, 'wrong-vessel');
  });

  test('R33 a pour to a mark ends at the mark', () => {
    benchOf(fullBench)
      .pickUp('wash')
      .pourTo(60)
      .into('beaker')
      .expectVolume('beaker', 60)
      .refused({ kind: 'pourToMark', from: 'wash', into: 'beaker', mark_mL: 60 }, 'already-so')
      .refused({ kind: 'pourToMark', from: 'wash', into: 'beaker', mark_mL: 73 }, 'no-such-mark')
      .pickUp('wash')
      .pourTo(100)
      .into('volumetric')
      .expectVolume('volumetric', 100)
      .pickUp('acid')
      .pourTo(12.5)
      .into('cylinder')
      .expectVolume('cylinder', 12.5);
  });

  test('R34 the same to both is one move, both or neither', () => {
    const bench = benchOf(waterOrBuffer).do({
      kind: 'addToBoth',
      from: 'acid',
      into: ['water', 'buffer'],
      drops: 2,
    });
    bench.expectVolume('water', 50.6).expectVolume('buffer', 50.6);
    expect(bench.moves).toHaveLength(1);
    bench.pickUp('acid').pour('45 mL').into('water');
    bench
      .refused({ kind: 'addToBoth', from: 'acid', into: ['buffer', 'water'], volume_uL: 10_000 }, 'overflow')
      .expectVolume('buffer', 50.6);
    bench.undo().undo().expectVolume('water', 50.5).expectVolume('buffer', 50.5);
  });
});

describe('taking back', () => {
  test('R07 R08 undo and start-again are moves, and undo reaches behind both', () => {
    const bench = benchOf(waterOrBuffer);
    const start = bench.state.scene;
    bench.pickUp('acid').drip(1).into('water');
    const one = bench.state.scene;
    bench.pickUp('acid').drip(2).into('water').undo();
    expect(bench.state.scene).toBe(one);
    bench.startAgain();
    expect(bench.state.scene).toEqual(start);
    bench.undo();
    expect(bench.state.scene).toBe(one);
    bench.undo();
    expect(bench.state.scene).toBe(start);
    bench.refused({ kind: 'undo' }, 'nothing-to-undo');
    expect(bench.moves.map((m) => m.kind)).toEqual(['drip', 'drip', 'undo', 'startAgain', 'undo', 'undo']);
  });

  test('R02 former states stay as they were', () => {
    const bench = benchOf(waterOrBuffer);
    const before = bench.state;
    const frozen = JSON.stringify(before.scene);
    bench.pickUp('acid').pour('5 mL').into('buffer').swirl('buffer');
    expect(JSON.stringify(before.scene)).toBe(frozen);
  });

  test('R06 a full run refuses more, and says what to do', () => {
    let state = createState(waterOrBuffer, { seed: 1 });
    for (let i = 0; i < 2000; i++) {
      const o = apply(state, { kind: 'label', vessel: 'water', text: String(i) });
      if (!o.ok) throw new Error(o.refusal.sentence);
      state = o.state;
    }
    const more = apply(state, { kind: 'swirl', vessel: 'water' });
    expect(more.ok ? '' : more.refusal.code).toBe('run-full');
  });

  test('R01 a replay that meets a refused move stops there and says which', () => {
    const result = replay(waterOrBuffer, 1, [
      { kind: 'drip', from: 'acid', into: 'water', drops: 1 },
      { kind: 'pour', from: 'acid', into: 'nowhere', volume_uL: 1000 },
      { kind: 'drip', from: 'acid', into: 'water', drops: 1 },
    ]);
    expect(result).toMatchObject({ ok: false, index: 1, refusal: { code: 'unknown-thing' } });
    expect(result.state.count).toBe(1);
  });
});
