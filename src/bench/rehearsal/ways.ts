/** Ways to meet aims that are not found by dripping: each kind of aim has its own handful of things to try. */
import { buretteReading, glassware } from '../glassware.ts';
import { sideOfAim } from '../aims.ts';
import { FILM_NL } from '../moves/hands.ts';
import type { AimSpec, BenchState, Move, MoveOf } from '../types.ts';
import {
  adding,
  doing,
  follow,
  heldIn,
  search,
  sourcesFor,
  type Gauge,
  type Found,
  type Reached,
} from './search.ts';

const firstReached = (candidates: Iterable<Found | null>, reached: Reached): Found | null => {
  for (const found of candidates) if (found && reached(found.state)) return found;
  return null;
};

/** Exactly so much of one thing into a vessel. */
function exactly(
  state: BenchState,
  aim: AimSpec & { kind: 'added' | 'drops' },
  reached: Reached,
): Found | null {
  const before = state.scene.vessels[aim.vessel]?.added[aim.of];
  const missing =
    aim.kind === 'added'
      ? Math.ceil(((aim.min_mL ?? 0.05) * 1e6 - (before?.volume_nL ?? 0)) / 50_000 - 1e-9)
      : (aim.min ?? 1) - (before?.drops ?? 0);
  const ready = readied(state, aim.of);
  const begun = ready ?? { state, moves: [] };
  const move: Move | null =
    aim.kind === 'drops' && missing > 0
      ? { kind: 'drip', from: aim.of, into: aim.vessel, drops: missing }
      : adding(begun.state, aim.of, aim.vessel, Math.max(1, missing));
  const done = move && doing(begun.state, move);
  return done && reached(done.state) ? { state: done.state, moves: [...begun.moves, ...done.moves] } : null;
}

/** A burette is filled before it is used. */
export function readied(state: BenchState, id: string): Found | null {
  const spec = state.spec.vessels.find((v) => v.id === id);
  if (spec?.glass !== 'burette-50' || heldIn(state, id) > FILM_NL) return null;
  const reagent = state.spec.shelf.find((s) => s.kind === 'reagent');
  return reagent ? doing(state, { kind: 'fill', from: reagent.id, into: id }) : null;
}

/** Both standards, one after the other, each in its own beaker or in one that is emptied and rinsed between. */
function calibrating(state: BenchState): Found | null {
  const standards = state.spec.shelf.filter((s) => s.standard_pH !== undefined);
  const wash = state.spec.shelf.find((s) => s.kind === 'wash');
  const beaker = state.spec.vessels.find(
    (v) => glassware[v.glass].family === 'beaker' && heldIn(state, v.id) <= FILM_NL,
  );
  let now: Found = { state, moves: [] };
  const go = (...list: Move[]): boolean => {
    const after = follow(now.state, list);
    if (after) now = { state: after, moves: [...now.moves, ...list] };
    return after !== null;
  };
  for (const standard of standards.slice(0, 2)) {
    const standing = state.spec.vessels.find(
      (v) => v.contents === standard.contents && heldIn(state, v.id) > FILM_NL,
    );
    const place = standing ?? beaker;
    if (!place || standard.standard_pH === undefined) return null;
    if (!standing) {
      if (heldIn(now.state, place.id) > FILM_NL && !go({ kind: 'discard', vessel: place.id })) return null;
      if (wash && heldIn(now.state, place.id) > 0) go({ kind: 'rinse', vessel: place.id, with: wash.id });
      if (!go({ kind: 'pour', from: standard.id, into: place.id, volume_uL: 20_000 })) return null;
    }
    if (!go({ kind: 'dipProbe', vessel: place.id }, { kind: 'calibrate', value_pH: standard.standard_pH }))
      return null;
    if (!go({ kind: 'liftProbe' }, { kind: 'rinseProbe' })) return null;
  }
  return now;
}

function reading(state: BenchState, aim: AimSpec & { kind: 'reading' }): Found | null {
  const ready = readied(state, aim.vessel) ?? { state, moves: [] };
  const spec = state.spec.vessels.find((v) => v.id === aim.vessel);
  if (!spec) return null;
  const true_mL = buretteReading(glassware[spec.glass], heldIn(ready.state, aim.vessel) / 1e6);
  const done = doing(ready.state, {
    kind: 'enterReading',
    vessel: aim.vessel,
    value_mL: Math.round(true_mL * 20) / 20,
  });
  return done && { state: done.state, moves: [...ready.moves, ...done.moves] };
}

/** Empties vessels one after the other; where that is not enough, neutralises each before it goes. */
function* wasting(state: BenchState, reached: Reached): Generator<Found | null> {
  const full = state.spec.vessels
    .filter((v) => heldIn(state, v.id) > FILM_NL && glassware[v.glass].family !== 'pipette')
    .map((v) => v.id);
  let now: Found | null = { state, moves: [] };
  for (const id of full) {
    const done: Found | null = now && doing(now.state, { kind: 'discard', vessel: id });
    now = done && now ? { state: done.state, moves: [...now.moves, ...done.moves] } : now;
    yield now;
  }
  for (const id of full) {
    const gone: Reached = (s) => {
      const after = follow(s, [{ kind: 'discard', vessel: id }]);
      return after !== null && reached(after);
    };
    const found = search(state, [id], gone, { side: () => 0 });
    const done = found && doing(found.state, { kind: 'discard', vessel: id });
    yield found && done && { state: done.state, moves: [...found.moves, ...done.moves] };
  }
}

/** Every simple move of one kind that this bench might take. */
function* simple(state: BenchState, aim: AimSpec & { kind: 'did' }): Generator<Move> {
  const vessels = aim.vessel === undefined ? state.spec.vessels.map((v) => v.id) : [aim.vessel];
  const kind = aim.move;
  if (
    kind === 'liftProbe' ||
    kind === 'rinseProbe' ||
    kind === 'wipe' ||
    kind === 'startAgain' ||
    kind === 'undo'
  )
    yield { kind };
  if (kind === 'wear')
    yield* (['goggles', 'gloves'] as const).map((what): MoveOf<'wear'> => ({ kind, what, on: true }));
  for (const vessel of vessels) {
    if (kind === 'swirl' || kind === 'dipProbe' || kind === 'discard') yield { kind, vessel };
    if (kind === 'stir' || kind === 'stopper') yield* [true, false].map((on): Move => ({ kind, vessel, on }));
    if (kind === 'setTemperature') yield { kind, vessel, temperature_C: 40 };
    if (kind === 'bubble') yield { kind, vessel, gas: 'air', seconds: 60 };
    if (kind === 'label') yield { kind, vessel, text: 'A' };
    for (const from of sourcesFor(state, vessel).flat()) {
      if (kind === 'drip') yield { kind, from, into: vessel, drops: 1 };
      if (kind === 'pour') yield { kind, from, into: vessel, volume_uL: 1000 };
      if (kind === 'fill') yield { kind, from, into: vessel };
      if (kind === 'rinse') yield { kind, vessel, with: from };
      if (kind === 'addIndicator') yield { kind, indicator: from, into: vessel, drops: 1 };
      if (kind === 'dispense') yield { kind, burette: from, into: vessel, volume_uL: 1000 };
      const marks = glassware[state.spec.vessels.find((v) => v.id === vessel)?.glass ?? 'beaker-50'].marks;
      if (kind === 'pourToMark' && marks) yield { kind, from, into: vessel, mark_mL: marks.last_mL };
      for (const tool of state.spec.vessels) {
        if (kind === 'pipette' && glassware[tool.glass].family === 'pipette')
          yield { kind, pipette: tool.id, from, into: vessel };
      }
      for (const other of state.spec.vessels) {
        if (kind === 'addToBoth' && other.id !== vessel && other.id !== from)
          yield { kind, from, into: [vessel, other.id], drops: 1 };
      }
    }
  }
}

function repeated(state: BenchState, aim: AimSpec & { kind: 'did' }, reached: Reached): Found | null {
  let now: Found = { state, moves: [] };
  for (let k = 0; k < (aim.times ?? 1); k++) {
    let next: Found | null = null;
    for (const move of simple(now.state, aim)) {
      next = doing(now.state, move);
      if (next) break;
    }
    if (!next) return null;
    now = { state: next.state, moves: [...now.moves, ...next.moves] };
    if (reached(now.state)) return now;
  }
  return null;
}

const middle = (min: number | undefined, max: number | undefined): number =>
  Math.round(((min ?? max ?? 25) + (max ?? min ?? 25)) * 5) / 10;

const gaugeOf = (aim: AimSpec): Gauge => ({ side: (state) => sideOfAim(state, aim) });

/** The moves that meet an aim from this state on, or null: not found with what was tried. */
export function wayTo(state: BenchState, aim: AimSpec, reached: Reached): Found | null {
  switch (aim.kind) {
    case 'added':
    case 'drops':
      return exactly(state, aim, reached);
    case 'temperature':
      return firstReached(
        [
          doing(state, {
            kind: 'setTemperature',
            vessel: aim.vessel,
            temperature_C: middle(aim.min_C, aim.max_C),
          }),
        ],
        reached,
      );
    case 'calibrated':
      return firstReached([calibrating(state)], reached);
    case 'reading':
      return firstReached([reading(state, aim)], reached);
    case 'waste-pH':
      return firstReached(wasting(state, reached), reached);
    case 'did':
      return repeated(state, aim, reached);
    case 'used-at-most':
      return reached(state) ? { state, moves: [] } : null;
    case 'equal':
      if (aim.quantity === 'temperature') return firstReached(levelled(state, aim.vessels), reached);
      return search(state, aim.vessels, reached, gaugeOf(aim));
    case 'pH':
    case 'colour':
    case 'ratio':
    case 'volume':
      return search(state, [aim.vessel], reached, gaugeOf(aim));
  }
}

function* levelled(state: BenchState, [a, b]: readonly [string, string]): Generator<Found | null> {
  const t = state.scene.vessels[b]?.liquid.temperature_C ?? 25;
  yield doing(state, { kind: 'setTemperature', vessel: a, temperature_C: Math.round(t * 10) / 10 });
}
