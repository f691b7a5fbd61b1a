/**
 * What the engine finds out about a bench beforehand: when each aim is reached with the shelf and the glass given, and
 * whether careful hands reach it too. It searches; where it finds nothing it says 'not found', never 'impossible'.
 */
import { judge } from '../aims.ts';
import { createState } from '../create.ts';
import { glassware } from '../glassware.ts';
import { mLShown } from '../precision.ts';
import { volumeOf } from '../moves/hands.ts';
import { movesOf, replay } from '../apply.ts';
import type { AimSpec, BenchSpec, BenchState, Move } from '../types.ts';
import { doing, follow, reachedBy, type Found } from './search.ts';
import { readied, wayTo } from './ways.ts';

export interface AimRehearsal {
  readonly id: string;
  readonly found: boolean;
  /** What had gone into the aim's vessel since the start when it was met, by source. */
  readonly after: readonly {
    readonly of: string;
    readonly into: string;
    readonly mL: number;
    readonly drops: number;
  }[];
  readonly moves: readonly Move[];
  /** 'Reached after 2.10 mL (42 drops) of Hydrochloric acid.' or 'Not found ...'. */
  readonly sentence: string;
}

export interface Rehearsal {
  readonly aims: readonly AimRehearsal[];
  /** One list of moves that meets every aim found. */
  readonly moves: readonly Move[];
  /** Glasses whose set-up holds more than they can. */
  readonly overflows: readonly string[];
  /** Only of careful benches: in how many of the seeds tried every aim was met. */
  readonly careful?: { readonly seeds: number; readonly met: number; readonly enough: boolean };
  readonly ok: boolean;
}

/** Careful benches have to be met in this share of seeds. */
const ENOUGH = 0.95;

/** Goggles and gloves on, burettes filled: what every run begins with. */
function begin(state: BenchState): Found {
  const gear: Move[] = [
    ...(state.spec.safety?.goggles === 'first' ? [{ kind: 'wear', what: 'goggles', on: true } as const] : []),
    ...(state.spec.safety?.gloves === 'first' ? [{ kind: 'wear', what: 'gloves', on: true } as const] : []),
  ];
  let now: Found = { state: follow(state, gear) ?? state, moves: gear };
  for (const v of state.spec.vessels) {
    const ready = readied(now.state, v.id);
    if (ready) now = { state: ready.state, moves: [...now.moves, ...ready.moves] };
  }
  return now;
}

const vesselsOf = (aim: AimSpec): readonly string[] =>
  'vessel' in aim && aim.vessel ? [aim.vessel] : 'vessels' in aim ? aim.vessels : [];

function afterOf(state: BenchState, aim: AimSpec): AimRehearsal['after'] {
  return vesselsOf(aim).flatMap((into) =>
    Object.entries(state.scene.vessels[into]?.added ?? {}).map(([of, a]) => ({
      of,
      into,
      mL: mLShown(a.volume_nL),
      drops: a.drops > 0 ? a.drops : Math.round(a.volume_nL / 50_000),
    })),
  );
}

function sentenceOf(spec: BenchSpec, after: AimRehearsal['after']): string {
  const name = (id: string) =>
    spec.shelf.find((s) => s.id === id)?.label ?? spec.vessels.find((v) => v.id === id)?.label ?? id;
  if (after.length === 0) return 'Reached without adding anything.';
  const several = new Set(after.map((a) => a.into)).size > 1;
  const parts = after.map(
    (a) =>
      `${a.mL.toFixed(2)} mL (${a.drops} drop${a.drops === 1 ? '' : 's'}) of ${name(a.of)}${several ? ` in ${name(a.into)}` : ''}`,
  );
  return `Reached after ${parts.join(' and ')}.`;
}

const NOT_FOUND =
  'Not found with this shelf and glassware: the search tried one bottle alone, then two after each other.';

interface Walk {
  readonly state: BenchState;
  readonly met: readonly string[];
  readonly aims: readonly AimRehearsal[];
}

/** Goes through the aims in their order; each is sought from where the last one left the bench, else from a fresh start. */
function walk(start: BenchState): Walk {
  const { spec } = start;
  let { state } = begin(start);
  let met: string[] = [];
  const found = new Map<string, AimRehearsal>();
  const arrive = (next: BenchState, list: readonly Move[]) => {
    let at = state;
    for (const move of list) {
      const after = follow(at, [move]);
      if (!after) break;
      at = after;
      for (const id of judge(spec, at, met)) {
        met = [...met, id];
        const aim = spec.aims.find((a) => a.id === id);
        if (aim) {
          const after_ = afterOf(at, aim);
          found.set(id, {
            id,
            found: true,
            after: after_,
            moves: movesOf(at),
            sentence: sentenceOf(spec, after_),
          });
        }
      }
    }
    state = next;
  };
  const pending = () => spec.aims.filter((a) => !met.includes(a.id));
  for (const aim of spec.aims) {
    if (met.includes(aim.id)) continue;
    const reached = reachedBy(spec, aim, met);
    const here = wayTo(state, aim, reached);
    if (here) {
      arrive(here.state, here.moves);
      continue;
    }
    const again = doing(state, { kind: 'startAgain' });
    if (!again) continue;
    const fresh = begin(again.state);
    const there = wayTo(fresh.state, aim, reached);
    if (there) arrive(there.state, [...again.moves, ...fresh.moves, ...there.moves]);
  }
  // Aims that wait for others (limits, order) may have become free meanwhile.
  for (const aim of pending()) {
    const late = wayTo(state, aim, reachedBy(spec, aim, met));
    if (late) arrive(late.state, late.moves);
  }
  return {
    state,
    met,
    aims: spec.aims.map(
      (a) => found.get(a.id) ?? { id: a.id, found: false, after: [], moves: [], sentence: NOT_FOUND },
    ),
  };
}

/**
 * Rehearses a bench.
 * @param options.seed the run that is rehearsed (default 1)
 * @param options.seeds how many seeds a careful bench is tried with (default 100)
 */
export function rehearse(
  spec: BenchSpec,
  options: { readonly seed?: number; readonly seeds?: number } = {},
): Rehearsal {
  const { seed = 1, seeds = 100 } = options;
  const start = createState(spec, { seed });
  const overflows = spec.vessels
    .filter((v) => {
      const vessel = start.scene.vessels[v.id];
      return vessel !== undefined && volumeOf(vessel) > Math.round(glassware[v.glass].capacity_mL * 1e6);
    })
    .map((v) => v.id);
  const { aims, state } = walk(start);
  const all = aims.every((a) => a.found) && overflows.length === 0;
  const plan = movesOf(state);
  if (!spec.careful) return { aims, moves: plan, overflows, ok: all };
  const wanted = aims.filter((a) => a.found).map((a) => a.id);
  let met = 0;
  for (let k = 0; k < seeds; k++) {
    const run = createState(spec, { seed: seed + k });
    if (meets(run, plan, wanted) || reaches(run, wanted)) met += 1;
  }
  const enough = met >= Math.ceil(ENOUGH * seeds);
  return { aims, moves: plan, overflows, careful: { seeds, met, enough }, ok: all && enough };
}

/** Whether the very same moves meet the aims with this run's tolerances too. */
function meets(run: BenchState, plan: readonly Move[], wanted: readonly string[]): boolean {
  const met: string[] = [];
  const done = replay(run, run.seed, plan, (state) => met.push(...judge(run.spec, state, met)));
  return done.ok && wanted.every((id) => met.includes(id));
}

/** Whether hands that watch what happens meet them. */
const reaches = (run: BenchState, wanted: readonly string[]): boolean => {
  const { met } = walk(run);
  return wanted.every((id) => met.includes(id));
};
