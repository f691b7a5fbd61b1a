/** Components that a solution's amounts are kept in: acid families, indicators and strong ions. */
import { families, type AcidFamily } from './families.ts';
import { indicators } from './indicators.ts';

export type { AcidFamily } from './families.ts';

/** Charges of ions that take no part in acid-base equilibria in water. */
export const strongIons: Readonly<Record<string, number>> = {
  'Na+': 1,
  'K+': 1,
  'Li+': 1,
  'Mg+2': 2,
  'Ca+2': 2,
  'Ba+2': 2,
  'Cl-': -1,
  'Br-': -1,
  'I-': -1,
  'NO3-': -1,
  'ClO4-': -1,
};

/** The acid family behind a component id, or undefined where it is a strong ion or unknown. */
export function familyOf(component: string): AcidFamily | undefined {
  if (Object.hasOwn(families, component)) return families[component];
  return Object.hasOwn(indicators, component) ? indicators[component] : undefined;
}
