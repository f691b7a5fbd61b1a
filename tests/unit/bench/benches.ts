/** Benches that several tests stand at. */
import type { BenchSpec, ShelfItem, VesselSpec } from '../../../src/bench/index.ts';

const dye = [{ indicator: 'bromocresol-green', volume_mL: 0.5 }];

export const acid: ShelfItem = {
  id: 'acid',
  label: 'Hydrochloric acid',
  kind: 'reagent',
  contents: { volume_mL: 250, parts: [{ substance: 'HCl', concentration_molL: 0.1 }] },
};
export const alkali: ShelfItem = {
  id: 'alkali',
  label: 'Sodium hydroxide',
  kind: 'reagent',
  contents: { volume_mL: 250, parts: [{ substance: 'NaOH', concentration_molL: 0.1 }] },
};
export const green: ShelfItem = {
  id: 'green',
  label: 'Bromocresol green',
  kind: 'indicator',
  indicator: { id: 'bromocresol-green', volume_mL: 20 },
};
export const wash: ShelfItem = { id: 'wash', label: 'Wash bottle', kind: 'wash' };

export const water: VesselSpec = {
  id: 'water',
  label: 'Water',
  glass: 'beaker-100',
  probe: true,
  stirrer: 'on',
  contents: { volume_mL: 50, indicators: dye },
};
export const buffer: VesselSpec = {
  id: 'buffer',
  label: 'Ethanoate buffer',
  glass: 'beaker-100',
  probe: true,
  stirrer: 'on',
  contents: {
    volume_mL: 50,
    indicators: dye,
    parts: [
      { substance: 'CH3COOH', concentration_molL: 0.005 },
      { substance: 'CH3COONa', concentration_molL: 0.005 },
    ],
  },
};

/** Water beside a buffer, as in the lesson that meets a buffer. */
export const waterOrBuffer: BenchSpec = {
  id: 'water-or-buffer',
  title: 'Water or buffer?',
  model: 'textbook',
  temperature_C: 25,
  vessels: [water, buffer],
  shelf: [acid, alkali, green, wash],
  aims: [],
};

export const withAims = (spec: BenchSpec, aims: BenchSpec['aims']): BenchSpec => ({ ...spec, aims });

/** A bench with glass of every kind and nothing stirred. */
export const fullBench: BenchSpec = {
  id: 'everything',
  title: 'Everything',
  model: 'textbook',
  temperature_C: 25,
  vessels: [
    { id: 'beaker', label: 'Beaker', glass: 'beaker-100', contents: { volume_mL: 40 }, probe: true },
    {
      id: 'second',
      label: 'Second beaker',
      glass: 'beaker-50',
      contents: { volume_mL: 25, parts: [{ substance: 'CH3COOH', concentration_molL: 0.1 }] },
      stirrer: 'off',
    },
    { id: 'flask', label: 'Flask', glass: 'conical-250', thermometer: true },
    { id: 'tube', label: 'Tube', glass: 'test-tube' },
    { id: 'cylinder', label: 'Cylinder', glass: 'cylinder-25' },
    { id: 'volumetric', label: 'Volumetric flask', glass: 'volumetric-100' },
    { id: 'burette', label: 'Burette', glass: 'burette-50' },
    { id: 'pipette', label: 'Pipette', glass: 'pipette-10' },
    {
      id: 'open',
      label: 'Open flask',
      glass: 'conical-100',
      contents: { volume_mL: 30, parts: [{ substance: 'NaHCO3', concentration_molL: 0.02 }] },
      openTo: { co2_atm: 4.2e-4 },
    },
  ],
  shelf: [
    acid,
    alkali,
    green,
    wash,
    {
      id: 'four',
      label: 'Standard 4',
      kind: 'standard',
      standard_pH: 4.01,
      contents: {
        volume_mL: 100,
        parts: [
          { substance: 'CH3COOH', concentration_molL: 0.05 },
          { substance: 'CH3COONa', concentration_molL: 0.0089 },
        ],
      },
    },
  ],
  instruments: { meter: { calibration: 'ask' }, thermometer: true },
  aims: [],
};
