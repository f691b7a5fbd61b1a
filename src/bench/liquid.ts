/** Liquids on the bench: the one place where the bench asks chemistry. Answers are remembered for each liquid. */
import {
  colour as computeColour,
  createSolution,
  indicatorStock,
  mix,
  solve as computeSolve,
  take as takeFrom,
  water,
} from '../chemistry/index.ts';
import type { Colour, Equilibrium, Model, Solution } from '../chemistry/types.ts';
import { uniform } from './seed.ts';
import type { Contents, Drawn, ShelfItem } from './types.ts';

const NL = 1e6;

/** A liquid of no volume, to begin sums with. */
export const nothing = (temperature_C: number): Solution => ({ volume_nL: 0, temperature_C, amounts: {} });

/** Both liquids together; either may have no volume. */
export const join = (a: Solution, b: Solution): Solution =>
  a.volume_nL === 0 ? b : b.volume_nL === 0 ? a : mix(a, b);

const solved: Record<Model, WeakMap<Solution, Equilibrium>> = {
  textbook: new WeakMap(),
  real: new WeakMap(),
};

/** Parts of one liquid are alike in everything but volume: what was computed for the whole holds for them. */
const partOf = new WeakMap<Solution, Solution>();

/** Takes a volume out of a liquid, in whole nanolitres. */
export function take(liquid: Solution, volume_nL: number): { taken: Solution; left: Solution } {
  const parts = takeFrom(liquid, volume_nL);
  const like = partOf.get(liquid) ?? liquid;
  if (parts.taken.volume_nL > 0) partOf.set(parts.taken, like);
  if (parts.left.volume_nL > 0) partOf.set(parts.left, like);
  return parts;
}

/** pH of a liquid; of a part, that of the liquid which it was taken from. */
export const pHOf = (liquid: Solution, model: Model): number => solve(partOf.get(liquid) ?? liquid, model).pH;

/** The equilibrium of a liquid, computed once for each liquid and model. */
export function solve(liquid: Solution, model: Model): Equilibrium {
  const known = solved[model].get(liquid);
  if (known) return known;
  const found = computeSolve(liquid, model);
  solved[model].set(liquid, found);
  return found;
}

const seen: Record<Model, WeakMap<Solution, Map<number, Colour>>> = {
  textbook: new WeakMap(),
  real: new WeakMap(),
};

/** The colour of a liquid through so many centimetres, computed once for each. */
export function colourOf(liquid: Solution, path_cm: number, model: Model): Colour {
  let paths = seen[model].get(liquid);
  if (!paths) seen[model].set(liquid, (paths = new Map()));
  const known = paths.get(path_cm);
  if (known) return known;
  const found = computeColour(liquid, path_cm, solve(liquid, model));
  paths.set(path_cm, found);
  return found;
}

/** A number as it stands, or this run's draw from its range. */
export function drawn(value: Drawn, seed: number, what: string): number {
  if (typeof value === 'number') return value;
  const steps = Math.max(0, Math.round((value.to - value.from) / value.step));
  const k = Math.floor(uniform(seed, 'drawn', what) * (steps + 1));
  return Number((value.from + k * value.step).toPrecision(12));
}

/** Adds dissolved substances and what is in the water, volumes counted once: the water is what they are dissolved in. */
function dissolved(contents: Contents, temperature_C: number, seed: number, id: string): Solution {
  const kind = contents.water ?? 'boiled';
  const plain = water(kind, contents.volume_mL, temperature_C);
  if (!contents.parts?.length) return plain;
  const made = createSolution({
    parts: contents.parts.map((part) => ({
      substance: part.substance,
      concentration_molL: drawn(part.concentration_molL, seed, `${id}/${part.substance}`),
    })),
    volume_mL: contents.volume_mL,
    temperature_C,
  });
  const amounts: Record<string, number> = { ...made.amounts };
  for (const [component, amount] of Object.entries(plain.amounts))
    amounts[component] = (amounts[component] ?? 0) + amount;
  return { ...made, amounts };
}

/**
 * What a glass or bottle holds at the start.
 * @param bench_C the bench's temperature, where the contents name none
 * @param seed,id decide what is drawn for ranges
 */
export function liquidOf(
  contents: Contents | undefined,
  bench_C: number,
  seed: number,
  id: string,
): Solution {
  if (!contents || contents.volume_mL <= 0) return nothing(bench_C);
  const temperature_C = contents.temperature_C ?? bench_C;
  return (contents.indicators ?? []).reduce(
    (sum, dose) => join(sum, stock(dose.indicator, dose.massPercent, dose.volume_mL, temperature_C)),
    dissolved(contents, temperature_C, seed, id),
  );
}

function stock(
  indicator: string,
  massPercent: number | undefined,
  volume_mL: number,
  temperature_C: number,
): Solution {
  const made = indicatorStock(indicator, { massPercent: massPercent ?? 0.1, volume_mL });
  return made.temperature_C === temperature_C ? made : { ...made, temperature_C };
}

/** What a bottle on the shelf holds at the start. A wash bottle without contents holds 500 mL of boiled water. */
export function bottleOf(item: ShelfItem, bench_C: number, seed: number): Solution {
  if (item.indicator)
    return stock(item.indicator.id, item.indicator.massPercent, item.indicator.volume_mL, bench_C);
  if (!item.contents && item.kind === 'wash') return water('boiled', 500, bench_C);
  return liquidOf(item.contents, bench_C, seed, item.id);
}

/** Concentration of H3O+ (charge 1) or OH- (charge -1), mol/L. */
export function concentrationOf(liquid: Solution, model: Model, charge: 1 | -1): number {
  if (liquid.volume_nL === 0) return 0;
  const species = solve(liquid, model).species.find((s) => s.component === 'water' && s.charge === charge);
  return species ? species.amount_mol / (liquid.volume_nL / NL / 1000) : 0;
}

/** A liquid cut off from its gas keeps the carbonate that it held at that moment. */
export function sealed(liquid: Solution, model: Model): Solution {
  const { gas, ...rest } = liquid;
  if (!gas) return liquid;
  return { ...rest, amounts: { ...liquid.amounts, carbonic: carbonateOf(liquid, model) } };
}

/** All carbonate in a liquid, in every form, mol. */
export const carbonateOf = (liquid: Solution, model: Model): number =>
  liquid.gas && liquid.volume_nL > 0
    ? solve(liquid, model).species.reduce(
        (sum, s) => (s.component === 'carbonic' ? sum + s.amount_mol : sum),
        0,
      )
    : (liquid.amounts['carbonic'] ?? 0);
