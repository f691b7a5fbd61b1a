/** Numbers and units as a reader is used to them. Values are kept in mol, L, mol/L; they are formatted last. */

import { concentrationName, USUAL, type Conventions } from './conventions.ts';

export { USUAL, type Conventions } from './conventions.ts';

/** How a computed quantity is written. */
export interface NumberStyle {
  /** As authors write it: 'mol/L', 'mL', '%'; '' for a plain number such as a pH. */
  readonly unit: string;
  readonly digits: number;
  /** 'decimals' for logarithms (the decimals of a pH are the figures of its concentration), else 'figures'. */
  readonly by: 'decimals' | 'figures';
}

/** Units that authors and learners may write, as a factor to mol, L, mol/L. */
export const UNITS: Readonly<Record<string, number>> = {
  '': 1,
  'mol/L': 1,
  'mmol/L': 1e-3,
  'µmol/L': 1e-6,
  mol: 1,
  mmol: 1e-3,
  µmol: 1e-6,
  L: 1,
  mL: 1e-3,
  µL: 1e-6,
  '%': 1e-2,
  drops: 1,
  g: 1,
  'g/L': 1,
  'g/mol': 1,
  '°C': 1,
  times: 1,
};

/** The unit's name in a reader's conventions. */
export function unitName(unit: string, conventions: Conventions): string {
  const concentration = /^([mµ]?)mol\/L$/.exec(unit);
  if (concentration) return concentrationName(concentration[1]!, conventions);
  if (conventions.volume === 'cm³') {
    if (unit === 'mL') return 'cm³';
    if (unit === 'L') return 'dm³';
    if (unit === 'g/L') return 'g dm⁻³';
  }
  return unit;
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const raised = (n: number): string =>
  (n < 0 ? '⁻' : '') + [...String(Math.abs(n))].map((digit) => SUPERSCRIPTS[Number(digit)]).join('');

/** A number with so many decimals or significant figures: true minus, powers of ten beyond 0.001 and 99999. */
export function formatNumber(
  value: number,
  style: Omit<NumberStyle, 'unit'>,
  conventions: Conventions,
): string {
  let text: string;
  if (style.by === 'decimals') text = roundHalfAway(value, style.digits).toFixed(style.digits);
  else {
    const [mantissa, exponent] = value.toExponential(style.digits - 1).split('e') as [string, string];
    const power = Number(exponent);
    text =
      value !== 0 && (power < -3 || power > 4 || power >= style.digits + 2)
        ? `${mantissa} × 10${raised(power)}`
        : roundHalfAway(value, style.digits - 1 - power).toFixed(Math.max(0, style.digits - 1 - power));
  }
  if (/^-0(\.0*)?$/.test(text)) text = text.slice(1);
  return text.replace('-', '−').replace('.', conventions.decimal);
}

/** Rounds as schools do, unmoved by the binary form of 2.675; exactly as many decimals as `toFixed` may then print. */
export function roundHalfAway(value: number, decimals: number): number {
  const shifted = Number(`${Math.abs(value)}e${decimals}`);
  const clean = Number.isFinite(shifted) ? shifted : Math.abs(value) * 10 ** decimals;
  const rounded = Math.round(Number(clean.toPrecision(12)));
  return (Math.sign(value) * rounded) / 10 ** decimals;
}

/** A value in base units with its unit; a drop is 'about' as real drops differ. */
export function formatQuantity(value: number, style: NumberStyle, conventions: Conventions = USUAL): string {
  const number = formatNumber(value / (UNITS[style.unit] ?? 1), style, conventions);
  if (style.unit === '' || style.unit === 'times') return style.unit ? `${number} times` : number;
  if (style.unit === 'drops') return number === '1' ? '1 drop' : `${number} drops`;
  return `${number}\u00a0${unitName(style.unit, conventions)}`;
}

const QUANTITY =
  /<data value="([^"]+)" data-unit="([^"]*)" data-digits="(\d+)" data-by="(decimals|figures)">[^<]*<\/data>/g;

/**
 * Fills the computed quantities of a lesson's prose in a reader's conventions.
 * @param html prose as `compile` made it
 */
export function formatProse(html: string, conventions: Conventions): string {
  return html.replace(QUANTITY, (whole, value: string, unit: string, digits: string, by: string) => {
    const style: NumberStyle = { unit, digits: Number(digits), by: by as NumberStyle['by'] };
    return whole.replace(/>[^<]*</, `>${formatQuantity(Number(value), style, conventions)}<`);
  });
}
