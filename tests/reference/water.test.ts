/** Water's own constants against published values. */
import { describe, expect, test } from 'vitest';
import { carbonDioxideSolubility } from '../../src/chemistry/henry.ts';
import { debyeHuckelA, permittivity, pKw, waterDensity } from '../../src/chemistry/water.ts';
import { published } from './published.ts';

interface AtTemperature {
  readonly T_C: number;
}
/** The engine answers for 0 to 60 °C. */
const within = (row: AtTemperature) => row.T_C <= 60;
const titled = <T extends AtTemperature>(rows: T[]) => rows.map((row) => [row.T_C, row] as const);

describe('ionisation constant', () => {
  const checks = published<{ T_K: number; rho_kg_m3: number; pKw: number }>(2, 'pKw_check');

  // IAPWS R11-24, Table 3: eight figures, from the ideal gas to 1200 kg/m³.
  test.each(checks.map((c) => [c.T_K, c.rho_kg_m3, c.pKw] as const))(
    '%d K, %d kg/m³: %d',
    (T, rho, value) => {
      expect(Math.abs(pKw(T - 273.15, rho / 1000) - value)).toBeLessThan(5.1e-7);
    },
  );

  // IAPWS R11-24 at 0.101325 MPa, four decimals.
  const table = published<AtTemperature & { pKw_molal: number; water_density_kg_m3: number }>(
    2,
    'pKw',
  ).filter((row) => row.source_id === 'IAPWS_R11_24' && within(row));
  test.each(titled(table))('%d °C', (T, row) => {
    expect(Math.abs(pKw(T, row.water_density_kg_m3 / 1000) - row.pKw_molal)).toBeLessThan(5.1e-5);
    // With the engine's own density, which differs from theirs by 4e-6.
    expect(Math.abs(pKw(T) - row.pKw_molal)).toBeLessThan(1e-4);
  });
});

// Density by the equation of Kell against IAPWS-95.
describe('density', () => {
  const rows = published<AtTemperature & { rho_kg_m3?: number }>(7, 'water_density').filter(within);
  test.each(titled(rows.filter((row) => row.rho_kg_m3 !== undefined)))('%d °C', (T, row) => {
    expect(Math.abs((waterDensity(T) * 1000) / row.rho_kg_m3! - 1)).toBeLessThan(1e-5);
  });
});

// IAPWS R8-97, as computed from the release.
describe('permittivity and Debye-Hückel slope', () => {
  const rows = published<AtTemperature & { A_molal: number; dielectric: number }>(6, 'DH_AB').filter(
    (row) => row.source_id === 'IAPWS_R8' && within(row),
  );
  test.each(titled(rows))('%d °C', (T, row) => {
    expect(Math.abs(permittivity(T) - row.dielectric)).toBeLessThan(1e-3);
    expect(Math.abs(debyeHuckelA(T) - row.A_molal)).toBeLessThan(2e-5);
  });
});

// Weiss R.F., Mar. Chem. 2 (1974) 203, four decimals; Parkhurst and Appelo, phreeqc.dat, as a second opinion.
describe('solubility of carbon dioxide', () => {
  const rows = published<AtTemperature & { pKH: number }>(2, 'henry_CO2');
  test.each(rows.map((row) => [row.T_C, row.source_id, row] as const))('%d °C, %s', (T, source, row) => {
    const bound = source === 'WEISS1974' ? 6e-5 : 4e-3;
    expect(Math.abs(-Math.log10(carbonDioxideSolubility(T)) - row.pKH)).toBeLessThan(bound);
  });
});
