/** The hazards of a solution of known strength: the law's class, the school's own band, and where each comes from. */
import {
  CLASSES,
  HAZARD_SOURCES,
  legalLimits,
  schoolBands,
  STATEMENTS,
  type HazardClass,
  type SchoolBand,
} from '../data/hazards.ts';
import { checked, ChemistryError, nearestWord } from '../errors.ts';
import { findSubstance, substanceWords } from '../substances.ts';
import { massPercentOf } from './strength.ts';

export interface LegalHazard {
  readonly classification: string;
  /** Code of the hazard statement, and its words. */
  readonly statement: string;
  readonly words: string;
  /** 'GHS05', or nothing where the class has no pictogram. */
  readonly pictogram: string;
  /** Formulae of the substances that bring it. */
  readonly from: readonly string[];
  readonly sources: readonly string[];
}

export interface Hazards {
  readonly legal: readonly LegalHazard[];
  /** The strictest band among the parts; undefined where no school band is known for any of them. */
  readonly school: (SchoolBand & { readonly substance: string }) | undefined;
  /** Codes of pictograms, without repetition. */
  readonly pictograms: readonly string[];
}

export interface HazardPart {
  readonly substance: string;
  readonly concentration_molL: number;
}

/** What a stronger class makes superfluous to say. */
const COVERED_BY: Readonly<Partial<Record<HazardClass, readonly HazardClass[]>>> = {
  skinCorr1B: ['skinCorr1A'],
  skinCorr1C: ['skinCorr1A', 'skinCorr1B'],
  eyeDam1: ['skinCorr1A', 'skinCorr1B', 'skinCorr1C'],
  skinIrrit2: ['skinCorr1A', 'skinCorr1B', 'skinCorr1C'],
  eyeIrrit2: ['skinCorr1A', 'skinCorr1B', 'skinCorr1C', 'eyeDam1'],
  acute4: ['acute3'],
};

/**
 * Hazards of a solution before anything in it has reacted. Shares of the same class add: a class holds where the sum of every part's
 * percentage over its limit reaches 1 (additivity of Annex I). A neutralised mixture is over-, never understated.
 * @param parts substances by formula or name, mol/L
 * @throws ChemistryError for an unknown substance (with the nearest word) or a negative concentration
 */
export function hazardsOf(parts: readonly HazardPart[]): Hazards {
  const shares = new Map<HazardClass, { share: number; from: string[]; sources: Set<string> }>();
  let school: Hazards['school'];
  parts.forEach((part, i) => {
    const known = findSubstance(part.substance);
    if (!known)
      throw new ChemistryError(
        `parts[${i}].substance`,
        `There is no substance '${part.substance}'.`,
        nearestWord(part.substance, substanceWords()),
      );
    const { formula } = known;
    const c = checked(`parts[${i}].concentration_molL`, part.concentration_molL, 'a number of mol/L');
    if (c === 0) return;
    const limits = Object.hasOwn(legalLimits, formula) ? legalLimits[formula]! : [];
    const percent = limits.length > 0 ? massPercentOf(formula, c) : 0;
    for (const limit of limits) {
      if (limit.below_percent !== undefined && percent >= limit.below_percent) continue;
      const entry = shares.get(limit.kind) ?? { share: 0, from: [], sources: new Set<string>() };
      entry.share += percent / limit.from_percent;
      entry.from.push(formula);
      entry.sources.add(HAZARD_SOURCES[limit.source]);
      shares.set(limit.kind, entry);
    }
    const bands = Object.hasOwn(schoolBands, formula) ? schoolBands[formula]! : [];
    const own = bands.findLast((b) => c >= b.from_molL);
    if (own && (!school || rank(own) > rank(school))) school = { ...own, substance: formula };
  });
  const held = [...shares].filter(([, { share }]) => share >= 1);
  const kinds = new Set(held.map(([kind]) => kind));
  const legal = held
    .filter(([kind]) => !(COVERED_BY[kind] ?? []).some((stronger) => kinds.has(stronger)))
    .map(([kind, { from, sources }]): LegalHazard => {
      const [classification, statement, pictogram] = CLASSES[kind];
      return {
        classification,
        statement,
        words: STATEMENTS[statement]!,
        pictogram,
        from,
        sources: [...sources],
      };
    });
  return { legal, school, pictograms: [...new Set(legal.map((h) => h.pictogram).filter((p) => p !== ''))] };
}

const HANDLERS = ['learners 11 to 16', 'learners 16 to 19', 'teacher', 'technician'];
const rank = (b: SchoolBand): number => HANDLERS.indexOf(b.handler) * 2 + (b.gloves ? 1 : 0);
