/**
 * Hazards by concentration, as two different things: the legal class of a mixture by mass percent (Regulation (EC) No 1272/2008), and
 * the stricter bands that schools keep. Secondary sources throughout: the label on the bottle and the local rules decide.
 */

/** A legal class, from a mass percentage on. */
export interface LegalLimit {
  readonly from_percent: number;
  /** Up to, not included; 100 and above where it is left out. */
  readonly below_percent?: number;
  readonly kind: HazardClass;
  readonly source: HazardSource;
}

export type HazardClass = keyof typeof CLASSES;
export type HazardSource = keyof typeof HAZARD_SOURCES;

export const HAZARD_SOURCES = {
  teachers:
    'Concentration limits of common school chemicals under CLP, public safety page of a national teacher-training network',
  gischem: 'GisChem, ammonia solution 5 to below 10 %',
  nite: 'NITE Japan, GHS classification result, acetic acid, ID 21B3030 (2009)',
  annexMemory: 'Regulation (EC) No 1272/2008, Annex VI, from memory',
  genericMemory:
    'Regulation (EC) No 1272/2008, Annex I, generic concentration limits (tables 3.2.3 and 3.3.3), from memory',
} as const;

/** What a class is called, its hazard statement and its pictogram. Annexes I, III and V of the regulation, from memory. */
export const CLASSES = {
  skinCorr1A: ['Skin Corr. 1A', 'H314', 'GHS05'],
  skinCorr1B: ['Skin Corr. 1B', 'H314', 'GHS05'],
  skinCorr1C: ['Skin Corr. 1C', 'H314', 'GHS05'],
  eyeDam1: ['Eye Dam. 1', 'H318', 'GHS05'],
  skinIrrit2: ['Skin Irrit. 2', 'H315', 'GHS07'],
  eyeIrrit2: ['Eye Irrit. 2', 'H319', 'GHS07'],
  stot3: ['STOT SE 3', 'H335', 'GHS07'],
  acute4: ['Acute Tox. 4', 'H302', 'GHS07'],
  acute3: ['Acute Tox. 3', 'H301', 'GHS06'],
  repr1B: ['Repr. 1B', 'H360FD', 'GHS08'],
  flamLiq3: ['Flam. Liq. 3', 'H226', 'GHS02'],
  oxLiq3: ['Ox. Liq. 3', 'H272', 'GHS03'],
  aquatic1: ['Aquatic Acute 1', 'H400', 'GHS09'],
  acidChlorine: ['EUH031', 'EUH031', ''],
} as const;

export const STATEMENTS: Readonly<Record<string, string>> = {
  H226: 'Flammable liquid and vapour',
  H272: 'May intensify fire; oxidiser',
  H301: 'Toxic if swallowed',
  H302: 'Harmful if swallowed',
  H314: 'Causes severe skin burns and eye damage',
  H315: 'Causes skin irritation',
  H318: 'Causes serious eye damage',
  H319: 'Causes serious eye irritation',
  H335: 'May cause respiratory irritation',
  H360FD: 'May damage fertility. May damage the unborn child',
  H400: 'Very toxic to aquatic life',
  EUH031: 'Contact with acids liberates toxic gas',
};

const at = (
  kind: HazardClass,
  source: HazardSource,
  from_percent: number,
  below_percent?: number,
): LegalLimit => ({ kind, source, from_percent, ...(below_percent === undefined ? {} : { below_percent }) });

const irritant = (source: HazardSource, from: number, below: number): LegalLimit[] => [
  at('skinIrrit2', source, from, below),
  at('eyeIrrit2', source, from, below),
];

/** Annex I's limits for what has none of its own: corrosive from 5 %, eye damage from 3 %, irritant from 1 %. */
const generic = (kind: 'skinCorr1A' | 'skinCorr1B' | 'skinCorr1C'): LegalLimit[] => [
  at(kind, 'genericMemory', 5),
  at('eyeDam1', 'genericMemory', 3, 5),
  at('skinIrrit2', 'genericMemory', 1, 5),
  at('eyeIrrit2', 'genericMemory', 1, 3),
];

/** By formula of the anhydrous substance. What is not listed carries no class that anybody here knew of. */
export const legalLimits: Readonly<Record<string, readonly LegalLimit[]>> = {
  HCl: [at('skinCorr1B', 'teachers', 25), ...irritant('teachers', 10, 25), at('stot3', 'teachers', 10)],
  H2SO4: [at('skinCorr1A', 'teachers', 15), ...irritant('teachers', 5, 15)],
  HNO3: [
    at('skinCorr1A', 'teachers', 20),
    at('skinCorr1B', 'teachers', 5, 20),
    ...irritant('genericMemory', 1, 5),
    at('oxLiq3', 'teachers', 65, 99),
  ],
  HClO4: [
    at('skinCorr1A', 'annexMemory', 50),
    at('skinCorr1B', 'annexMemory', 10, 50),
    ...irritant('annexMemory', 1, 10),
  ],
  HBr: [
    at('skinCorr1B', 'annexMemory', 40),
    ...irritant('annexMemory', 10, 40),
    at('stot3', 'annexMemory', 10),
  ],
  HI: [at('skinCorr1B', 'annexMemory', 25), ...irritant('annexMemory', 10, 25)],
  NaOH: [
    at('skinCorr1A', 'teachers', 5),
    at('skinCorr1B', 'teachers', 2, 5),
    ...irritant('teachers', 0.5, 2),
  ],
  KOH: [
    at('skinCorr1A', 'annexMemory', 5),
    at('skinCorr1B', 'annexMemory', 2, 5),
    ...irritant('annexMemory', 0.5, 2),
    at('acute4', 'annexMemory', 25),
  ],
  LiOH: generic('skinCorr1B'),
  'Ca(OH)2': [
    at('eyeDam1', 'genericMemory', 3),
    at('skinIrrit2', 'genericMemory', 10),
    at('eyeIrrit2', 'genericMemory', 1, 3),
  ],
  'Ba(OH)2': [...generic('skinCorr1B'), at('acute4', 'annexMemory', 10)],
  BaCl2: [at('acute3', 'annexMemory', 20), at('acute4', 'annexMemory', 5, 20)],
  NH3: [...generic('skinCorr1B'), at('stot3', 'gischem', 5), at('aquatic1', 'annexMemory', 25)],
  NH4Cl: [at('acute4', 'annexMemory', 25), at('eyeIrrit2', 'genericMemory', 10)],
  CH3COOH: [
    at('skinCorr1A', 'annexMemory', 90),
    at('skinCorr1B', 'annexMemory', 25, 90),
    ...irritant('annexMemory', 10, 25),
    at('flamLiq3', 'nite', 80),
  ],
  HCOOH: [
    at('skinCorr1A', 'annexMemory', 90),
    at('skinCorr1B', 'annexMemory', 10, 90),
    ...irritant('annexMemory', 2, 10),
  ],
  C2H5COOH: [at('skinCorr1B', 'annexMemory', 25), ...irritant('annexMemory', 10, 25)],
  C3H6O3: generic('skinCorr1C'),
  C6H8O7: [at('eyeIrrit2', 'genericMemory', 10)],
  H2C2O4: [at('acute4', 'annexMemory', 5)],
  'KH3(C2O4)2': [at('acute4', 'annexMemory', 5)],
  NaHC2O4: [at('acute4', 'annexMemory', 5)],
  Na2C2O4: [at('acute4', 'annexMemory', 5)],
  H3PO4: [at('skinCorr1B', 'annexMemory', 25), ...irritant('annexMemory', 10, 25)],
  Na3PO4: [at('skinIrrit2', 'genericMemory', 10), at('eyeIrrit2', 'genericMemory', 10)],
  H3BO3: [at('repr1B', 'annexMemory', 0.3)],
  Na2B4O7: [at('repr1B', 'annexMemory', 0.3), at('eyeIrrit2', 'annexMemory', 10)],
  NaHSO4: [at('eyeDam1', 'genericMemory', 3), at('eyeIrrit2', 'genericMemory', 1, 3)],
  Na2CO3: [at('eyeIrrit2', 'genericMemory', 10)],
  K2CO3: [at('skinIrrit2', 'genericMemory', 10), at('eyeIrrit2', 'genericMemory', 10)],
  NaOCl: [...generic('skinCorr1B'), at('aquatic1', 'annexMemory', 2.5), at('acidChlorine', 'annexMemory', 5)],
  'Ca(OCl)2': [
    ...generic('skinCorr1B'),
    at('aquatic1', 'annexMemory', 2.5),
    at('acidChlorine', 'annexMemory', 5),
  ],
  C3H4N2: generic('skinCorr1C'),
  CaCl2: [at('eyeIrrit2', 'genericMemory', 10)],
};

/** Who may handle a solution in the bands that schools usually keep. */
export type Handler = 'learners 11 to 16' | 'learners 16 to 19' | 'teacher' | 'technician';

export interface SchoolBand {
  /** From this concentration on, mol/L. */
  readonly from_molL: number;
  readonly words: string;
  /** The youngest who usually handle it. */
  readonly handler: Handler;
  readonly goggles: boolean;
  readonly gloves: boolean;
}

const band = (from_molL: number, words: string, handler: Handler, gloves = false): SchoolBand => ({
  from_molL,
  words,
  handler,
  goggles: true,
  gloves,
});

/** Common practice of schools, from memory: stricter than the law, and no substitute for the school's own rules. */
export const schoolBands: Readonly<Record<string, readonly SchoolBand[]>> = {
  HCl: [
    band(0, 'eye protection', 'learners 11 to 16'),
    band(2, 'irritant to eyes and skin', 'learners 11 to 16'),
    band(2.0001, 'corrosive when concentrated: small amounts, with care', 'teacher', true),
    band(6.5, 'corrosive, gives off an acid gas: fume cupboard', 'technician', true),
  ],
  H2SO4: [
    band(0, 'eye protection', 'learners 11 to 16'),
    band(0.5, 'irritant', 'learners 11 to 16'),
    band(1.5, 'corrosive', 'technician', true),
  ],
  HNO3: [
    band(0, 'eye protection', 'learners 11 to 16'),
    band(0.1, 'irritant', 'learners 11 to 16'),
    band(0.5, 'corrosive', 'learners 16 to 19', true),
    band(3, 'corrosive, oxidising', 'technician', true),
  ],
  NaOH: [
    band(0, 'hazard to eyes', 'learners 11 to 16'),
    band(0.125, 'irritant, hazard to eyes', 'learners 11 to 16'),
    band(0.4001, 'corrosive: goggles', 'learners 16 to 19', true),
    band(2.0001, 'corrosive: burns eyes and skin', 'technician', true),
  ],
  KOH: [
    band(0, 'hazard to eyes', 'learners 11 to 16'),
    band(0.09, 'irritant, hazard to eyes', 'learners 11 to 16'),
    band(0.36, 'corrosive: goggles', 'learners 16 to 19', true),
    band(2, 'corrosive: burns eyes and skin', 'technician', true),
  ],
  NH3: [
    band(0, 'eye protection', 'learners 11 to 16'),
    band(0.6, 'irritant to eyes and airways', 'learners 16 to 19'),
    band(3, 'corrosive: fume cupboard', 'technician', true),
  ],
  CH3COOH: [
    band(0, 'eye protection', 'learners 11 to 16'),
    band(1.0001, 'hazard to eyes', 'learners 16 to 19'),
    band(1.7, 'irritant', 'teacher'),
    band(4, 'corrosive, flammable when concentrated', 'technician', true),
  ],
};
