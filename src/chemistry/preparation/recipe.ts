/** How a solution is prepared: what to weigh, what to measure, out of which bottle, and what to mind. */
import { factsFor, type SubstanceFacts } from '../data/substanceFacts.ts';
import { checked, ChemistryError, nearestWord } from '../errors.ts';
import { substanceWords } from '../substances.ts';
import { hydrateFormula, molarMass } from './molarMass.ts';
import { molarityOf } from './strength.ts';

export interface SolutionWanted {
  /** Formula or name. */
  readonly substance: string;
  readonly concentration_molL: number;
  /** Of the finished solution, mL. */
  readonly volume_mL: number;
}

/** Something that is weighed. */
export interface Weighing {
  /** 'Na2CO3·10H2O'. */
  readonly formula: string;
  readonly molarMass_gmol: number;
  /** As it is weighed: purity allowed for, rounded to what a school balance shows. */
  readonly mass_g: number;
  readonly exact_g: number;
}

/** Something that is measured out of a bottle. */
export interface Dilution {
  readonly formula: string;
  readonly stock_molL: number;
  /** As it is measured, rounded. */
  readonly volume_mL: number;
  readonly exact_mL: number;
  /** True where the bottle holds a concentrate that is poured into water, never the other way round. */
  readonly intoWater: boolean;
}

function known(name: string): SubstanceFacts {
  const facts = typeof name === 'string' ? factsFor(name) : undefined;
  if (facts) return facts;
  const nearest = nearestWord(String(name), substanceWords());
  throw new ChemistryError(
    'substance',
    `There is no substance '${name}'.${nearest ? ` Did you mean '${nearest}'?` : ''}`,
    nearest,
  );
}

function amountOf(wanted: SolutionWanted): number {
  const c = checked('concentration_molL', wanted.concentration_molL, 'a number of mol/L');
  return (c * checked('volume_mL', wanted.volume_mL, 'a number of mL')) / 1000;
}

/**
 * Rounds to figures that a scale or a cylinder can show: three significant figures, none below the step.
 * @param step least that the instrument shows, above 0
 */
export function sensible(value: number, step: number): number {
  if (value === 0) return 0;
  const digit = 10 ** (Math.floor(Math.log10(Math.abs(value))) - 2);
  const by = Math.max(step, digit);
  // Through the decimal text, so that 0.1 + 0.2 is not read off a balance.
  return Number((Math.round(value / by) * by).toPrecision(12));
}

/**
 * Mass of a solid for a solution: m = c V M / w.
 * @param options.waters molecules of crystal water; the usual form on sale where it is left out
 * @param options.purity_percent by mass, above 0; 100 where it is left out
 * @param options.balance_g least step of the balance; 0.01 where it is left out
 * @throws ChemistryError for an unknown substance, one that is no solid, a hydrate that is not on sale, a number out of range
 */
export function weigh(
  wanted: SolutionWanted,
  options: { readonly waters?: number; readonly purity_percent?: number; readonly balance_g?: number } = {},
): Weighing {
  const facts = known(wanted.substance);
  if (facts.supply !== 'solid')
    throw new ChemistryError(
      'substance',
      `${facts.names[0]} is not weighed as a solid: dilute it from its bottle.`,
    );
  const waters = options.waters ?? facts.hydrates[0]!;
  if (!facts.hydrates.includes(waters))
    throw new ChemistryError(
      'waters',
      `${facts.formula} is not sold with ${waters} H2O; known forms: ${facts.hydrates.map((n) => hydrateFormula(facts.formula, n)).join(', ')}.`,
      String(facts.hydrates[0]),
    );
  const purity = checked('purity_percent', options.purity_percent ?? 100, 'a percentage', 1, 100) / 100;
  const formula = hydrateFormula(facts.formula, waters);
  const mass = molarMass(formula);
  const exact_g = (amountOf(wanted) * mass) / purity;
  return {
    formula,
    molarMass_gmol: mass,
    exact_g,
    mass_g: sensible(exact_g, checked('balance_g', options.balance_g ?? 0.01, 'a step in g', 1e-5, 10)),
  };
}

/**
 * Volume of a stock for a solution: V1 = c2 V2 / c1. The stock is one of known concentration, or the concentrated bottle by what its
 * label says (mass percent, with its density where the label gives one).
 * @throws ChemistryError for an unknown substance, a stock weaker than what is wanted, a number out of range
 */
export function dilute(
  wanted: SolutionWanted,
  stock: { readonly molL: number } | { readonly label_percent?: number; readonly density_gmL?: number } = {},
): Dilution {
  const facts = known(wanted.substance);
  const bottle = !('molL' in stock);
  const stock_molL = bottle ? labelled(facts, stock) : checked('stock.molL', stock.molL, 'a number of mol/L');
  const n = amountOf(wanted);
  if (stock_molL < wanted.concentration_molL)
    throw new ChemistryError(
      'stock',
      `A stock of ${stock_molL.toPrecision(3)} mol/L is weaker than the ${wanted.concentration_molL} mol/L that are wanted.`,
    );
  const exact_mL = n === 0 ? 0 : (n / stock_molL) * 1000;
  return {
    formula: facts.formula,
    stock_molL,
    exact_mL,
    volume_mL: sensible(exact_mL, 0.1),
    intoWater: bottle,
  };
}

function labelled(
  facts: SubstanceFacts,
  label: { readonly label_percent?: number; readonly density_gmL?: number },
): number {
  const percent = label.label_percent ?? facts.label_percent;
  if (percent === undefined)
    throw new ChemistryError(
      'stock.label_percent',
      `No usual label is known for ${facts.names[0]}: say its percentage.`,
    );
  checked('stock.label_percent', percent, 'a percentage', 0, 100);
  if (label.density_gmL === undefined) return molarityOf(facts.formula, percent);
  return (
    (10 * percent * checked('stock.density_gmL', label.density_gmL, 'a density in g/mL', 0.6, 3)) /
    facts.molarMass_gmol
  );
}

/** Sizes that flasks and bottles come in, mL. */
const SIZES_mL = [25, 50, 100, 250, 500, 1000, 1250, 1500, 2000, 2500, 3000, 4000, 5000, 10_000];

/**
 * How much to make for a class: what is used, times the spare share, up to the next size.
 * @param used_mL for all groups and demonstrations together
 * @param spare share on top; 0.15 where it is left out (trade practice: 10 to 20 %)
 */
export function volumeToMake(used_mL: number, spare = 0.15): number {
  const wanted =
    checked('used_mL', used_mL, 'a number of mL') * (1 + checked('spare', spare, 'a share', 0, 1));
  return SIZES_mL.find((size) => size >= wanted - 1e-9) ?? Math.ceil(wanted / 5000) * 5000;
}
