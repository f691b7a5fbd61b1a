/** Molar masses, computed from formulae so that no two of them can disagree. */
import { ChemistryError, nearestWord } from '../errors.ts';

/**
 * Standard atomic weights, abridged to five digits.
 * Prohaska T. et al., Standard atomic weights of the elements 2021, Pure Appl. Chem. 94 (2022) 573, abridged table (from memory).
 */
const ATOMIC_WEIGHTS: Readonly<Record<string, number>> = {
  H: 1.008,
  Li: 6.94,
  B: 10.81,
  C: 12.011,
  N: 14.007,
  O: 15.999,
  Na: 22.99,
  Mg: 24.305,
  P: 30.974,
  S: 32.06,
  Cl: 35.45,
  K: 39.098,
  Ca: 40.078,
  Br: 79.904,
  I: 126.9,
  Ba: 137.33,
};

const TOKEN = /([A-Z][a-z]?)|(\()|(\))/y;
const COUNT = /\d*/y;

/** One part of a formula between dots, from the place where its leading number ends. */
function massOf(part: string, formula: string): number {
  const groups = [0];
  let at = 0;
  const count = (): number => {
    COUNT.lastIndex = at;
    const digits = COUNT.exec(part)![0];
    at += digits.length;
    return digits === '' ? 1 : Number(digits);
  };
  while (at < part.length) {
    TOKEN.lastIndex = at;
    const match = TOKEN.exec(part);
    if (!match) throw notAFormula(formula);
    at = TOKEN.lastIndex;
    if (match[2]) groups.push(0);
    else if (match[3]) {
      if (groups.length === 1) throw notAFormula(formula);
      const inner = groups.pop()!;
      groups[groups.length - 1]! += inner * count();
    } else {
      const element = match[1]!;
      const weight = Object.hasOwn(ATOMIC_WEIGHTS, element) ? ATOMIC_WEIGHTS[element] : undefined;
      if (weight === undefined)
        throw new ChemistryError(
          'formula',
          `'${formula}' names an element '${element}' that the catalogue does not have.`,
          nearestWord(element, Object.keys(ATOMIC_WEIGHTS)),
        );
      groups[groups.length - 1]! += weight * count();
    }
  }
  if (groups.length !== 1) throw notAFormula(formula);
  return groups[0]!;
}

const notAFormula = (formula: string) => new ChemistryError('formula', `'${formula}' is no formula.`);

/**
 * Molar mass of a formula, g/mol: 'NaOH', 'Ca(OH)2', 'Na2CO3·10H2O' (a full stop does for the dot).
 * @throws ChemistryError where it cannot be read or names an unknown element
 */
export function molarMass(formula: string): number {
  if (formula.trim() === '') throw notAFormula(formula);
  return formula
    .trim()
    .split(/[·.]/)
    .reduce((sum, part) => {
      const [, times, rest] = /^(\d*)(.+)$/.exec(part.trim()) ?? [];
      if (!rest) throw notAFormula(formula);
      return sum + Number(times || 1) * massOf(rest, formula);
    }, 0);
}

/** Water of crystallisation in a formula: 'Na2CO3' with 10 is 'Na2CO3·10H2O'. */
export const hydrateFormula = (formula: string, waters: number): string =>
  waters === 0 ? formula : `${formula}·${waters === 1 ? '' : waters}H2O`;
