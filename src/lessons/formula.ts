/**
 * Formulas as authors write them: arithmetic over numbers, values that vary and what the engine computes of a mixture.
 * `pH(50 mL of 0.10 mol/L HCl + 50 mL of water)`, `-lg(c)`, `conc(H3O+; 1 L of 0.10 mol/L CH3COOH)`.
 * Values are in mol, L, mol/L and °C; nothing is executed but what stands in the table below.
 */
import { families } from '../chemistry/families.ts';
import { apply, createState, type BenchState } from '../bench/index.ts';
import { solve } from '../chemistry/index.ts';
import { colourOfDrip } from './outcome.ts';
import { FormulaError, namesIn, parseMixture, pourTogether, type Mixture, type Scope } from './mixture.ts';
import { nearest } from './nearest.ts';

export type Formula =
  | { readonly kind: 'number'; readonly value: number }
  | { readonly kind: 'name'; readonly name: string }
  | { readonly kind: 'minus'; readonly of: Formula }
  | {
      readonly kind: 'sum' | 'difference' | 'product' | 'quotient' | 'power';
      readonly a: Formula;
      readonly b: Formula;
    }
  | { readonly kind: 'call'; readonly name: string; readonly of: Formula }
  | {
      readonly kind: 'asked';
      readonly name: string;
      readonly words: readonly string[];
      readonly mixture: Mixture;
    }
  | {
      readonly kind: 'drops';
      readonly bottle: string;
      readonly vessel: string;
      readonly bench: string;
      readonly words: readonly string[];
    }
  | {
      readonly kind: 'own';
      readonly what: string;
      readonly vessel: string;
      readonly bench: string;
      readonly of?: string;
    };

/** A scope that may also hold the learner's own runs, by bench. */
export interface RunScope extends Scope {
  readonly runs?: Readonly<Record<string, BenchState>>;
}

const PLAIN: Readonly<Record<string, (x: number) => number>> = {
  lg: Math.log10,
  ln: Math.log,
  sqrt: Math.sqrt,
  abs: Math.abs,
};

/** What can be asked of a mixture: how many words stand before it, and how it is computed. */
const ASKED: Readonly<
  Record<
    string,
    {
      readonly words: number;
      readonly ask: (words: readonly string[], mixture: Mixture, scope: Scope) => number;
    }
  >
> = {
  pH: { words: 0, ask: (_, mixture, scope) => solve(pourTogether(mixture, scope), scope.model).pH },
  volume: { words: 0, ask: (_, mixture, scope) => pourTogether(mixture, scope).volume_nL * 1e-9 },
  conc: {
    words: 1,
    ask: ([species], mixture, scope) => {
      const liquid = pourTogether(mixture, scope);
      return amountOf(species!, mixture, scope) / (liquid.volume_nL * 1e-9);
    },
  },
  amount: { words: 1, ask: ([species], mixture, scope) => amountOf(species!, mixture, scope) },
  /** The part of a family that is in this form, 0 to 1. */
  share: {
    words: 1,
    ask: ([species], mixture, scope) => {
      const all = solve(pourTogether(mixture, scope), scope.model).species;
      const one = speciesCalled(species!, all);
      const family = all.filter((other) => other.component === one.component);
      return one.amount_mol / family.reduce((sum, other) => sum + other.amount_mol, 0);
    },
  },
  /** Amount of the first species for one of the second. */
  ratio: {
    words: 2,
    ask: ([first, second], mixture, scope) =>
      amountOf(first!, mixture, scope) / amountOf(second!, mixture, scope),
  },
};

function speciesCalled<T extends { readonly name: string }>(name: string, all: readonly T[]): T {
  // The hydrated proton has two usual names.
  const proton = name === 'H3O+' || name === 'H+';
  const one = all.find((species) => species.name === name || (proton && /^H(3O)?\+$/.test(species.name)));
  if (one) return one;
  const close = nearest(
    name,
    all.map((species) => species.name),
  );
  throw new FormulaError(
    `There is no '${name}' in this mixture. There is: ${all.map((species) => species.name).join(', ')}.`,
    name,
    close ?? undefined,
  );
}

const amountOf = (name: string, mixture: Mixture, scope: Scope): number =>
  speciesCalled(name, solve(pourTogether(mixture, scope), scope.model).species).amount_mol;

const LONGEST = 400;
const DEEPEST = 30;

/**
 * Parses a formula.
 * @param mixture the question's own mixture, which formulas call 'mixture'
 * @throws FormulaError
 */
export function parseFormula(text: string, mixture?: Mixture): Formula {
  if (text.length > LONGEST) throw new FormulaError(`A formula has at most ${LONGEST} characters.`);
  let at = 0;
  let depth = 0;
  const skip = () => {
    while (/\s/.test(text[at] ?? '')) at++;
  };
  const eat = (sign: string): boolean => {
    skip();
    if (!text.startsWith(sign, at)) return false;
    at += sign.length;
    return true;
  };
  const fail = (): never => {
    const rest = text.slice(at, at + 20);
    throw new FormulaError(
      rest ? `'${text}' is not understood from '${rest}' on.` : `'${text}' ends too early.`,
      rest || text,
    );
  };

  const sum = (): Formula => {
    if (++depth > DEEPEST) throw new FormulaError(`A formula is nested at most ${DEEPEST} deep.`);
    let left = product();
    for (;;) {
      if (eat('+')) left = { kind: 'sum', a: left, b: product() };
      else if (eat('-') || eat('−')) left = { kind: 'difference', a: left, b: product() };
      else break;
    }
    depth--;
    return left;
  };
  const product = (): Formula => {
    let left = signed();
    for (;;) {
      if (eat('*') || eat('·') || eat('×')) left = { kind: 'product', a: left, b: signed() };
      else if (eat('/')) left = { kind: 'quotient', a: left, b: signed() };
      else return left;
    }
  };
  const signed = (): Formula => {
    if (eat('-') || eat('−')) {
      if (++depth > DEEPEST) throw new FormulaError(`A formula is nested at most ${DEEPEST} deep.`);
      const of = signed();
      depth--;
      return { kind: 'minus', of };
    }
    const base = single();
    return eat('^') ? { kind: 'power', a: base, b: signed() } : base;
  };
  const single = (): Formula => {
    skip();
    if (eat('(')) {
      const inner = sum();
      if (!eat(')')) fail();
      return inner;
    }
    const number = /^\d+(?:\.\d+)?(?:e[-+]?\d+)?/.exec(text.slice(at));
    if (number) {
      at += number[0].length;
      return { kind: 'number', value: Number(number[0]) };
    }
    const word = /^[A-Za-z][A-Za-z0-9_]*/.exec(text.slice(at));
    if (!word) return fail();
    at += word[0].length;
    const name = word[0];
    if (text[at] !== '(') return { kind: 'name', name };
    if (Object.hasOwn(PLAIN, name)) {
      at++;
      const of = sum();
      if (!eat(')')) fail();
      return { kind: 'call', name, of };
    }
    return called(name, inside());
  };
  /** The text between matching brackets, raw: mixtures are not arithmetic. */
  const inside = (): string => {
    let open = 0;
    const start = at + 1;
    for (; at < text.length; at++) {
      if (text[at] === '(') open++;
      else if (text[at] === ')' && --open === 0) return text.slice(start, at++);
    }
    return fail();
  };
  const called = (name: string, raw: string): Formula => {
    const parts = raw.split(';').map((part) => part.trim());
    if (name === 'pKa') return { kind: 'number', value: pKaOf(raw.trim()) };
    const ask = Object.hasOwn(ASKED, name) ? ASKED[name] : undefined;
    if (ask) {
      if (parts.length !== ask.words + 1)
        throw new FormulaError(
          `${name}(…) takes ${ask.words === 0 ? 'a mixture' : `${ask.words === 1 ? 'a species' : 'two species'} and a mixture, with semicolons between`}.`,
          raw,
          `${name}(${['CH3COO-', 'CH3COOH']
            .slice(0, ask.words)
            .map((word) => `${word}; `)
            .join('')}50 mL of 0.10 mol/L CH3COOH)`,
        );
      const last = parts.at(-1)!;
      if (last === 'mixture' && !mixture)
        throw new FormulaError(
          "This formula says 'mixture', but the block has none.",
          'mixture',
          'mixture: 50 mL of 0.10 mol/L HCl',
        );
      return {
        kind: 'asked',
        name,
        words: parts.slice(0, -1),
        mixture: last === 'mixture' ? mixture! : parseMixture(last),
      };
    }
    if (name === 'drops') {
      const [bottle, vessel, words] = parts;
      const where = /^([a-z][a-z0-9-]*)\s+on\s+([a-z][a-z0-9-]*)$/.exec(vessel ?? '');
      if (parts.length !== 3 || !where)
        throw new FormulaError(
          'drops(…) takes a bottle, a vessel and colours.',
          raw,
          'drops(acid; buffer on my-bench; yellow)',
        );
      return {
        kind: 'drops',
        bottle: bottle!,
        vessel: where[1]!,
        bench: where[2]!,
        words: words!.split('|').map((one) => one.trim()),
      };
    }
    if (name === 'own') {
      const [what, vessel, of] = parts;
      const where = /^([a-z][a-z0-9-]*)\s+on\s+([a-z][a-z0-9-]*)$/.exec(vessel ?? '');
      if (!where || !['pH', 'volume', 'added'].includes(what!) || (what === 'added') !== (of !== undefined))
        throw new FormulaError(
          "own(…) takes 'pH' or 'volume' and a vessel, or 'added', a vessel and a bottle.",
          raw,
          'own(pH; buffer on my-bench)',
        );
      return { kind: 'own', what: what!, vessel: where[1]!, bench: where[2]!, ...(of ? { of } : {}) };
    }
    const known = [...Object.keys(PLAIN), ...Object.keys(ASKED), 'pKa', 'drops', 'own'];
    const close = nearest(name, known);
    throw new FormulaError(
      `There is no '${name}(…)'. There are: ${known.join(', ')}.`,
      name,
      close ? `${close}(…)` : undefined,
    );
  };

  const whole = sum();
  skip();
  if (at < text.length) fail();
  return whole;
}

/** Tabulated pKa at 25 °C of a family, 'phosphoric 2' being its second step. */
function pKaOf(text: string): number {
  const [, id, step] = /^([a-z]+)(?:\s+(\d))?$/.exec(text) ?? [];
  const family = id && Object.hasOwn(families, id) ? families[id] : undefined;
  const value = family?.steps[Number(step ?? 1) - 1]?.pKa;
  if (value !== undefined) return value;
  const close = nearest(id ?? text, Object.keys(families));
  throw new FormulaError(`There is no pKa of '${text}'.`, text, close ? `pKa(${close})` : undefined);
}

/** The number that a formula comes to. @throws FormulaError where it comes to none. */
export function evaluate(formula: Formula, scope: RunScope): number {
  const value = compute(formula, scope);
  if (!Number.isFinite(value)) throw new FormulaError('This formula comes to no number.');
  return value;
}

function compute(formula: Formula, scope: RunScope): number {
  switch (formula.kind) {
    case 'number':
      return formula.value;
    case 'name': {
      if (formula.name === 'pKw') return 14;
      const value = Object.hasOwn(scope.values, formula.name) ? scope.values[formula.name] : undefined;
      if (value === undefined) {
        const close = nearest(formula.name, [...Object.keys(scope.values), 'pKw']);
        throw new FormulaError(
          `There is no value called '${formula.name}'.`,
          formula.name,
          close ?? undefined,
        );
      }
      return value;
    }
    case 'minus':
      return -compute(formula.of, scope);
    case 'sum':
      return compute(formula.a, scope) + compute(formula.b, scope);
    case 'difference':
      return compute(formula.a, scope) - compute(formula.b, scope);
    case 'product':
      return compute(formula.a, scope) * compute(formula.b, scope);
    case 'quotient':
      return compute(formula.a, scope) / compute(formula.b, scope);
    case 'power':
      return compute(formula.a, scope) ** compute(formula.b, scope);
    case 'call':
      return PLAIN[formula.name]!(compute(formula.of, scope));
    case 'asked':
      return ASKED[formula.name]!.ask(formula.words, formula.mixture, scope);
    case 'drops': {
      const bench = scope.benches.get(formula.bench);
      if (!bench) throw new FormulaError(`This lesson has no bench '${formula.bench}'.`, formula.bench);
      const found = colourOfDrip(bench, formula.bottle, formula.vessel, formula.words, 2000);
      if ('error' in found) throw new FormulaError(found.error);
      if (found.drops === null)
        throw new FormulaError(`2000 drops do not turn '${formula.vessel}' ${formula.words.join(' or ')}.`);
      return found.drops;
    }
    case 'own':
      return ownReading(formula, scope);
  }
}

/** A reading of the learner's own run; before there is one (while compiling), of the bench's first state. */
function ownReading(formula: Formula & { kind: 'own' }, scope: RunScope): number {
  const bench = scope.benches.get(formula.bench);
  if (!bench) throw new FormulaError(`This lesson has no bench '${formula.bench}'.`, formula.bench);
  const state = scope.runs?.[formula.bench] ?? createState(bench, { seed: 1 });
  const vessel = state.scene.vessels[formula.vessel];
  if (!vessel)
    throw new FormulaError(`The bench '${formula.bench}' has no vessel '${formula.vessel}'.`, formula.vessel);
  if (formula.what === 'volume') return vessel.liquid.volume_nL * 1e-9;
  if (formula.what === 'added') return (vessel.added[formula.of!]?.volume_nL ?? 0) * 1e-9;
  return solve(mixedLiquid(state, formula.vessel), scope.model).pH;
}

function mixedLiquid(state: BenchState, vessel: string) {
  const swirled = apply(state, { kind: 'swirl', vessel });
  const one = (swirled.ok ? swirled.state : state).scene.vessels[vessel]!;
  return one.liquid;
}

/** Names of varying values that a formula uses. */
export function namesOf(formula: Formula): string[] {
  switch (formula.kind) {
    case 'name':
      return formula.name === 'pKw' ? [] : [formula.name];
    case 'minus':
    case 'call':
      return namesOf(formula.of);
    case 'sum':
    case 'difference':
    case 'product':
    case 'quotient':
    case 'power':
      return [...namesOf(formula.a), ...namesOf(formula.b)];
    case 'asked':
      return namesIn(formula.mixture);
    default:
      return [];
  }
}
