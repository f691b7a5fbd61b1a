/** What a prep room knows of each substance: hydrates on the shelf, how it comes, usual school strengths. Not part of the bench. */
import { familySources, SOURCES } from './familySources.ts';
import { molarMass } from '../preparation/molarMass.ts';
import { findSubstance, substances, type Substance } from '../substances.ts';

/** How a substance is bought. 'concentrate' is an aqueous solution of the strength on its label. */
export type Supply = 'solid' | 'concentrate' | 'gas';

export interface SubstanceFacts extends Substance {
  /** Of the anhydrous substance, g/mol. */
  readonly molarMass_gmol: number;
  readonly supply: Supply;
  /** Molecules of water in the forms on sale, 0 for anhydrous; the usual one first. */
  readonly hydrates: readonly number[];
  /** Of the concentrate, mass percent, as usual labels say. */
  readonly label_percent?: number;
  /** Strengths that schools keep made up, mol/L; empty where none is usual. */
  readonly usual_molL: readonly number[];
  /** Solubility at 20 °C where a school is likely to meet it, mol/L. */
  readonly solubility_molL?: number;
  /** Sources of the numbers above and of the constants of what it gives. */
  readonly sources: readonly string[];
}

/** Formula | hydrates, the usual first | usual strengths. Trade practice, from memory. */
const SOLIDS = `
NaOH|0|0.1 0.4 1
KOH|0|0.1 1
LiOH|1|
Ca(OH)2|0|0.015
Mg(OH)2|0|
Ba(OH)2|8|0.1
NaCl|0|0.1 1
KCl|0|0.1 1
LiCl|0|
CaCl2|2 0 6|0.1
MgCl2|6|0.1
BaCl2|2|0.1
NaHSO4|1 0|
Na2SO4|0 10|
MgSO4|7 0|
CH3COONa|3 0|0.1 1
C6H8O7|1 0|0.1
Na3C6H5O7|2|0.1
C4H6O6|0|0.1
KNaC4H4O6|4|
Na2C4H4O4|6 0|
H2C2O4|2 0|0.05
NaHC2O4|1|
KH3(C2O4)2|2|0.05
H3BO3|0|0.1
Na2B4O7|10 0|0.05
NaH2PO4|2 1 0|0.1
Na2HPO4|2 12 7 0|0.1
K2HPO4|0 3|0.1
KH2PO4|0|0.1
Na3PO4|12 0|0.1
Na4P2O7|10 0|
NaHCO3|0|0.1 0.5
Na2CO3|0 10 1|0.1 0.5
K2CO3|0|
NH4Cl|0|0.1 1
KC8H5O4|0|0.1
C4H11NO3|0|0.1 1
C6H13NO4S|1 0|0.1
C10H14N2O8Na2|2|0.01
`;

/** Formula | percent on the label | usual strengths. OpenStax Chemistry 2e (2019), Appendix F; others from memory. */
const CONCENTRATES = `
HCl|36|0.1 0.4 1 2
HBr|48|
HI|57|
HNO3|71|0.1 0.4
HClO4|70|
H2SO4|96|0.05 0.5
H3PO4|85|0.1
CH3COOH|99.5|0.1 1
HCOOH|98|0.1
C2H5COOH|99|
C3H6O3|88|0.1
NH3|28|0.1 1
NaOCl|12|
HOCl||
H2CO3||
H4P2O7||
`;

/** mol/L that dissolve at 20 °C, from memory. */
const SOLUBILITIES: Readonly<Record<string, number>> = {
  'Ca(OH)2': 0.022,
  'Mg(OH)2': 0.00016,
  CaCO3: 0.00014,
  'Ba(OH)2': 0.22,
  KC4H5O6: 0.03,
  H3BO3: 0.76,
  Na2B4O7: 0.13,
  C6H5COOH: 0.024,
  C8H6O4: 0.036,
  KC8H5O4: 0.39,
  Na2C2O4: 0.25,
  NaHCO3: 1.1,
};

const numbers = (text: string | undefined): number[] => (text ? text.split(' ').map(Number) : []);
const table = (text: string) =>
  new Map(
    text
      .trim()
      .split('\n')
      .map((row) => {
        const [formula, ...rest] = row.split('|') as [string, ...string[]];
        return [formula, rest] as const;
      }),
  );
const solids = table(SOLIDS);
const concentrates = table(CONCENTRATES);

const PRACTICE = 'Trade practice (hydrates on sale, usual strengths, solubility), from memory';
const WEIGHTS = 'Prohaska T. et al., Standard atomic weights of the elements 2021, abridged, from memory';
const LABELS = 'OpenStax Chemistry 2e (2019), Appendix F; other labels from memory';

function factsOf(substance: Substance): SubstanceFacts {
  const { formula, gives } = substance;
  const bottle = concentrates.get(formula);
  const solid = solids.get(formula);
  const label = bottle?.[0] ? Number(bottle[0]) : undefined;
  const constants = Object.keys(gives).flatMap((id) => (familySources[id] ?? []).map((s) => SOURCES[s]));
  return {
    ...substance,
    molarMass_gmol: molarMass(formula),
    supply: formula === 'CO2' ? 'gas' : bottle ? 'concentrate' : 'solid',
    hydrates: solid ? numbers(solid[0]) : [0],
    ...(label === undefined ? {} : { label_percent: label }),
    usual_molL: numbers((bottle ?? solid)?.[1]),
    ...(Object.hasOwn(SOLUBILITIES, formula) ? { solubility_molL: SOLUBILITIES[formula]! } : {}),
    sources: [...new Set([WEIGHTS, ...(bottle ? [LABELS] : []), PRACTICE, ...constants])],
  };
}

/** The whole catalogue with its facts, in its order. */
export const catalogue: readonly SubstanceFacts[] = substances.map(factsOf);
const byFormula = new Map(catalogue.map((facts) => [facts.formula, facts]));

/** Facts of a substance by formula or any name, or undefined where the catalogue does not have it. */
export function factsFor(name: string): SubstanceFacts | undefined {
  const known = findSubstance(name);
  return known && byFormula.get(known.formula);
}
