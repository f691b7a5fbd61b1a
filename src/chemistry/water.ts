/** Water itself: density, static permittivity, ionization constant and the Debye-Hückel slope, 0 to 60 °C at 0.1 MPa. */

const KELVIN = 273.15;

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
 * pKw on the molal scale, liquid water at 0.1 MPa.
 * IAPWS R11-24, Revised Release on the Ionization Constant of H2O (2024), equation for the liquid (n = 6).
 */
export function pKw(temperature_C: number, density = waterDensity(temperature_C)): number {
  const T = temperature_C + KELVIN;
  const n = 6;
  const q = density * Math.exp(-0.864671 + 8659.19 / T + (-22786.2 / (T * T)) * density ** (2 / 3));
  const gas = 0.61415 + 48251.33 / T + -67707.93 / (T * T) + 10102100 / (T * T * T);
  const bridge = (q / (q + 1)) * density * (0.642044 + -56.8534 / T + -0.375754 * density);
  return -2 * n * (Math.log10(1 + q) - bridge) + gas + 2 * Math.log10(18.015268 / 1000);
}

/**
 * Debye-Hückel slope A, (kg/mol)^0.5, from density and permittivity.
 * Permittivity: Malmberg C.G., Maryott A.A., J. Res. NBS 56 (1956) 1.
 */
export function debyeHuckelA(temperature_C: number): number {
  const t = temperature_C;
  const permittivity = 87.74 + t * (-0.40008 + t * (9.398e-4 - t * 1.41e-6));
  return (1.8246e6 * Math.sqrt(waterDensity(t))) / (permittivity * (t + KELVIN)) ** 1.5;
}
