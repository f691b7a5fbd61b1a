/** Answers poured: the liquid that an answer describes, in a tube with an indicator. */
import { colour, indicatorStock, mix, solve } from '../../chemistry/index.ts';
import type { Solution } from '../../chemistry/types.ts';
import { formatQuantity, type Conventions } from '../format.ts';
import { parseMixture, pourTogether, type Mixture, type Scope } from '../mixture.ts';
import type { Numeric, Tube } from './types.ts';

/** Seen through 5 cm at the usual dose, 0.50 mL of 0.1 % stock in 50 mL. */
const PATH_CM = 5;
const DOSE = 0.01;

function tubeOf(liquid: Solution, indicator: string, label: string, scope: Scope): Tube {
  const dyed = mix(liquid, indicatorStock(indicator, { volume_mL: (liquid.volume_nL / 1e6) * DOSE }));
  // The number is the liquid's own pH; the dye moves a weakly buffered liquid a little, and its colour shows that.
  const { words, hex } = colour(dyed, PATH_CM, scope.model);
  return { label, pH: Math.round(solve(liquid, scope.model).pH * 100) / 100, words, hex };
}

/** The liquid brought to a pH by strong acid or base alone; null where 10 mol/L of either does not reach it. */
export function broughtTo(liquid: Solution, pH: number, scope: Scope): Solution | null {
  const litres = liquid.volume_nL * 1e-9;
  const at = (extra_molL: number): Solution => {
    const ion = extra_molL < 0 ? 'Na+' : 'Cl-';
    const n = (liquid.amounts[ion] ?? 0) + Math.abs(extra_molL) * litres;
    return { ...liquid, amounts: { ...liquid.amounts, [ion]: n } };
  };
  let [low, high] = [-10, 10];
  const read = (extra: number) => solve(at(extra), scope.model).pH;
  if (!(read(high) <= pH && pH <= read(low))) return null;
  for (let n = 0; n < 80; n++) {
    const middle = (low + high) / 2;
    if (read(middle) > pH) low = middle;
    else high = middle;
  }
  return at((low + high) / 2);
}

/** Your tube and the asked-for one; null where the question pours nothing or the answer cannot be poured. */
export function pourAnswer(
  question: Numeric,
  given: number,
  key: number,
  scope: Scope,
  conventions: Conventions,
): { yours: Tube; asked: Tube } | null {
  const { pour } = question;
  if (!pour) return null;
  const told = (value: number) =>
    formatQuantity(value, { unit: question.unit, digits: question.digits, by: question.by }, conventions);
  const tube = (value: number, name: string): Tube | null => {
    let liquid: Solution | null;
    if (pour.mixture) {
      const answered: Scope = {
        ...scope,
        values: { ...scope.values, answer: inPoured(value, question.unit) },
      };
      liquid = pourTogether(parseMixture(pour.mixture), answered);
    } else liquid = broughtTo(pourTogether(mixtureOf(question)!, scope), value, scope);
    return liquid && liquid.volume_nL > 0
      ? tubeOf(liquid, pour.indicator, `${name}: ${told(value)}`, scope)
      : null;
  };
  if (pour.mixture && (given < 0 || inPoured(given, question.unit) > 10_000)) return null;
  const [yours, asked] = [tube(given, 'Your answer'), tube(key, 'Asked for')];
  return yours && asked ? { yours, asked } : null;
}

/** An answer as mixtures count it: volumes in mL, concentrations in mol/L. */
const inPoured = (base: number, unit: string): number => (/^[mµ]?L$/.test(unit) ? base * 1000 : base);

export const mixtureOf = (question: Numeric): Mixture | undefined =>
  question.mixture ? parseMixture(question.mixture) : undefined;
