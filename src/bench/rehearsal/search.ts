/** How the rehearsal looks for moves that meet an aim: with the shelf and the glass of the bench, by its own rules. */
import { judge } from '../aims.ts';
import { apply } from '../apply.ts';
import { glassware } from '../glassware.ts';
import { offeredMoves } from '../moves/registry.ts';
import { pHOf } from '../liquid.ts';
import { volumeOf } from '../moves/hands.ts';
import type { AimSpec, BenchSpec, BenchState, Move, MoveKind } from '../types.ts';

export interface Found {
  readonly state: BenchState;
  readonly moves: readonly Move[];
}

/** Whether the aim counts as met in this state, given what was met before. */
export type Reached = (state: BenchState) => boolean;

export const reachedBy =
  (spec: BenchSpec, aim: AimSpec, met: readonly string[]): Reached =>
  (state) =>
    judge(spec, state, met).includes(aim.id);

/** Does moves in a row; null where one is refused. */
export function follow(state: BenchState, list: readonly Move[]): BenchState | null {
  let now = state;
  for (const move of list) {
    const outcome = apply(now, move);
    if (!outcome.ok) return null;
    now = outcome.state;
  }
  return now;
}

const offers = (state: BenchState, kind: MoveKind): boolean => offeredMoves(state.spec).includes(kind);

/** A move, and a swirl behind it where the liquid is not one yet. */
export function doing(state: BenchState, ...list: Move[]): Found | null {
  const after = follow(state, list);
  if (!after) return null;
  const unmixed = after.spec.vessels.filter((v) => after.scene.vessels[v.id]?.layer);
  const swirls: Move[] = unmixed.map((v) => ({ kind: 'swirl', vessel: v.id }));
  const calm = follow(after, swirls);
  return calm ? { state: calm, moves: [...list, ...swirls] } : { state: after, moves: list };
}

/** The move by which so many drops, or so much, of a source reaches a vessel on this bench; null where none is offered. */
export function adding(state: BenchState, from: string, into: string, drops: number): Move | null {
  const spec = state.spec.vessels.find((v) => v.id === from);
  const item = state.spec.shelf.find((s) => s.id === from);
  if (spec?.glass === 'burette-50') {
    if (drops > 20 && offers(state, 'dispense'))
      return { kind: 'dispense', burette: from, into, volume_uL: drops * 50 };
    return offers(state, 'drip') ? { kind: 'drip', from, into, drops } : null;
  }
  if (item?.kind === 'indicator' && offers(state, 'addIndicator'))
    return { kind: 'addIndicator', indicator: from, into, drops };
  if (offers(state, 'drip') && drops <= 200) return { kind: 'drip', from, into, drops };
  if (offers(state, 'pour')) return { kind: 'pour', from, into, volume_uL: drops * 50 };
  return offers(state, 'drip') ? { kind: 'drip', from, into, drops } : null;
}

/** What is worth trying: reagents first, then water and other vessels, indicators last. */
export function sourcesFor(state: BenchState, into: string): string[][] {
  const full = (kinds: readonly string[]) =>
    state.spec.shelf
      .filter((s) => kinds.includes(s.kind) && (state.scene.bottles[s.id]?.volume_nL ?? 0) > 0)
      .map((s) => s.id);
  const vessels = state.spec.vessels
    .filter((v) => v.id !== into && heldIn(state, v.id) > 0 && glassware[v.glass].family !== 'pipette')
    .map((v) => v.id);
  const burettes = vessels.filter((id) =>
    state.spec.vessels.some((v) => v.id === id && v.glass === 'burette-50'),
  );
  const others = vessels.filter((id) => !burettes.includes(id));
  return [
    [...burettes, ...full(['reagent'])],
    [...full(['wash']), ...others],
    full(['indicator', 'standard']),
  ];
}

export const heldIn = (state: BenchState, id: string): number => {
  const vessel = state.scene.vessels[id];
  return vessel ? volumeOf(vessel) : 0;
};

/** Drops tried from one source: 100 mL at the most; one by one to begin with, then in steps of a thirtieth. */
const MOST_DROPS = 2000;
const ONE_BY_ONE = 60;
const nextDose = (drops: number): number => (drops < ONE_BY_ONE ? drops + 1 : drops + Math.ceil(drops / 30));
/** Where the pH jumps by more than this between two doses, the drops between are tried one by one. */
const JUMP_PH = 0.15;

/** Something that changes steadily with the dose, to notice that a narrow aim lies between two doses. */
export interface Gauge {
  /** -1 below the aim's bounds, 1 above, 0 within or where it has none. */
  readonly side: (state: BenchState) => number;
}

const pHIn = (state: BenchState, id: string): number => {
  const vessel = state.scene.vessels[id];
  return vessel && vessel.liquid.volume_nL > 0 ? pHOf(vessel.liquid, state.spec.model) : 7;
};

/** The smallest number of drops of one source that meets the aim, among those tried; null where none does. */
export function scan(
  state: BenchState,
  from: string,
  into: string,
  reached: Reached,
  gauge: Gauge,
): Found | null {
  const glass = glassware[state.spec.vessels.find((v) => v.id === into)?.glass ?? 'beaker-50'];
  const room = glass.capacity_mL * 1e6 - heldIn(state, into);
  const most = Math.min(MOST_DROPS, Math.floor(room / 50_000));
  const dose = (drops: number): Found | null => {
    const move = adding(state, from, into, drops);
    return move && doing(state, move);
  };
  let last = state;
  let tried = 0;
  for (let drops = 1; drops <= most; drops = nextDose(drops)) {
    const done = dose(drops);
    if (!done) return null;
    const skipped = drops - tried > 1;
    if (
      skipped &&
      (gauge.side(last) !== gauge.side(done.state) ||
        Math.abs(pHIn(last, into) - pHIn(done.state, into)) > JUMP_PH)
    ) {
      for (let between = tried + 1; between < drops; between++) {
        const finer = dose(between);
        if (finer && reached(finer.state)) return finer;
      }
    }
    if (reached(done.state)) return done;
    last = done.state;
    tried = drops;
  }
  return null;
}

/** First additions tried before a second source is scanned, mL. */
const FIRST_DOSES_ML = [1, 2.5, 5, 10, 20, 25, 50] as const;

/** One source alone, then two one after the other; of several ways the one with the fewest drops. */
export function search(
  state: BenchState,
  targets: readonly string[],
  reached: Reached,
  gauge: Gauge,
): Found | null {
  for (const group of [0, 1, 2]) {
    const found = targets.flatMap((into) =>
      (sourcesFor(state, into)[group] ?? []).map((from) => scan(state, from, into, reached, gauge)),
    );
    const best = shortest(found);
    if (best) return best;
  }
  for (const into of targets) {
    for (const first of sourcesFor(state, into).slice(0, 2).flat()) {
      for (const dose of FIRST_DOSES_ML) {
        const move = adding(state, first, into, Math.round(dose * 20));
        const begun = move && doing(state, move);
        if (!begun) break;
        if (reached(begun.state)) return begun;
        const seconds = sourcesFor(begun.state, into)
          .flat()
          .filter((from) => from !== first);
        const found = shortest(seconds.map((from) => scan(begun.state, from, into, reached, gauge)));
        if (found) return { state: found.state, moves: [...begun.moves, ...found.moves] };
      }
    }
  }
  return null;
}

const drops = (found: Found): number =>
  found.moves.reduce(
    (sum, m) =>
      sum + ('drops' in m && m.drops ? m.drops : 'volume_uL' in m && m.volume_uL ? m.volume_uL / 50 : 0),
    0,
  );

const shortest = (list: readonly (Found | null)[]): Found | null =>
  list.reduce<Found | null>((best, f) => (f && (!best || drops(f) < drops(best)) ? f : best), null);
