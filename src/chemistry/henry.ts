import { KELVIN } from './constants.ts';

/**
 * Solubility of carbon dioxide in pure water, mol of CO2(aq) per kg and atm.
 * Weiss R.F., Mar. Chem. 2 (1974) 203, equation 12 with table 1 (K0, mol/(kg atm)) at zero salinity.
 */
export function carbonDioxideSolubility(temperature_C: number): number {
  const T = (temperature_C + KELVIN) / 100;
  return Math.exp(-60.2409 + 93.4517 / T + 23.3585 * Math.log(T));
}

/** Carbon dioxide in air today, atm: about 420 parts per million. */
export const AIR_CO2_ATM = 4.2e-4;
