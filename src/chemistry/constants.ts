/** Physical constants, each with its source. One file, so that none of them exists twice. */

/** Molar gas constant, J/(mol K). CODATA 2018 (exact). */
export const R = 8.314462618;
/** Avogadro constant, 1/mol. CODATA 2018 (exact). */
export const AVOGADRO = 6.02214076e23;
/** Boltzmann constant, J/K. CODATA 2018 (exact). */
export const BOLTZMANN = 1.380649e-23;
/** Elementary charge, C. CODATA 2018 (exact). */
export const ELEMENTARY_CHARGE = 1.602176634e-19;
/** Electric constant, F/m. CODATA 2018. */
export const ELECTRIC_CONSTANT = 8.8541878128e-12;
/** Molar mass of water, kg/mol. IAPWS-95. */
export const WATER_KG_PER_MOL = 0.018015268;
/** 0 °C in K (exact). */
export const KELVIN = 273.15;
/** Reference temperature of the tabulated constants, K: 25 °C. */
export const T25 = 298.15;
export const LN10 = Math.LN10;
/** Temperatures that the constants hold for, °C. */
export const TEMPERATURES_C = { from: 0, to: 60 } as const;
