/** Interaction coefficients of the specific ion interaction theory, kg/mol at 25 °C: ThermoChimie 12a (2023) as distributed with
 * USGS PHREEQC 3.8.9; those marked are from memory. A pair that is not listed counts as 0. */
export const interactionCoefficients: Readonly<Record<string, number>> = {
  'H+|Cl-': 0.12,
  'H+|NO3-': 0.07,
  'Na+|OH-': 0.04,
  'Na+|Cl-': 0.03,
  'Na+|NO3-': -0.04,
  'K+|Cl-': 0,
  'K+|NO3-': -0.11,
  'NH4+|Cl-': -0.01,
  'NH4+|NO3-': -0.06,
  'Ca+2|Cl-': 0.14,
  'Mg+2|Cl-': 0.19,
  'Na+|HCO3-': 0,
  'Na+|CO3-2': -0.08,
  'Na+|H2PO4-': -0.08,
  'Na+|HPO4-2': -0.15,
  'Na+|PO4-3': -0.25,
  'Na+|SO4-2': -0.12,
  'Na+|B(OH)4-': -0.07,
  'Na+|C6H5O7-3': -0.076,
  'Na+|HC6H5O7-2': -0.04,
  'Na+|H2C6H5O7-': -0.05,
  'Na+|C2O4-2': -0.08,
  'K+|OH-': 0.09, // from memory
  'K+|H2PO4-': -0.14, // from memory
  'K+|HPO4-2': -0.1, // from memory
  'K+|PO4-3': -0.09, // from memory
  'K+|CO3-2': 0.02, // from memory
  'Na+|HSO4-': -0.01, // from memory
  'Na+|CH3COO-': 0.08, // from memory
};

/** ε(i, k) of two species by name, 0 where they are not a listed cation-anion pair. */
export function sitEpsilon(a: string, za: number, b: string, zb: number): number {
  if (za * zb >= 0) return 0;
  return interactionCoefficients[za > 0 ? `${a}|${b}` : `${b}|${a}`] ?? 0;
}
