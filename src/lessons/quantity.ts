/** Computed quantities: inline code that starts with '='. `= pH(50 mL of 0.10 mol/L HCl) to 2 decimals`. */
import { evaluate, namesOf, parseFormula, type Formula, type RunScope } from './formula.ts';
import { UNITS, type NumberStyle } from './format.ts';
import { FormulaError, type Mixture } from './mixture.ts';
import { nearest } from './nearest.ts';

export interface Quantity {
  readonly formula: Formula;
  readonly style: NumberStyle;
}

const LAST = /\s+to\s+(\d+)\s+(decimals?|figures?)$/;
const UNIT = /\s+in\s+([^\s()]+)$/;

/**
 * Parses what stands behind the '='. Without 'to …' a pH gets two decimals, everything else three figures.
 * @throws FormulaError
 */
export function parseQuantity(text: string, mixture?: Mixture): Quantity {
  let rest = text.trim();
  const last = LAST.exec(rest);
  if (last) rest = rest.slice(0, last.index);
  const named = UNIT.exec(rest);
  if (named) rest = rest.slice(0, named.index);
  const unit = named?.[1] ?? '';
  if (!Object.hasOwn(UNITS, unit)) {
    const close = nearest(unit, Object.keys(UNITS));
    throw new FormulaError(
      `There is no unit '${unit}'. There are: ${Object.keys(UNITS).filter(Boolean).join(', ')}.`,
      unit,
      close ? `in ${close}` : undefined,
    );
  }
  const formula = parseFormula(rest, mixture);
  const digits = last ? Number(last[1]) : isLogarithm(formula) ? 2 : unit === 'drops' ? 0 : 3;
  const by = (last ? last[2]!.startsWith('decimal') : isLogarithm(formula) || unit === 'drops')
    ? 'decimals'
    : 'figures';
  if (digits > 10 || (by === 'figures' && digits < 1))
    throw new FormulaError(
      `A number has 1 to 10 figures or 0 to 10 decimals.`,
      last?.[0]?.trim(),
      'to 3 figures',
    );
  return { formula, style: { unit, digits, by } };
}

const isLogarithm = (formula: Formula): boolean =>
  (formula.kind === 'asked' && formula.name === 'pH') ||
  (formula.kind === 'own' && formula.what === 'pH') ||
  (formula.kind === 'minus' && formula.of.kind === 'call' && formula.of.name === 'lg');

/** Whether a quantity differs from learner to learner. */
export const varies = (quantity: Quantity): boolean => namesOf(quantity.formula).length > 0;

export const valueOfQuantity = (quantity: Quantity, scope: RunScope): number =>
  evaluate(quantity.formula, scope);
