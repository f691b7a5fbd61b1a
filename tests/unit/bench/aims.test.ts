import { describe, expect, test } from 'vitest';
import { judge, judgeRun, type AimSpec, type BenchSpec } from '../../../src/bench/index.ts';
import { shown } from '../../../src/bench/precision.ts';
import { fullBench, waterOrBuffer, withAims } from './benches.ts';
import { benchOf } from './driver.ts';

const aim = (a: Record<string, unknown>): AimSpec => ({ id: 'aim', text: 'Do it', ...a }) as AimSpec;
const on = (a: Record<string, unknown>, spec: BenchSpec = waterOrBuffer) => benchOf(withAims(spec, [aim(a)]));

describe('aims', () => {
  test('R20 the start meets none, even where its state would', () => {
    on({ kind: 'pH', vessel: 'buffer', min: 4.7, max: 4.8 }).expectMet().swirl('buffer').expectMet('aim');
  });

  test('R20 a pH aim is judged on the two decimals that are displayed', () => {
    const bench = on({ kind: 'pH', vessel: 'buffer', max: 4.39 });
    bench.pickUp('acid').pour('0.95 mL').into('buffer');
    while (!bench.met.includes('aim')) bench.pickUp('acid').drip(1).into('buffer');
    expect(bench.vessel('buffer').pH).toBeLessThanOrEqual(4.39);
    expect(shown(4.395, 2)).toBe(4.4);
    expect(shown(4.3949999999999996, 2)).toBe(4.4);
    expect(shown(-0.005, 2)).toBe(-0);
  });

  test('R20 a colour aim takes the computed word, stronger or paler, and no neighbour', async () => {
    const { sameWords } = await import('../../../src/bench/aims.ts');
    expect(sameWords('yellow', 'yellow')).toBe(true);
    expect(sameWords('pale yellow', 'yellow')).toBe(true);
    expect(sameWords('yellow-green', 'yellow')).toBe(false);
    expect(sameWords('yellow', 'pale yellow')).toBe(false);
  });

  test('volume added, drops and readings entered', () => {
    on({ kind: 'added', vessel: 'water', of: 'acid', min_mL: 0.5, max_mL: 0.5 })
      .pickUp('acid')
      .drip(9)
      .into('water')
      .expectMet()
      .pickUp('acid')
      .drip(1)
      .into('water')
      .expectMet('aim');
    on({ kind: 'drops', vessel: 'water', of: 'acid', min: 2, max: 2 })
      .pickUp('acid')
      .pour('1 mL')
      .into('water')
      .expectMet()
      .pickUp('acid')
      .drip(2)
      .into('water')
      .expectMet('aim');
    const bench = on({ kind: 'reading', vessel: 'burette', within_mL: 0.05 }, fullBench)
      .do({ kind: 'fill', from: 'alkali', into: 'burette' })
      .do({ kind: 'dispense', burette: 'burette', into: 'flask', volume_uL: 12_350 });
    bench.do({ kind: 'enterReading', vessel: 'burette', value_mL: 12.5 }).expectMet();
    bench.do({ kind: 'enterReading', vessel: 'burette', value_mL: 12.4 }).expectMet('aim');
  });

  test('a ratio, equal readings in two vessels, temperature', () => {
    // 0.25 mmol of each; 0.75 mL of 0.10 mol/L acid turns 0.075: 0.175 / 0.325 = 0.54
    // (the dye takes a thousandth of it)
    const ratio = on({ kind: 'ratio', vessel: 'buffer', family: 'ethanoic', min: 0.53, max: 0.55 });
    ratio
      .pickUp('acid')
      .pour('0.70 mL')
      .into('buffer')
      .expectMet()
      .pickUp('acid')
      .drip(1)
      .into('buffer')
      .expectMet('aim');
    on({ kind: 'equal', quantity: 'volume', vessels: ['beaker', 'second'], within: 0 }, fullBench)
      .pickUp('wash')
      .pour('10 mL')
      .into('second')
      .expectMet()
      .pickUp('wash')
      .pour('5 mL')
      .into('second')
      .expectMet('aim');
    on({ kind: 'temperature', vessel: 'beaker', min_C: 37, max_C: 37 }, fullBench)
      .do({ kind: 'setTemperature', vessel: 'beaker', temperature_C: 37 })
      .expectMet('aim');
  });

  test('R21 a met aim stays met, whatever is undone', () => {
    const bench = on({ kind: 'pH', vessel: 'water', max: 3.8 })
      .pickUp('acid')
      .drip(5)
      .into('water')
      .expectMet('aim')
      .undo()
      .startAgain()
      .expectMet('aim');
    expect(judge(bench.spec, bench.state, bench.met)).toEqual([]);
    expect(judgeRun(bench.state)).toEqual([{ id: 'aim', move: 1 }]);
  });

  test('R22 aims in order wait for their turn', () => {
    const spec = {
      ...withAims(waterOrBuffer, [
        { id: 'first', text: 'a', kind: 'pH', vessel: 'buffer', max: 4.5 },
        { id: 'second', text: 'b', kind: 'pH', vessel: 'water', max: 4 },
      ]),
      aimOrder: 'in-order' as const,
    };
    benchOf(spec)
      .pickUp('acid')
      .drip(5)
      .into('water')
      .expectMet()
      .pickUp('acid')
      .pour('1 mL')
      .into('buffer')
      .expectMet('first', 'second');
  });

  test('R22 an aim after another, and limits on what was used', () => {
    const spec = withAims(waterOrBuffer, [
      { id: 'yellow', text: 'a', kind: 'pH', vessel: 'water', max: 4, limits: [{ of: 'acid', max_mL: 0.1 }] },
      { id: 'then', text: 'b', kind: 'pH', vessel: 'buffer', max: 4.72, after: ['yellow'] },
      { id: 'sparing', text: 'c', kind: 'used-at-most', of: 'acid', max_mL: 0.5, with: ['yellow', 'then'] },
    ]);
    benchOf(spec)
      .pickUp('acid')
      .drip(3)
      .into('water')
      .expectMet()
      .startAgain()
      .pickUp('acid')
      .drip(2)
      .into('water')
      .expectMet('yellow')
      .pickUp('acid')
      .drip(3)
      .into('buffer')
      .expectMet('yellow', 'then', 'sparing');
    benchOf(spec)
      .pickUp('acid')
      .drip(2)
      .into('water')
      .pickUp('acid')
      .pour('2 mL')
      .into('buffer')
      .expectMet('yellow', 'then');
  });

  test('a move done so often, and waste that may go', () => {
    const did = on({ kind: 'did', move: 'swirl', vessel: 'buffer', times: 2 })
      .swirl('buffer')
      .swirl('water')
      .expectMet();
    did.undo().undo().swirl('buffer').expectMet().swirl('buffer').expectMet('aim');
    on({ kind: 'waste-pH', min: 6, max: 9, min_mL: 10 })
      .pickUp('alkali')
      .drip(5)
      .into('buffer')
      .do({ kind: 'discard', vessel: 'buffer' })
      .expectMet();
    on({ kind: 'waste-pH', min: 6, max: 9, min_mL: 10 })
      .pickUp('alkali')
      .drip(49)
      .into('buffer')
      .do({ kind: 'discard', vessel: 'buffer' })
      .expectMet('aim');
  });
});
