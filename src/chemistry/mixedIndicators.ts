/** Mixed indicators: several dyes in one bottle. Their colours need nothing of their own; absorbances add. */
import { checked, ChemistryError, nearestWord } from './errors.ts';
import { indicatorStock, mix } from './solution.ts';
import type { Solution } from './types.ts';

export interface MixedIndicator {
  readonly id: string;
  readonly name: string;
  /** g of each dye in 100 mL of stock. */
  readonly grams: Readonly<Record<string, number>>;
  readonly source: string;
}

export const mixedIndicators: Readonly<Record<string, MixedIndicator>> = {
  universal: {
    id: 'universal',
    name: 'universal indicator',
    grams: { 'thymol-blue': 0.005, 'methyl-red': 0.025, 'bromothymol-blue': 0.06, phenolphthalein: 0.06 },
    source: 'A common recipe for 100 mL, from memory',
  },
  yamada: {
    id: 'yamada',
    name: "Yamada's universal indicator",
    grams: { 'thymol-blue': 0.0025, 'methyl-red': 0.006, 'bromothymol-blue': 0.03, phenolphthalein: 0.05 },
    source:
      'Yamada, Japanese patent 99 664 (1933), Chem. Abstr. 28 (1934) 2258: 0.025 g, 0.060 g, 0.300 g and 0.500 g in a litre',
  },
  'thymol-blue-cresol-red': {
    id: 'thymol-blue-cresol-red',
    name: 'thymol blue and cresol red, 3 to 1',
    grams: { 'thymol-blue': 0.075, 'cresol-red': 0.025 },
    source: 'Handbook recipe (yellow to violet about pH 8.3), from memory',
  },
};

/**
 * Aqueous stock of a mixed indicator, every dye as its sodium salt.
 * @param id of `mixedIndicators`
 * @param o.volume_mL 0 or more
 * @throws ChemistryError where there is no such indicator
 */
export function mixedIndicatorStock(
  id: string,
  o: { readonly volume_mL: number; readonly temperature_C?: number },
): Solution {
  const recipe = Object.hasOwn(mixedIndicators, id) ? mixedIndicators[id] : undefined;
  if (!recipe)
    throw new ChemistryError(
      'indicator',
      `There is no mixed indicator '${id}'.`,
      nearestWord(id, Object.keys(mixedIndicators)),
    );
  const volume_mL = checked('volume_mL', o.volume_mL, 'a number of mL');
  // Each dye from a share of the volume, made stronger by as much, so that the whole has the recipe's strength.
  const dyes = Object.entries(recipe.grams);
  const stocks = dyes.map(([dye, grams]) =>
    indicatorStock(dye, { ...o, massPercent: grams * dyes.length, volume_mL: volume_mL / dyes.length }),
  );
  return { ...stocks.reduce(mix), volume_nL: Math.round(volume_mL * 1e6) };
}
