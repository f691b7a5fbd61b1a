import type { AcidFamily } from './components';
import { indicatorData } from './indicatorData';

/** Indicators as acid families. ΔrH° of an indicator is not known well enough to be used: its pKa is taken as constant. */
export const indicators: Readonly<Record<string, AcidFamily>> = Object.fromEntries(
  Object.entries(indicatorData).map(([id, d]) => [
    id,
    {
      id,
      charge: d.charge,
      forms: d.forms.map((f) => `${id} ${f.name}`),
      steps: d.pKa.map((pKa) => ({ pKa, dH: 0, dCp: 0 })),
    },
  ]),
);
