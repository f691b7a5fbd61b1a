import { describe, expect, test } from 'vitest';
import { createState, replay, type BenchSpec } from '../../../src/bench/index.ts';
import { fullBench, waterOrBuffer } from './benches.ts';
import { benchOf } from './driver.ts';

describe('unmixed liquid', () => {
  const still: BenchSpec = {
    ...waterOrBuffer,
    vessels: waterOrBuffer.vessels.map((v) => ({ ...v, stirrer: 'off' as const })),
  };

  test('R11 strong acid in an unstirred beaker makes a part of its own until it is swirled', () => {
    const bench = benchOf(still).pickUp('acid').drip(4).into('buffer');
    expect(bench.vessel('buffer')).toMatchObject({ mixed: false, volume_mL: 50.7 });
    const { layer, colour } = bench.vessel('buffer');
    expect(layer?.hex).not.toBe(colour?.hex);
    expect(layer?.share).toBeCloseTo(1 / 50.7, 3);
    bench.swirl('buffer');
    expect(bench.vessel('buffer').mixed).toBe(true);
    expect(bench.vessel('buffer').layer).toBeUndefined();
  });

  test('R13 the probe in the bulk says that it is not mixed, and swirled it gives what a stirred glass gives', () => {
    const bench = benchOf(still).pickUp('acid').drip(20).into('buffer');
    bench.expectPH('buffer', 4.76);
    expect(bench.vessel('buffer').doubt).toBe('Not mixed: swirl it before you read the pH.');
    bench.swirl('buffer');
    expect(bench.vessel('buffer').doubt).toBeUndefined();
    const stirred = benchOf(waterOrBuffer).pickUp('acid').drip(20).into('buffer');
    expect(bench.vessel('buffer').pH).toBe(stirred.vessel('buffer').pH);
  });

  test('R12 a running stirrer mixes at once, and switching it on mixes', () => {
    const stirred = benchOf(waterOrBuffer).pickUp('acid').drip(20).into('buffer');
    expect(stirred.vessel('buffer').mixed).toBe(true);
    const bench = benchOf(still)
      .pickUp('acid')
      .drip(20)
      .into('buffer')
      .do({ kind: 'stir', vessel: 'buffer', on: true });
    expect(bench.vessel('buffer')).toMatchObject({ mixed: true, stirring: true });
    bench.refused({ kind: 'stir', vessel: 'buffer', on: true }, 'already-so');
    benchOf(fullBench).refused({ kind: 'stir', vessel: 'beaker', on: true }, 'wrong-vessel');
  });

  test('R11 weak liquids spread by themselves, and so does a large pour', () => {
    const bench = benchOf(still).pickUp('buffer').pour('10 mL').into('water');
    expect(bench.vessel('water').mixed).toBe(true);
    const large = benchOf(fullBench).pickUp('acid').pour('50 mL').into('beaker');
    expect(large.vessel('beaker').mixed).toBe(true);
  });

  test('R20 an aim on pH or colour waits for swirling', () => {
    const bench = benchOf({
      ...still,
      aims: [{ id: 'low', text: 'Bring it below 4', kind: 'pH', vessel: 'water', max: 4 }],
    });
    bench.pickUp('acid').drip(10).into('water').expectMet();
    bench.swirl('water').expectMet('low');
  });
});

describe('the hand-held meter', () => {
  test('R14 pH is read only where a probe stands in liquid', () => {
    const bench = benchOf(fullBench);
    expect(bench.vessel('second').pH).toBeUndefined();
    expect(bench.vessel('beaker').pH).toBeDefined();
    bench.do({ kind: 'dipProbe', vessel: 'second' });
    expect(bench.vessel('second').pH).toBeDefined();
    bench.do({ kind: 'liftProbe' });
    expect(bench.vessel('second').pH).toBeUndefined();
    bench
      .refused({ kind: 'dipProbe', vessel: 'flask' }, 'vessel-empty')
      .refused({ kind: 'dipProbe', vessel: 'burette' }, 'wrong-vessel');
    benchOf(waterOrBuffer).refused({ kind: 'dipProbe', vessel: 'water' }, 'no-probe');
  });

  test('R15 an unrinsed probe tints the next reading until it is swirled; a rinsed one does not', () => {
    const spec: BenchSpec = {
      ...fullBench,
      instruments: { meter: { calibration: 'done' } },
      vessels: [
        {
          id: 'acid-glass',
          label: 'Acid',
          glass: 'beaker-50',
          contents: { volume_mL: 20, parts: [{ substance: 'HCl', concentration_molL: 0.1 }] },
        },
        { id: 'clean', label: 'Clean water', glass: 'beaker-50', contents: { volume_mL: 20 } },
      ],
    };
    const dirty = benchOf(spec)
      .do({ kind: 'dipProbe', vessel: 'acid-glass' })
      .expectPH('acid-glass', 1)
      .do({ kind: 'dipProbe', vessel: 'clean' });
    const tinted = dirty.vessel('clean').pH ?? NaN;
    expect(dirty.vessel('clean').doubt).toMatch(/not rinsed/);
    dirty.swirl('clean');
    const swirled = dirty.vessel('clean').pH ?? NaN;
    // 0.05 mL of 0.10 mol/L in 1.05 mL around the tip: 2.32; in 20.05 mL: 3.60 (arithmetic of the dilution)
    expect(tinted).toBeCloseTo(2.32, 1);
    expect(swirled).toBeCloseTo(3.6, 1);
    const rinsed = benchOf(spec)
      .do({ kind: 'dipProbe', vessel: 'acid-glass' })
      .do({ kind: 'liftProbe' })
      .do({ kind: 'rinseProbe' })
      .do({ kind: 'dipProbe', vessel: 'clean' });
    rinsed.expectPH('clean', 7);
    expect(rinsed.vessel('clean').doubt).toBeUndefined();
    rinsed.refused({ kind: 'rinseProbe' }, 'wrong-vessel');
  });

  const calibration: BenchSpec = {
    id: 'calibration',
    title: 'Calibrate',
    model: 'textbook',
    temperature_C: 25,
    vessels: [
      {
        id: 'a',
        label: 'Standard 4',
        glass: 'beaker-50',
        contents: {
          volume_mL: 20,
          parts: [
            { substance: 'CH3COOH', concentration_molL: 0.05 },
            { substance: 'CH3COONa', concentration_molL: 0.00877 },
          ],
        },
      },
      {
        id: 'b',
        label: 'Standard 9',
        glass: 'beaker-50',
        contents: {
          volume_mL: 20,
          parts: [
            { substance: 'NH3', concentration_molL: 0.0289 },
            { substance: 'NH4Cl', concentration_molL: 0.05 },
          ],
        },
      },
    ],
    shelf: [
      { id: 's4', label: 'Standard 4', kind: 'standard', standard_pH: 4, contents: { volume_mL: 10 } },
      { id: 's9', label: 'Standard 9', kind: 'standard', standard_pH: 9.01, contents: { volume_mL: 10 } },
      { id: 'wash', label: 'Wash bottle', kind: 'wash' },
    ],
    instruments: { meter: { calibration: 'ask' } },
    aims: [{ id: 'calibrated', text: 'Calibrate the meter', kind: 'calibrated' }],
  };

  test.each([1, 2, 3, 17, 99])('R16 two right standards make the meter true (seed %i)', (seed) => {
    const bench = benchOf(calibration, seed).do({ kind: 'dipProbe', vessel: 'a' });
    expect(bench.vessel('a').doubt).toBe('The meter is not calibrated.');
    bench.do({ kind: 'calibrate', value_pH: 4 }).expectPH('a', 4).expectMet();
    bench.do({ kind: 'liftProbe' }).do({ kind: 'rinseProbe' }).do({ kind: 'dipProbe', vessel: 'b' });
    bench.do({ kind: 'calibrate', value_pH: 9.01 }).expectPH('b', 9.01).expectMet('calibrated');
    expect(bench.readings.meter).toMatchObject({ calibrated: true, at: 'b' });
    bench
      .do({ kind: 'liftProbe' })
      .do({ kind: 'rinseProbe' })
      .do({ kind: 'dipProbe', vessel: 'a' })
      .expectPH('a', 4, 0.02);
  });

  test('R16 the wrong standard is refused, and so is a pH that stands on no bottle', () => {
    const bench = benchOf(calibration)
      .refused({ kind: 'calibrate', value_pH: 4 }, 'no-probe')
      .do({ kind: 'dipProbe', vessel: 'a' });
    bench
      .refused({ kind: 'calibrate', value_pH: 9.01 }, 'calibration-failed')
      .refused({ kind: 'calibrate', value_pH: 7 }, 'bad-value');
  });

  test('R16 an uncalibrated meter of another run is off by another electrode', () => {
    const shown = [1, 2, 3, 4, 5, 6].map(
      (seed) => benchOf(calibration, seed).do({ kind: 'dipProbe', vessel: 'a' }).vessel('a').pH,
    );
    expect(new Set(shown).size).toBeGreaterThan(3);
  });
});

describe('careful hands', () => {
  const careful: BenchSpec = { ...fullBench, careful: true };
  const titration = (seed: number) =>
    benchOf(careful, seed)
      .do({ kind: 'fill', from: 'alkali', into: 'burette' })
      .do({ kind: 'pipette', pipette: 'pipette', from: 'second', into: 'flask' });
  const real = (bench: ReturnType<typeof benchOf>, id: string) =>
    bench.state.scene.vessels[id]?.liquid.volume_nL ?? NaN;

  test('R17 a pipette delivers within its tolerance, and not the same in two runs', () => {
    const volumes = Array.from({ length: 60 }, (_, seed) => real(titration(seed), 'flask') / 1e6);
    expect(Math.max(...volumes.map((v) => Math.abs(v - 10)))).toBeLessThanOrEqual(0.04); // class B, 10 mL: ISO 648 (from memory)
    expect(new Set(volumes).size).toBeGreaterThan(50);
  });

  test('R18 many drops of a burette never add up to more than its tolerance', () => {
    for (let seed = 0; seed < 25; seed++) {
      const bench = titration(seed);
      const before = real(bench, 'burette');
      for (let i = 0; i < 200; i++) bench.do({ kind: 'drip', from: 'burette', into: 'flask', drops: 1 });
      const delivered = (before - real(bench, 'burette')) / 1e6;
      expect(Math.abs(delivered - 10)).toBeLessThanOrEqual(0.1); // class B, 50 mL: ISO 385
    }
  });

  test('R18 a replay delivers the same, another seed something else', () => {
    const bench = titration(5).do({ kind: 'dispense', burette: 'burette', into: 'flask', volume_uL: 7_350 });
    const again = replay(careful, 5, bench.moves);
    expect(again.ok && again.state.scene).toEqual(bench.state.scene);
    const other = replay(careful, 6, bench.moves);
    expect(other.ok && other.state.scene).not.toEqual(bench.state.scene);
  });

  test('R19 what is poured cannot be unpoured; undoing a swirl and pouring draws nothing new', () => {
    const straight = benchOf(careful, 3).pickUp('acid').pour('5 mL').into('flask');
    straight.refused({ kind: 'undo' }, 'cannot-unpour');
    const detour = benchOf(careful, 3).swirl('beaker').undo().pickUp('acid').pour('5 mL').into('flask');
    expect(detour.state.scene.vessels['flask']).toEqual(straight.state.scene.vessels['flask']);
    straight.startAgain();
    expect(straight.state.scene).toEqual(createState(careful, { seed: 3 }).scene);
  });

  test('R17 a level is read to half a division, and the burette is left to the learner', () => {
    const bench = titration(1);
    expect(((bench.vessel('beaker').volume_mL ?? NaN) / 5) % 1).toBe(0);
    expect(bench.vessel('burette').burette_mL).toBeUndefined();
    expect(bench.vessel('burette').volume_mL).toBeUndefined();
    expect(bench.vessel('burette').meniscus).toMatch(/0\.[01] mL mark/);
    bench
      .do({ kind: 'enterReading', vessel: 'burette', value_mL: 0.05 })
      .refused({ kind: 'enterReading', vessel: 'burette', value_mL: 0.03 }, 'bad-value');
  });
});
