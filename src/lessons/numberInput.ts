/** What a learner types for a number: comma or point, powers of ten in several ways, a unit behind it or none. */
import { UNITS } from './format.ts';

export type TypedNumber =
  | {
      readonly ok: true;
      /** In the unit that was typed, or the asked one. */
      readonly value: number;
      /** In base units. */
      readonly base: number;
      readonly unit: string;
      readonly decimals: number;
    }
  /** Not clear: the sentence asks back. Nothing is marked. */
  | { readonly ok: false; readonly ask: string };

const SUPERSCRIPT = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const NAMES: Readonly<Record<string, string>> = {
  M: 'mol/L',
  mM: 'mmol/L',
  µM: 'µmol/L',
  uM: 'µmol/L',
  l: 'L',
  ml: 'mL',
  µl: 'µL',
  ul: 'µL',
  uL: 'µL',
  'cm³': 'mL',
  cm3: 'mL',
  'cm^3': 'mL',
  'dm³': 'L',
  dm3: 'L',
  'dm^3': 'L',
  umol: 'µmol',
  drop: 'drops',
  percent: '%',
};

/** Which quantity a unit measures; units of one kind convert. */
const KIND: Readonly<Record<string, string>> = Object.fromEntries(
  Object.keys(UNITS).map((unit) => [
    unit,
    /mol\/L$/.test(unit)
      ? 'concentration'
      : /mol$/.test(unit)
        ? 'amount'
        : /L$/.test(unit) && unit !== 'g/L'
          ? 'volume'
          : unit,
  ]),
);

/** The unit as we write it, or null where it is none that we know. */
export function knownUnit(text: string): string | null {
  const plain = text
    .replace(/\u03bc/g, 'µ')
    .replace(/\s*(dm⁻³|dm\^?-3|dm−3|L⁻¹|L\^?-1|L−1)$/u, '/L')
    .replace(/\/\s*(dm³|dm\^?3|l)$/u, '/L')
    .trim();
  if (Object.hasOwn(UNITS, plain)) return plain;
  const name = [plain, text.trim()].find((one) => Object.hasOwn(NAMES, one));
  return name === undefined ? null : NAMES[name]!;
}

/**
 * Reads a typed number. Ambiguous input is asked back, never guessed.
 * @param text what was typed, at most 60 characters
 * @param unit the unit that is asked for; '' for a plain number
 */
export function readNumber(text: string, unit: string): TypedNumber {
  const ask = (sentence: string): TypedNumber => ({ ok: false, ask: sentence });
  const typed = text.normalize('NFC').trim();
  if (typed === '') return ask('Type a number.');
  if (typed.length > 60) return ask('Type one number, with its unit if you like.');
  let rest = typed
    .replace(/[−–]/g, '-')
    .replace(/^(pH|≈|~|about|=)\s*=?\s*/i, '')
    .replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+/g, (sign, at: number, all: string) => {
      // Only behind a ten: dm⁻³ keeps its own.
      if (!/10\s*$/.test(all.slice(0, at))) return sign;
      return '^' + [...sign].map((one) => (one === '⁻' ? '-' : SUPERSCRIPT.indexOf(one))).join('');
    });
  const head = /^[-+]?\d[\d.,'\u00a0\u2009\u202f ]*/.exec(rest);
  if (!head) {
    const power = /^10\s*\^\s*([-+]?\d+)/.exec(rest);
    if (!power) return ask(`'${typed}' is not a number. Write it like 4.76, 4,76 or 1.7e-5.`);
  }
  const power = /^([-+]?)10\s*\^\s*\(?([-+]?\d+)\)?/.exec(rest);
  let value: number;
  let decimals = 0;
  if (power) {
    value = (power[1] === '-' ? -1 : 1) * 10 ** Number(power[2]);
    rest = rest.slice(power[0].length);
  } else {
    let digits = head![0].trimEnd();
    rest = rest.slice(digits.length);
    const groups = /[\u00a0\u2009\u202f ']/.test(digits);
    if (groups) {
      if (!/^[-+]?\d{1,3}(?:[\u00a0\u2009\u202f ']\d{3})+(?:[.,]\d+)?$/.test(digits))
        return ask(`'${typed}' looks like more than one number. Type one.`);
      digits = digits.replace(/[\u00a0\u2009\u202f ']/g, '');
    }
    const signs = digits.match(/[.,]/g) ?? [];
    if (signs.length > 1)
      return ask(
        `'${digits}' has more than one point or comma. Write it with one, for the decimals, like 1234.5.`,
      );
    // "1,000" is a thousand to one reader and one to another; "0,125" can only be a decimal.
    if (/^[-+]?[1-9]\d{0,2}[,]\d{3}$/.test(digits)) {
      const [whole, part] = digits.split(',') as [string, string];
      return ask(
        `Is '${digits}' ${whole}${part} or ${whole}.${part}? Write ${whole}${part}, or ${whole}.${part} with a point.`,
      );
    }
    const decimal = digits.replace(',', '.');
    if (!/^[-+]?\d+(\.\d*)?$/.test(decimal))
      return ask(`'${typed}' is not a number. Write it like 4.76 or 4,76.`);
    value = Number(decimal);
    decimals = decimal.split('.')[1]?.length ?? 0;
    const tens =
      /^\s*[eE]\s*([-+]?\d+)/.exec(rest) ??
      /^\s*[·×*x⋅.]\s*10\s*(?:\^\s*|\*\*\s*)\(?([-+]?\d+)\)?/.exec(rest);
    if (tens) {
      value *= 10 ** Number(tens[1]);
      decimals = 0;
      rest = rest.slice(tens[0].length);
    } else if (/^\s*[·×*x⋅]\s*10\s*-\s*\d/.test(rest) || /^\s*[·×*x⋅]\s*10\d/.test(rest))
      return ask(`Is '${typed}' a power of ten? Write it like 1.7e-5 or 1.7·10^-5.`);
  }
  rest = rest.trim();
  if (!Number.isFinite(value)) return ask('That number is too large.');
  if (rest === '') return { ok: true, value, base: value * (UNITS[unit] ?? 1), unit, decimals };
  const named = knownUnit(rest);
  if (named === null)
    return ask(
      unit === ''
        ? `'${rest}' behind the number is not understood. Type the number alone.`
        : `The unit '${rest}' is not known here. Type the number in ${unit}.`,
    );
  if (KIND[named] !== KIND[unit])
    return ask(
      unit === ''
        ? `No unit is needed here: '${rest}'. Type the number alone.`
        : `'${rest}' does not measure what is asked. Answer in ${unit}.`,
    );
  return { ok: true, value, base: value * UNITS[named]!, unit: named, decimals };
}
