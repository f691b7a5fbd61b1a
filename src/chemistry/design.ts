/** Mixtures sought by what they should do: a wanted pH, a change of colour. */
import { colour } from './colour.ts';
import { pHOf } from './equilibrium.ts';
import { checked, ChemistryError } from './errors.ts';
import { createSolution, mix } from './solution.ts';
import type { Colour, Model, Solution } from './types.ts';

export interface PairWanted {
  /** Formula or name of the weak acid and of its conjugate base (or of a strong base that makes it). */
  readonly acid: string;
  readonly base: string;
  /** Of both together, mol/L. */
  readonly total_molL: number;
  readonly volume_mL: number;
  readonly temperature_C?: number;
  readonly pH: number;
}

export interface PairFound {
  readonly solution: Solution;
  readonly acid_molL: number;
  readonly base_molL: number;
  readonly pH: number;
}

const HALVINGS = 60;

/**
 * The mixture of an acid and a base that has a wanted pH, their concentrations adding up to a given total. Found by halving the share
 * of base, with everything the model knows: activities, temperature, the acid's own dissociation.
 * @throws ChemistryError where neither the acid nor the base alone reaches that pH; its message says what they do reach
 */
export function mixtureOfPH(wanted: PairWanted, model: Model): PairFound {
  const total = checked('total_molL', wanted.total_molL, 'a number of mol/L', Number.MIN_VALUE);
  const pH = checked('pH', wanted.pH, 'a pH', -3, 17);
  const at = (share: number) =>
    createSolution({
      parts: [
        { substance: wanted.acid, concentration_molL: total * (1 - share) },
        { substance: wanted.base, concentration_molL: total * share },
      ],
      volume_mL: checked('volume_mL', wanted.volume_mL, 'a number of mL', Number.MIN_VALUE),
      ...(wanted.temperature_C === undefined ? {} : { temperature_C: wanted.temperature_C }),
    });
  const [lowest, highest] = [pHOf(at(0), model), pHOf(at(1), model)];
  if (!(pH >= lowest && pH <= highest))
    throw new ChemistryError(
      'pH',
      `${wanted.acid} and ${wanted.base} at ${total} mol/L reach pH ${lowest.toFixed(2)} to ${highest.toFixed(2)}; pH ${pH} lies outside.`,
    );
  let low = 0;
  let high = 1;
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    if (pHOf(at(middle), model) < pH) low = middle;
    else high = middle;
  }
  const share = (low + high) / 2;
  const solution = at(share);
  return {
    solution,
    acid_molL: total * (1 - share),
    base_molL: total * share,
    pH: pHOf(solution, model),
  };
}

export interface DropsFound {
  readonly drops: number;
  readonly before: Colour;
  readonly after: Colour;
  readonly pH: number;
}

/** One drop of a dropper, mL: 20 to the millilitre (common practice, from memory; real ones hold 0.03 to 0.07). */
export const DROP_mL = 0.05;

/**
 * Drops of a stock until the colour has changed.
 * @param path_cm length of the way through the liquid; taken as constant, though each drop raises the level a little
 * @param options.changed whether a colour counts as another one than the first; where it is left out, when its words differ
 * @param options.most gives up after so many drops; 2000 where it is left out
 * @returns null where no so many drops change it: which is 'not found', never 'impossible'
 * @throws ChemistryError as `solve` does
 */
export function dropsToChange(
  solution: Solution,
  stock: Solution,
  path_cm: number,
  model: Model,
  options: {
    readonly changed?: (now: Colour, first: Colour) => boolean;
    readonly drop_mL?: number;
    readonly most?: number;
  } = {},
): DropsFound | null {
  const { changed = (now, first) => now.words !== first.words, drop_mL = DROP_mL, most = 2000 } = options;
  checked('drop_mL', drop_mL, 'a number of mL', 0.001, 1);
  if (stock.volume_nL === 0) throw new ChemistryError('stock', 'The dropper is empty.');
  const drop_nL = Math.round(drop_mL * 1e6);
  const share = drop_nL / stock.volume_nL;
  const amounts: Record<string, number> = {};
  for (const id in stock.amounts) amounts[id] = stock.amounts[id]! * share;
  const drop: Solution = { ...stock, volume_nL: drop_nL, amounts };
  const before = colour(solution, path_cm, model);
  let now = solution;
  for (let drops = 1; drops <= most; drops++) {
    now = mix(now, drop);
    const after = colour(now, path_cm, model);
    if (changed(after, before)) return { drops, before, after, pH: pHOf(now, model) };
  }
  return null;
}
