import { indicatorData } from './indicatorData.ts';
import type { AcidFamily } from './families.ts';

/** Indicators as acid families. ΔrH° of an indicator is not known well enough to be used: its pKa is taken as constant. */
export const indicators: Readonly<Record<string, AcidFamily>> = Object.fromEntries(
  Object.entries(indicatorData).map(([id, d]) => [
    id,
    {
      id,
      name: d.name,
      charge: d.charge,
      forms: d.forms.map((f) => `${id} ${f.name}`),
      steps: d.pKa.map((pKa) => ({ pKa, dH: 0, dCp: 0 })),
    },
  ]),
);
