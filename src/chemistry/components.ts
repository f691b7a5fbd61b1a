import { families } from './families';
import { indicators } from './indicators';

/** Charges of ions that take no part in acid-base equilibria in water. */
export const strongIons: Readonly<Record<string, number>> = {
  'Na+': 1,
  'K+': 1,
  'Cl-': -1,
};

/** An acid family as the solver sees it: pKa at a temperature are filled in by the model. */
export interface AcidFamily {
  readonly id: string;
  readonly charge: number;
  readonly forms: readonly string[];
  readonly steps: readonly { readonly pKa: number; readonly dH: number; readonly dCp: number }[];
}

/** The acid family behind a component id, or undefined where it is a strong ion. */
export function familyOf(component: string): AcidFamily | undefined {
  return families[component] ?? indicators[component];
}
