/**
 * Mixtures as authors write them: '50 mL of 0.10 mol/L CH3COOH and 0.10 mol/L CH3COONa + 2 drops of 0.10 mol/L HCl'.
 * The same language describes numeric keys, computed quantities and the tubes that are poured to show an answer.
 */
import { mix, solve, water } from '../chemistry/index.ts';
import { createSolution, indicatorStock } from '../chemistry/index.ts';
import { findSubstance, substances } from '../chemistry/substances.ts';
import { indicatorData } from '../chemistry/indicatorData.ts';
import type { Model, Solution } from '../chemistry/types.ts';
import { createState, DROP_UL, type BenchSpec } from '../bench/index.ts';
import { nearest } from './nearest.ts';

/** A mistake in a formula or mixture: what was found, and the corrected form where one is near. */
export class FormulaError extends Error {
  constructor(
    message: string,
    readonly found?: string,
    readonly fix?: string,
  ) {
    super(message);
    this.name = 'FormulaError';
  }
}

/** A number, or the name of one that varies from learner to learner. */
export type Amount = number | { readonly name: string };

export interface Solute {
  readonly substance: string;
  readonly concentration_molL: Amount;
}

/** What one portion is made of. */
export type Stuff =
  | { readonly kind: 'solution'; readonly solutes: readonly Solute[] }
  | { readonly kind: 'water'; readonly water: 'boiled' | 'aired' | 'sparkling' }
  | { readonly kind: 'indicator'; readonly indicator: string; readonly massPercent: number }
  | { readonly kind: 'bottle'; readonly bench: string; readonly id: string };

export type Portion =
  | { readonly volume_mL: Amount; readonly drops?: false; readonly stuff: Stuff }
  | { readonly volume_mL: Amount; readonly drops: true; readonly stuff: Stuff }
  /** Everything that stands in a vessel of a bench before the first move. */
  | { readonly vessel: string; readonly bench: string };

export interface Mixture {
  readonly portions: readonly Portion[];
  /** °C; a bench's own where a vessel is named first, else 25. */
  readonly temperature_C?: number;
}

/** What formulas may speak of: the lesson's model, its benches and the values that vary. */
export interface Scope {
  readonly model: Model;
  readonly benches: ReadonlyMap<string, BenchSpec>;
  readonly values: Readonly<Record<string, number>>;
}

const NUMBER = String.raw`\d+(?:\.\d+)?(?:e[-+]?\d+)?`;
const AMOUNT = String.raw`(?:${NUMBER}|[a-z][A-Za-z0-9_]*)`;
const PORTION = new RegExp(String.raw`^(${AMOUNT})\s*(mL|drops?|L)\s+of\s+(.+)$`, 'i');
const SOLUTE = new RegExp(String.raw`^(${AMOUNT})\s*(mol/L|mmol/L)\s+(.+)$`);
const EXAMPLE = '50 mL of 0.10 mol/L HCl';

/**
 * Parses a mixture.
 * @param text portions joined by '+', each 'volume of solution' or 'vessel id on bench-id'; ' at 37 °C' may end it
 * @throws FormulaError naming the part that is not understood, with the corrected form
 */
export function parseMixture(text: string): Mixture {
  const warm = /^(.*\S)\s+at\s+(\d+(?:\.\d+)?)\s*°C$/s.exec(text.trim());
  const body = warm ? warm[1]! : text.trim();
  if (body === '') throw new FormulaError('A mixture is empty.', text, EXAMPLE);
  return {
    portions: body.split(/\s\+\s/).map((part) => parsePortion(part.trim())),
    ...(warm ? { temperature_C: Number(warm[2]) } : {}),
  };
}

function parsePortion(text: string): Portion {
  const vessel = /^vessel\s+([a-z][a-z0-9-]*)\s+on\s+([a-z][a-z0-9-]*)$/.exec(text);
  if (vessel) return { vessel: vessel[1]!, bench: vessel[2]! };
  if (text.startsWith('vessel'))
    throw new FormulaError(`'${text}' does not say on which bench.`, text, 'vessel buffer on my-bench');
  const portion = PORTION.exec(text);
  if (!portion)
    throw new FormulaError(`'${text}' is not a portion: a volume, 'of', and what it is of.`, text, EXAMPLE);
  const [, amount, unit, rest] = portion as unknown as [string, string, string, string];
  const litres = unit === 'L';
  const value = amountOf(amount);
  if (litres && typeof value !== 'number')
    throw new FormulaError(`Write '${amount}' in mL.`, text, `${amount} mL of ${rest}`);
  const volume_mL = litres ? (value as number) * 1000 : value;
  return {
    volume_mL,
    ...(/^drop/i.test(unit) ? { drops: true } : {}),
    stuff: parseStuff(rest.trim()),
  } as Portion;
}

function parseStuff(text: string): Stuff {
  const kind = /^(?:(boiled|aired|sparkling)\s+)?water$/.exec(text);
  if (kind) return { kind: 'water', water: (kind[1] ?? 'boiled') as 'boiled' | 'aired' | 'sparkling' };
  const bottle = /^bottle\s+([a-z][a-z0-9-]*)\s+on\s+([a-z][a-z0-9-]*)$/.exec(text);
  if (bottle) return { kind: 'bottle', id: bottle[1]!, bench: bottle[2]! };
  const dye = /^(\d+(?:\.\d+)?)\s*%\s+([a-z-]+)$/.exec(text);
  if (dye) {
    if (!Object.hasOwn(indicatorData, dye[2]!)) {
      const close = nearest(dye[2]!, Object.keys(indicatorData));
      throw new FormulaError(`There is no indicator '${dye[2]}'.`, dye[2], close ?? undefined);
    }
    return { kind: 'indicator', massPercent: Number(dye[1]), indicator: dye[2]! };
  }
  return { kind: 'solution', solutes: text.split(/\s+and\s+/).map((part) => parseSolute(part.trim())) };
}

function parseSolute(text: string): Solute {
  const solute = SOLUTE.exec(text);
  if (!solute) {
    const found = findSubstance(text);
    throw new FormulaError(
      `'${text}' is not a solution: a concentration in mol/L and a substance.`,
      text,
      `0.10 mol/L ${found ? found.formula : 'HCl'}`,
    );
  }
  const name = solute[3]!;
  const known = findSubstance(name);
  if (!known) {
    const close = nearest(
      name,
      substances.flatMap((one) => [one.formula, ...one.names]),
    );
    throw new FormulaError(`There is no substance '${name}'.`, name, close ?? undefined);
  }
  const value = amountOf(solute[1]!);
  if (solute[2] === 'mmol/L' && typeof value !== 'number')
    throw new FormulaError(`Write '${solute[1]}' in mol/L.`, text, `${solute[1]} mol/L ${known.formula}`);
  return {
    substance: known.formula,
    concentration_molL: solute[2] === 'mmol/L' ? (value as number) / 1000 : value,
  };
}

const amountOf = (text: string): Amount => (/^\d/.test(text) ? Number(text) : { name: text });

/** Names of varying values that a mixture uses. */
export function namesIn(mixture: Mixture): string[] {
  return mixture.portions.flatMap((portion) =>
    'vessel' in portion
      ? []
      : [
          portion.volume_mL,
          ...(portion.stuff.kind === 'solution'
            ? portion.stuff.solutes.map((solute) => solute.concentration_molL)
            : []),
        ].flatMap((amount) => (typeof amount === 'number' ? [] : [amount.name])),
  );
}

/** The number that an amount stands for. */
export function valueOf(amount: Amount, scope: Scope): number {
  if (typeof amount === 'number') return amount;
  const value = Object.hasOwn(scope.values, amount.name) ? scope.values[amount.name] : undefined;
  if (value === undefined) {
    const close = nearest(amount.name, Object.keys(scope.values));
    throw new FormulaError(
      `There is no value called '${amount.name}' under 'vary'.`,
      amount.name,
      close ?? undefined,
    );
  }
  return value;
}

export const volumeOf_mL = (portion: Exclude<Portion, { vessel: string }>, scope: Scope): number =>
  valueOf(portion.volume_mL, scope) * (portion.drops ? DROP_UL / 1000 : 1);

function benchCalled(id: string, scope: Scope): BenchSpec {
  const bench = scope.benches.get(id);
  if (bench) return bench;
  const close = nearest(id, [...scope.benches.keys()]);
  throw new FormulaError(`This lesson has no bench '${id}'.`, id, close ?? undefined);
}

/** One portion as a liquid. */
export function liquidOf(portion: Portion, scope: Scope, temperature_C = 25): Solution {
  if ('vessel' in portion) {
    const bench = benchCalled(portion.bench, scope);
    const vessel = createState(bench, { seed: 1 }).scene.vessels[portion.vessel];
    if (!vessel) {
      const close = nearest(
        portion.vessel,
        bench.vessels.map(({ id }) => id),
      );
      throw new FormulaError(
        `The bench '${portion.bench}' has no vessel '${portion.vessel}'.`,
        portion.vessel,
        close ?? undefined,
      );
    }
    return vessel.liquid;
  }
  const volume_mL = volumeOf_mL(portion, scope);
  if (!(volume_mL >= 0 && volume_mL <= 100_000))
    throw new FormulaError(
      `A volume of ${volume_mL} mL cannot be poured: 0 to 100000 mL.`,
      String(volume_mL),
    );
  const { stuff } = portion;
  if (stuff.kind === 'water') return water(stuff.water, volume_mL, temperature_C);
  if (stuff.kind === 'indicator')
    return indicatorStock(stuff.indicator, { massPercent: stuff.massPercent, volume_mL, temperature_C });
  if (stuff.kind === 'bottle') {
    const bench = benchCalled(stuff.bench, scope);
    const bottle = createState(bench, { seed: 1 }).scene.bottles[stuff.id];
    if (!bottle) {
      const close = nearest(
        stuff.id,
        bench.shelf.map(({ id }) => id),
      );
      throw new FormulaError(
        `The bench '${stuff.bench}' has no bottle '${stuff.id}'.`,
        stuff.id,
        close ?? undefined,
      );
    }
    const share = (volume_mL * 1e6) / bottle.volume_nL;
    return {
      ...bottle,
      volume_nL: Math.round(volume_mL * 1e6),
      amounts: Object.fromEntries(Object.entries(bottle.amounts).map(([key, n]) => [key, n * share])),
    };
  }
  return createSolution({
    volume_mL,
    temperature_C,
    parts: stuff.solutes.map((solute) => ({
      substance: solute.substance,
      concentration_molL: valueOf(solute.concentration_molL, scope),
    })),
  });
}

/** The liquid that a mixture makes. */
export function pourTogether(mixture: Mixture, scope: Scope): Solution {
  const liquids = mixture.portions.map((portion) => liquidOf(portion, scope, mixture.temperature_C));
  const all = liquids.reduce((sum, liquid) => mix(sum, liquid));
  if (all.volume_nL === 0) throw new FormulaError('This mixture has no volume.', '0 mL', EXAMPLE);
  return mixture.temperature_C === undefined ? all : { ...all, temperature_C: mixture.temperature_C };
}

/** pH of a mixture in the lesson's model. */
export const pHOfMixture = (mixture: Mixture, scope: Scope): number =>
  solve(pourTogether(mixture, scope), scope.model).pH;
