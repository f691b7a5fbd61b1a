/**
 * Wrong ways to a number that learners take again and again, each as a computation: an answer that equals its result is
 * traced to it. A method that does not apply to a mixture gives null.
 */
import { mix, solve } from '../../chemistry/index.ts';
import { families } from '../../chemistry/families.ts';
import { findSubstance } from '../../chemistry/substances.ts';
import type { Solution } from '../../chemistry/types.ts';
import {
  liquidOf,
  pHOfMixture,
  pourTogether,
  valueOf,
  volumeOf_mL,
  type Mixture,
  type Scope,
} from '../mixture.ts';

interface Case {
  readonly mixture: Mixture | null;
  readonly scope: Scope;
  /** In base units. */
  readonly key: number;
  /** The key is the pH of the mixture. */
  readonly isPH: boolean;
}

export interface WrongMethod {
  readonly title: string;
  readonly feedback: string;
  readonly misconception?: string;
  readonly value: (of: Case) => number | null;
}

type Role = 'strong-acid' | 'strong-base' | 'weak-acid' | 'weak-base' | 'other';

/** What a substance is in water: read from its charges, not from a list. */
export function roleOf(substance: string): { readonly role: Role; readonly family?: string } {
  const gives = Object.entries(findSubstance(substance)?.gives ?? {});
  const family = gives.find(([component]) => component in families);
  const strong = gives
    .filter(([component]) => !(component in families))
    .reduce((sum, [ion, n]) => sum + n * chargeOf(ion), 0);
  if (!family) return { role: strong < 0 ? 'strong-acid' : strong > 0 ? 'strong-base' : 'other' };
  const [id, n] = family;
  const { charge, steps } = families[id]!;
  // Hydrogen ions that the family has lost to balance the other ions.
  const lost = charge + strong / n;
  if (lost === 0) return { role: 'weak-acid', family: id };
  if (lost === steps.length) return { role: 'weak-base', family: id };
  return { role: 'other', family: id };
}

const chargeOf = (ion: string): number => {
  const [, sign, times] = /([+-])(\d?)$/.exec(ion) ?? [];
  return sign ? Number(times || 1) * (sign === '+' ? 1 : -1) : 0;
};

interface Dissolved {
  readonly substance: string;
  readonly mol: number;
  readonly portion: number;
}

/** Amounts that were put in, by portion. */
function putIn({ mixture, scope }: Case): { solutes: Dissolved[]; litres: number } | null {
  if (!mixture) return null;
  const solutes: Dissolved[] = [];
  let litres = 0;
  for (const [portion, one] of mixture.portions.entries()) {
    if ('vessel' in one || one.stuff.kind === 'bottle') return null;
    const volume = volumeOf_mL(one, scope) / 1000;
    litres += volume;
    if (one.stuff.kind !== 'solution') continue;
    for (const solute of one.stuff.solutes)
      solutes.push({
        substance: solute.substance,
        mol: valueOf(solute.concentration_molL, scope) * volume,
        portion,
      });
  }
  return { solutes, litres };
}

const sumOf = (solutes: readonly Dissolved[], role: Role): number =>
  solutes.filter((one) => roleOf(one.substance).role === role).reduce((sum, one) => sum + one.mol, 0);

/** The weak family in which both partners are there, with its pKa nearest to the pH. */
function pairAt(pH: number, of: Case): { pKa: number } | null {
  const { mixture, scope } = of;
  if (!mixture) return null;
  const liquid = pourTogether(mixture, scope);
  let best: { pKa: number } | null = null;
  for (const component of Object.keys(liquid.amounts))
    for (const { pKa } of families[component]?.steps ?? [])
      if (Math.abs(pKa - pH) < 2 && (!best || Math.abs(pKa - pH) < Math.abs(best.pKa - pH))) best = { pKa };
  return best;
}

/** A pH of a strong acid or base alone. */
const strongPH = (acid: number, base: number, litres: number): number | null => {
  if (acid > base) return -Math.log10((acid - base) / litres);
  return base > acid ? 14 + Math.log10((base - acid) / litres) : null;
};

export const wrongMethods = {
  'strong-for-weak': {
    title: 'weak acid or base taken for a strong one',
    feedback:
      'This number comes out if every molecule reacts with water, as in a strong acid or base. In a weak one most molecules stay whole.',
    misconception: 'M5',
    value: (of) => {
      const all = of.isPH ? putIn(of) : null;
      if (!all) return null;
      const [acid, base] = [sumOf(all.solutes, 'weak-acid'), sumOf(all.solutes, 'weak-base')];
      if (acid + base === 0 || (acid > 0 && base > 0)) return null;
      return strongPH(
        acid + sumOf(all.solutes, 'strong-acid'),
        base + sumOf(all.solutes, 'strong-base'),
        all.litres,
      );
    },
  },
  'root-forgotten': {
    title: 'square root forgotten',
    feedback:
      'This is −lg(Ka · c). The hydrogen ions and the acid ions come in equal numbers, so take the square root first.',
    value: (of) => {
      const all = of.isPH ? putIn(of) : null;
      const weak = all?.solutes.filter((one) => roleOf(one.substance).role === 'weak-acid') ?? [];
      if (!all || all.solutes.length !== 1 || weak.length !== 1) return null;
      const { pKa } = families[roleOf(weak[0]!.substance).family!]!.steps[0]!;
      return pKa - Math.log10(weak[0]!.mol / all.litres);
    },
  },
  'volume-forgotten': {
    title: 'total volume forgotten',
    feedback:
      'This number comes out if each solution keeps the concentration that it had in its bottle. They share one volume now: work with amounts, then divide by the total volume.',
    value: (of) => {
      if (!of.isPH || !of.mixture || of.mixture.portions.length < 2) return null;
      const all = putIn(of);
      if (!all) return null;
      let liquid: Solution = { volume_nL: 0, temperature_C: 25, amounts: {} };
      for (const [n, portion] of of.mixture.portions.entries()) {
        const part = liquidOf(portion, of.scope);
        if (part.volume_nL === 0) return null;
        const here = all.solutes.filter((one) => one.portion === n);
        const more = (all.litres * 1e9) / part.volume_nL;
        liquid = mix(liquid, {
          ...part,
          amounts: Object.fromEntries(
            Object.entries(part.amounts).map(([key, mol]) => [key, here.length ? mol * more : mol]),
          ),
        });
      }
      return solve(liquid, of.scope.model).pH;
    },
  },
  'reaction-forgotten': {
    title: 'reaction with the partner forgotten',
    feedback:
      'This number comes out if the acid or base that was added stays free. One partner of the buffer takes it in: first the reaction, in amounts, then the ratio.',
    misconception: 'M23',
    value: (of) => {
      const all = of.isPH ? putIn(of) : null;
      if (!all || sumOf(all.solutes, 'weak-acid') + sumOf(all.solutes, 'weak-base') === 0) return null;
      return strongPH(sumOf(all.solutes, 'strong-acid'), sumOf(all.solutes, 'strong-base'), all.litres);
    },
  },
  'addition-forgotten': {
    title: 'nothing changed by the addition',
    feedback:
      'This is the pH before anything was added. A buffer changes little, but it changes: the ratio moved.',
    misconception: 'M12',
    value: (of) =>
      of.isPH && of.mixture && of.mixture.portions.length > 1
        ? pHOfMixture({ ...of.mixture, portions: of.mixture.portions.slice(0, 1) }, of.scope)
        : null,
  },
  'sides-swapped': {
    title: 'acid added where base was, or base where acid was',
    feedback:
      'This number comes out if the change is made on the wrong side. Acid turns the base into its partner acid, and the pH falls.',
    value: (of) => {
      if (!of.isPH || !of.mixture || of.mixture.portions.length < 2) return null;
      const swap: Readonly<Record<string, string>> = { HCl: 'NaOH', NaOH: 'HCl' };
      const portions = of.mixture.portions.map((portion, n) =>
        n === 0 || 'vessel' in portion || portion.stuff.kind !== 'solution'
          ? portion
          : {
              ...portion,
              stuff: {
                ...portion.stuff,
                solutes: portion.stuff.solutes.map((one) => ({
                  ...one,
                  substance: swap[one.substance] ?? one.substance,
                })),
              },
            },
      );
      return pHOfMixture({ ...of.mixture, portions }, of.scope);
    },
  },
  'ratio-inverted': {
    title: 'ratio turned over',
    feedback:
      'This number comes out if the ratio is turned over. The base stands on top: more base, higher pH.',
    misconception: 'M16',
    value: (of) => {
      if (!of.isPH) return of.key === 0 ? null : 1 / of.key;
      const pair = pairAt(of.key, of);
      return pair ? 2 * pair.pKa - of.key : null;
    },
  },
  'pKa-for-pH': {
    title: 'pKa taken for the pH',
    feedback: 'This is the pKa. The pH equals it only where both partners are there in equal amounts.',
    misconception: 'M16',
    value: (of) => (of.isPH ? (pairAt(of.key, of)?.pKa ?? null) : null),
  },
  'pOH-for-pH': {
    title: 'pOH taken for the pH',
    feedback: 'This is the pOH. pH and pOH add up to 14.00 at 25 °C.',
    value: (of) => (of.isPH ? 14 - of.key : null),
  },
  'sign-lost': {
    title: 'sign lost',
    feedback: 'The sign got lost: pH is the logarithm with its sign turned over.',
    value: (of) => -of.key,
  },
  'natural-logarithm': {
    title: 'natural logarithm',
    feedback:
      'This number comes out with the natural logarithm (ln). pH is defined with the logarithm to base ten (lg).',
    value: (of) => (of.isPH ? of.key * Math.LN10 : null),
  },
  'concentration-for-pH': {
    title: 'concentration given for the pH',
    feedback:
      'This is the concentration of hydrogen ions. The pH is its logarithm to base ten, with the sign turned over.',
    value: (of) => (of.isPH ? 10 ** -of.key : null),
  },
  'pH-seven': {
    title: 'taken for neutral',
    feedback: 'pH 7.00 would be pure water at 25 °C. Look at which particles are left in this solution.',
    misconception: 'M9',
    value: (of) => (of.isPH ? 7 : null),
  },
  'thousand-times': {
    title: 'millilitres and litres mixed up (too large)',
    feedback: 'This is a thousand times too large: somewhere mL stands for L, or mmol for mol.',
    value: (of) => (of.isPH ? null : of.key * 1000),
  },
  thousandth: {
    title: 'millilitres and litres mixed up (too small)',
    feedback: 'This is a thousand times too small: somewhere L stands for mL, or mol for mmol.',
    value: (of) => (of.isPH ? null : of.key / 1000),
  },
  'ten-times': {
    title: 'a power of ten too much',
    feedback: 'The digits are right and the power of ten is not: this is ten times too large.',
    value: (of) => (of.isPH ? null : of.key * 10),
  },
  tenth: {
    title: 'a power of ten too little',
    feedback: 'The digits are right and the power of ten is not: this is ten times too small.',
    value: (of) => (of.isPH ? null : of.key / 10),
  },
} as const satisfies Readonly<Record<string, WrongMethod>>;

export type MethodId = keyof typeof wrongMethods;

/** Solutions that a method works with stay free of chemistry's own refusals: what cannot be computed does not apply. */
export function resultOf(method: MethodId, of: Case): number | null {
  const value = (wrongMethods[method] as WrongMethod).value(of);
  return value !== null && Number.isFinite(value) ? value : null;
}
