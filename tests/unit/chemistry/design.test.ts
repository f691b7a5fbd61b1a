/** Mixtures sought by what they should do; mixed indicators. */
import { describe, expect, test } from 'vitest';
import {
  colour,
  createSolution,
  dropsToChange,
  indicatorStock,
  mix,
  mixedIndicators,
  mixedIndicatorStock,
  mixtureOfPH,
  pHOf,
} from '../../../src/chemistry/index.ts';

describe('a mixture of a wanted pH', () => {
  test('by the textbook follows Henderson and Hasselbalch where water does not matter', () => {
    const found = mixtureOfPH(
      { acid: 'CH3COOH', base: 'CH3COONa', total_molL: 0.2, volume_mL: 100, pH: 4.756 },
      'textbook',
    );
    expect(found.base_molL / found.acid_molL).toBeCloseTo(1, 2);
    expect(found.pH).toBeCloseTo(4.756, 9);
  });
  test.each([6.2, 6.8, 7.4])('real, phosphate, pH %d at 37 °C', (pH) => {
    const wanted = {
      acid: 'NaH2PO4',
      base: 'Na2HPO4',
      total_molL: 0.1,
      volume_mL: 250,
      temperature_C: 37,
      pH,
    };
    const { solution, acid_molL, base_molL } = mixtureOfPH(wanted, 'real');
    expect(pHOf(solution, 'real')).toBeCloseTo(pH, 9);
    expect(acid_molL + base_molL).toBeCloseTo(0.1, 12);
    expect(solution.temperature_C).toBe(37);
  });
  test('out of reach: says what is reached', () => {
    const wanted = { acid: 'CH3COOH', base: 'CH3COONa', total_molL: 0.2, volume_mL: 100, pH: 11 };
    expect(() => mixtureOfPH(wanted, 'textbook')).toThrow(/reach pH 2\.7\d to 9\.0\d; pH 11 lies outside/);
  });
});

describe('drops to a change of colour', () => {
  const seen = (parts: { substance: string; concentration_molL: number }[]) =>
    mix(createSolution({ parts, volume_mL: 50 }), indicatorStock('bromothymol-blue', { volume_mL: 0.5 }));
  const acid = createSolution({ parts: [{ substance: 'HCl', concentration_molL: 0.1 }], volume_mL: 10 });

  test('water with a little alkali changes at once, a buffer after many', () => {
    const water = dropsToChange(seen([{ substance: 'NaOH', concentration_molL: 1e-5 }]), acid, 5, 'real')!;
    const buffer = dropsToChange(
      seen(['NaH2PO4', 'Na2HPO4'].map((substance) => ({ substance, concentration_molL: 0.05 }))),
      acid,
      5,
      'real',
    )!;
    expect(water.drops).toBeLessThanOrEqual(2);
    expect(buffer.drops).toBeGreaterThan(10 * water.drops);
    expect(buffer.before.words).not.toBe(buffer.after.words);
  });
  test('one drop less has not changed it', () => {
    const start = seen(['NaH2PO4', 'Na2HPO4'].map((substance) => ({ substance, concentration_molL: 0.01 })));
    const { drops } = dropsToChange(start, acid, 5, 'real')!;
    expect(dropsToChange(start, acid, 5, 'real', { most: drops - 1 })).toBeNull();
  });
  test('not found is null, and what counts as a change can be said', () => {
    const start = seen([]);
    expect(dropsToChange(start, acid, 5, 'real', { changed: () => false, most: 5 })).toBeNull();
    expect(dropsToChange(start, acid, 5, 'real', { changed: () => true })!.drops).toBe(1);
  });
});

describe('mixed indicators', () => {
  test.each(Object.keys(mixedIndicators))('%s: the bottle holds what the recipe says', (id) => {
    const bottle = mixedIndicatorStock(id, { volume_mL: 100 });
    expect(bottle.volume_nL).toBe(1e8);
    for (const [dye, grams] of Object.entries(mixedIndicators[id]!.grams)) {
      const alone = indicatorStock(dye, { massPercent: grams, volume_mL: 100 });
      expect(bottle.amounts[dye]! / alone.amounts[dye]!).toBeCloseTo(1, 12);
    }
  });

  test('universal indicator goes from red over yellow and green to blue and purple', () => {
    const words = [3, 6, 7, 8, 10.5].map((pH) => {
      const buffer =
        pH < 5
          ? mixtureOfPH({ acid: 'citric acid', base: 'NaOH', total_molL: 0.05, volume_mL: 50, pH }, 'real')
          : mixtureOfPH(
              pH < 9
                ? { acid: 'NaH2PO4', base: 'Na2HPO4', total_molL: 0.05, volume_mL: 50, pH }
                : { acid: 'NaHCO3', base: 'Na2CO3', total_molL: 0.05, volume_mL: 50, pH },
              'real',
            );
      const dyed = mix(buffer.solution, mixedIndicatorStock('universal', { volume_mL: 0.5 }));
      return colour(dyed, 5, 'real').words;
    });
    expect(words[0]).toMatch(/red|pink/);
    expect(words[1]).toMatch(/yellow|orange/);
    expect(words[2]).toMatch(/green/);
    expect(words[3]).toMatch(/green|blue/);
    expect(words[4]).toMatch(/blue|purple|violet/);
  });

  test('an unknown one is answered with the nearest', () => {
    expect(() => mixedIndicatorStock('universl', { volume_mL: 1 })).toThrow(
      expect.objectContaining({ field: 'indicator', nearest: 'universal' }),
    );
  });
});
