/** The bench's one transition: state and move give the next state or a refusal. Store, server and tests all call it. */
import { startScene } from './create.ts';
import { createState } from './create.ts';
import { isRecord, said } from './moves/hands.ts';
import { refuse, type MoveDefinition, type Situation } from './moves/kinds.ts';
import { moves } from './moves/registry.ts';
import type { BenchSpec, BenchState, Move, Outcome, Refusal } from './types.ts';

/** Changes whenever the same moves on the same liquids would end otherwise; stored with a run beside the chemistry's version. */
export const BENCH_VERSION = '1';

/** A run holds this many moves at most. */
export const MAX_MOVES = 2000;

export const situationOf = (state: BenchState): Situation => ({
  spec: state.spec,
  seed: state.seed,
  number: state.depth,
  scene: state.scene,
});

/** The registered definition of a move's kind, or null for a kind that there is not. */
export function definitionOf(kind: unknown): MoveDefinition | null {
  return typeof kind === 'string' && Object.hasOwn(moves, kind)
    ? ((moves as Record<string, unknown>)[kind] as MoveDefinition)
    : null;
}

/** Why a move can't be done now, or null. Never throws, whatever it is given. */
export function check(state: BenchState, move: Move): Refusal | null {
  if (!isRecord(move)) return refuse('unknown-move', 'This is no move.');
  if (move.kind === 'undo') return checkUndo(state);
  if (move.kind === 'startAgain')
    return state.count === 0 ? refuse('already-so', 'The bench stands as it was at the start.') : null;
  const definition = definitionOf(move.kind);
  if (!definition)
    return refuse('unknown-move', `There is no move ${said((move as { kind?: unknown }).kind)}.`);
  const { spec, scene } = state;
  if (spec.moves && !spec.moves.includes(move.kind) && move.kind !== 'wear' && move.kind !== 'wipe') {
    return refuse('not-offered', `"${definition.name}" is not part of this bench.`);
  }
  if (definition.handlesLiquid) {
    if (spec.safety?.goggles === 'first' && !scene.goggles)
      return refuse('goggles-first', 'Put your goggles on first.');
    if (spec.safety?.gloves === 'first' && !scene.gloves)
      return refuse('gloves-first', 'Put your gloves on first.');
    if (scene.spills.length > 0) return refuse('wipe-first', 'Something went beside. Wipe it up first.');
  }
  return definition.check(situationOf(state), move);
}

function checkUndo(state: BenchState): Refusal | null {
  const last = lastStanding(state);
  if (!last?.move) return refuse('nothing-to-undo', 'There is nothing to take back.');
  if (state.spec.careful && definitionOf(last.move.kind)?.delivers) {
    return refuse('cannot-unpour', "What is poured can't be unpoured here. Start again for a fresh try.");
  }
  return null;
}

/** The state whose scene is on the bench now: undone moves led back to it. */
export function lastStanding(state: BenchState): BenchState | null {
  let now: BenchState | null = state;
  while (now?.move?.kind === 'undo') now = now.before?.back ?? null;
  return now;
}

function perform(state: BenchState, move: Move): BenchState {
  const rest = { spec: state.spec, seed: state.seed, count: state.count + 1, move, before: state };
  if (move.kind === 'undo') {
    const to = state.back as BenchState;
    return { ...rest, scene: to.scene, back: to.back, depth: to.depth, notices: [] };
  }
  if (move.kind === 'startAgain') {
    return {
      ...rest,
      scene: startScene(state.spec, state.seed),
      back: state,
      depth: state.depth + 1,
      notices: [],
    };
  }
  const { scene, notices } = (definitionOf(move.kind) as MoveDefinition).perform(situationOf(state), move);
  return { ...rest, scene, notices, back: state, depth: state.depth + 1 };
}

/** Does a move, or says why not. Pure; the given state stays as it is. */
export function apply(state: BenchState, move: Move): Outcome {
  if (state.count >= MAX_MOVES) {
    return {
      ok: false,
      refusal: refuse(
        'run-full',
        `A run holds ${MAX_MOVES} moves. This one is full: begin a new run to go on.`,
      ),
    };
  }
  const refusal = check(state, move);
  return refusal ? { ok: false, refusal } : { ok: true, state: perform(state, move) };
}

/** What the bench would look like after a move that is still going on (a held pour): as `apply`, not to be kept. */
export const preview = apply;

/** One move for two: drops of the same bottle into the same vessel in a row become one move with a count. */
export function combine(last: Move, next: Move): Move | null {
  if (last.kind === 'drip' && next.kind === 'drip' && last.from === next.from && last.into === next.into) {
    return { ...last, drops: last.drops + next.drops };
  }
  if (
    last.kind === 'addIndicator' &&
    next.kind === 'addIndicator' &&
    last.indicator === next.indicator &&
    last.into === next.into
  ) {
    return { ...last, drops: last.drops + next.drops };
  }
  return null;
}

/**
 * As `apply`, but joins the move to the last one where that is possible, so that identical drops make one entry of the
 * list. `grown` tells the keeper of the list to replace its last entry by `state.move`.
 * Only for a last move that was not stored elsewhere yet: stored lists only grow.
 */
export function applyJoined(state: BenchState, move: Move): Outcome & { readonly grown?: boolean } {
  const joined = state.move && state.before ? combine(state.move, move) : null;
  if (joined && state.before) {
    const outcome = apply(state.before, joined);
    if (outcome.ok) return { ...outcome, grown: true };
  }
  return apply(state, move);
}

/** The moves of a run, oldest first. */
export function movesOf(state: BenchState): Move[] {
  const list: Move[] = [];
  for (let s: BenchState | null = state; s?.move; s = s.before) list.push(s.move);
  return list.reverse();
}

/** Every state of a run, the start first: stepping through it costs nothing, each holds its whole scene. */
export function statesOf(state: BenchState): BenchState[] {
  const list: BenchState[] = [];
  for (let s: BenchState | null = state; s; s = s.before) list.push(s);
  return list.reverse();
}

export type Replayed =
  | { readonly ok: true; readonly state: BenchState }
  | { readonly ok: false; readonly state: BenchState; readonly index: number; readonly refusal: Refusal };

/**
 * Does a list of moves from the start, or from a state that was kept (a snapshot: states are immutable, so any may be).
 * @param each called after every move, with its index in `moves`
 * @returns the last state; where a move was refused, the state before it, its index and why
 */
export function replay(
  from: BenchSpec | BenchState,
  seed: number,
  list: readonly Move[],
  each?: (state: BenchState, index: number) => void,
): Replayed {
  let state = 'scene' in from ? from : createState(from, { seed });
  for (const [index, move] of list.entries()) {
    const outcome = apply(state, move);
    if (!outcome.ok) return { ok: false, state, index, refusal: outcome.refusal };
    state = outcome.state;
    each?.(state, index);
  }
  return { ok: true, state };
}
