/** pH against volume added, for every vessel in which a probe stands. */
import { lastStanding } from '../apply.ts';
import { glassware, pathOf } from '../glassware.ts';
import { isHidden, traceHidden } from '../hiding.ts';
import { colourOf, join, pHOf, take } from '../liquid.ts';
import { settle, volumeOf, whole } from '../moves/hands.ts';
import { mLShown, pHShown, shown } from '../precision.ts';
import { probeReading } from '../read.ts';
import type { BenchState, Seen, VesselSpec } from '../types.ts';

export interface TracePoint {
  /** Number of the move after which this was read; 0 at the start. */
  readonly n: number;
  /** Everything but indicator added so far, as read. */
  readonly added_mL: number;
  readonly pH: number;
  /** Computed colour of the liquid, absent where colours are hidden. */
  readonly hex?: string;
  /** Bottle or vessel that the last addition came from. */
  readonly of?: string;
}

export interface TraceSeries {
  readonly vessel: string;
  readonly label: string;
  readonly points: readonly TracePoint[];
  /** Between the points, computed as if poured ever so slowly: pairs of mL and pH. Empty in careful mode. */
  readonly curve: readonly (readonly [number, number])[];
}

/** Steps computed between two points of a trace. */
const STEPS = 8;

/** The states that stand since the bench was last set up, oldest first. */
export function trial(state: BenchState): BenchState[] {
  const list: BenchState[] = [];
  for (let s = lastStanding(state); s; s = s.back && lastStanding(s.back)) {
    list.push(s);
    if (!s.move || s.move.kind === 'startAgain') break;
  }
  return list.reverse();
}

function addedTo(state: BenchState, id: string): number {
  const dyes = new Set(state.spec.shelf.filter((s) => s.kind === 'indicator').map((s) => s.id));
  return Object.entries(state.scene.vessels[id]?.added ?? {}).reduce(
    (sum, [of, a]) => (dyes.has(of) ? sum : sum + a.volume_nL),
    0,
  );
}

function pointOf(state: BenchState, spec: VesselSpec, seen: Seen): TracePoint | null {
  const vessel = state.scene.vessels[spec.id];
  const pH = vessel && !vessel.layer ? probeReading(state, spec) : null;
  if (!vessel || pH === null) return null;
  const path = pathOf(glassware[spec.glass], volumeOf(vessel) / 1e6);
  const from =
    state.move && 'from' in state.move
      ? state.move.from
      : state.move && 'burette' in state.move
        ? state.move.burette
        : undefined;
  return {
    n: state.count,
    added_mL: mLShown(addedTo(state, spec.id)),
    pH,
    ...(!isHidden(state.spec, seen, 'colour', spec.id) && {
      hex: colourOf(vessel.liquid, path, state.spec.model).hex,
    }),
    ...(from !== undefined && { of: from }),
  };
}

/** Computed once for each state and vessel: a trace is asked for again after every move. */
const ways = new WeakMap<BenchState, Map<string, readonly (readonly [number, number])[]>>();

function between(
  before: BenchState,
  after: BenchState,
  spec: VesselSpec,
): readonly (readonly [number, number])[] {
  const known = ways.get(after) ?? new Map<string, readonly (readonly [number, number])[]>();
  ways.set(after, known);
  const key = `${spec.id}/${before.count}`;
  const way = known.get(key) ?? computeBetween(before, after, spec);
  known.set(key, way);
  return way;
}

/** The way between two states, where one bottle ran into the vessel and nothing else happened to it. */
function computeBetween(
  before: BenchState,
  after: BenchState,
  spec: VesselSpec,
): readonly (readonly [number, number])[] {
  const { move } = after;
  if (!move || !('from' in move) || after.spec.careful) return [];
  const source = before.scene.bottles[move.from];
  const start = before.scene.vessels[spec.id];
  const end = after.scene.vessels[spec.id];
  if (!source || !start || !end || start.liquid.volume_nL === 0) return [];
  const poured = volumeOf(end) - volumeOf(start);
  if (poured <= 0 || poured > source.volume_nL) return [];
  const base = addedTo(before, spec.id);
  return Array.from({ length: STEPS - 1 }, (_, i) => {
    const part = Math.round((poured * (i + 1)) / STEPS);
    const liquid = settle(start, spec, join(whole(start), take(source, part).taken));
    return [shown((base + part) / 1e6, 4), pHShown(pHOf(liquid, after.spec.model))] as const;
  });
}

/** The traces of this trial, a series for each vessel that shows one, since it was last emptied. Hidden traces are absent. */
export function trace(state: BenchState, seen: Seen = {}): TraceSeries[] {
  const states = trial(state);
  return state.spec.vessels.flatMap((spec) => {
    if (traceHidden(state.spec, seen, spec.id)) return [];
    const points: TracePoint[] = [];
    const curve: (readonly [number, number])[] = [];
    let last: BenchState | null = null;
    for (const s of states) {
      if (
        last &&
        last.scene.vessels[spec.id] === s.scene.vessels[spec.id] &&
        last.scene.probe === s.scene.probe
      )
        continue;
      const point = pointOf(s, spec, seen);
      const former = points.at(-1);
      // Emptied and begun anew: so is its trace.
      if (point && former && point.added_mL < former.added_mL) {
        points.length = 0;
        curve.length = 0;
      }
      if (
        point &&
        !(former && former.added_mL === point.added_mL && former.pH === point.pH && former.hex === point.hex)
      ) {
        if (last && points.length > 0) curve.push(...between(last, s, spec));
        points.push(point);
        curve.push([point.added_mL, point.pH]);
      }
      last = s;
    }
    return points.length > 0
      ? [{ vessel: spec.id, label: spec.label, points, curve: state.spec.careful ? [] : curve }]
      : [];
  });
}

/** What the trace shows, in a sentence. */
export function traceSentence(series: readonly TraceSeries[]): string {
  if (series.length === 0) return 'The trace shows pH against volume added. No probe stands in a liquid yet.';
  return series
    .map((s) => {
      const [a, b] = [s.points[0], s.points.at(-1)];
      if (!a || !b) return '';
      return a === b
        ? `${s.label}: pH ${a.pH.toFixed(2)}, nothing added yet.`
        : `${s.label}: pH ${a.pH.toFixed(2)} at the start, ${b.pH.toFixed(2)} after ${b.added_mL.toFixed(2)} mL.`;
    })
    .join(' ');
}
