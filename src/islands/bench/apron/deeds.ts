import { glassware } from '../../../bench/glassware';
import { offeredMoves, type moves } from '../../../bench/moves/registry';
import type { BenchSpec, Move, MoveKind, Readings } from '../../../bench/types';

/** A move that needs nothing but the vessel that the sentence names: one press. */
export interface QuickDeed {
  readonly key: string;
  readonly label: string;
  readonly move: Move;
}

const offers = (spec: BenchSpec, kind: MoveKind): boolean =>
  spec.moves === undefined || spec.moves.includes(kind);

/** What one press can do with the chosen vessel now, most needed first. */
export function quickDeeds(spec: BenchSpec, readings: Readings, into: string): QuickDeed[] {
  const deeds: QuickDeed[] = [];
  const add = (key: string, label: string, move: Move) => {
    if (offers(spec, move.kind)) deeds.push({ key, label, move });
  };
  if (readings.spills.length > 0) add('wipe', 'Wipe up the spill', { kind: 'wipe' });
  for (const what of ['goggles', 'gloves'] as const) {
    if (spec.safety?.[what] !== undefined && !readings[what])
      add(what, `Put on ${what}`, { kind: 'wear', what, on: true });
  }
  const plan = spec.vessels.find((vessel) => vessel.id === into);
  const vessel = readings.vessels.find((reading) => reading.id === into);
  if (plan && vessel) {
    if (plan.stirrer !== undefined) {
      add('stir', vessel.stirring ? 'Stop stirring' : 'Stir', {
        kind: 'stir',
        vessel: into,
        on: !vessel.stirring,
      });
    }
    if (glassware[plan.glass].canSwirl && !vessel.stirring && !vessel.empty)
      add('swirl', 'Swirl', { kind: 'swirl', vessel: into });
    const meter = readings.meter;
    if (meter && meter.at !== into && !plan.probe)
      add('dip', 'Dip the probe', { kind: 'dipProbe', vessel: into });
    if (meter && meter.at !== null) add('lift', 'Lift the probe', { kind: 'liftProbe' });
    if (meter && meter.at === null && !meter.rinsed)
      add('rinse-probe', 'Rinse the probe', { kind: 'rinseProbe' });
  }
  return deeds;
}

/** The delivering move of a source: a burette runs through its tap, everything else is poured. */
export function delivery(spec: BenchSpec, from: string, into: string, volume_uL: number): Move {
  const burette = spec.vessels.find((vessel) => vessel.id === from && vessel.glass === 'burette-50');
  return burette
    ? { kind: 'dispense', burette: from, into, volume_uL }
    : { kind: 'pour', from, into, volume_uL };
}

/** Moves that the sentence, the quick deeds or the list itself already offer. */
const ELSEWHERE: ReadonlySet<MoveKind> = new Set<MoveKind>([
  'pour',
  'drip',
  'addToBoth',
  'dispense',
  'addIndicator',
  'swirl',
  'stir',
  'dipProbe',
  'liftProbe',
  'rinseProbe',
  'wear',
  'wipe',
  'undo',
  'startAgain',
]);

export type RestKind = Exclude<
  keyof typeof moves,
  'pour' | 'drip' | 'addToBoth' | 'dispense' | 'addIndicator'
>;

/** Kinds of moves that stand behind 'More moves'. */
export function moreKinds(spec: BenchSpec): RestKind[] {
  return offeredMoves(spec).filter((kind) => !ELSEWHERE.has(kind)) as RestKind[];
}
