/** Every move that hands can do, by kind. Buttons, keys, drag, saving and replay all look here. */
import type { BenchSpec, MoveKind } from '../types.ts';
import { discard, rinse } from './emptying.ts';
import { bubble, setTemperature, stir, stopper, swirl } from './glass.ts';
import { calibrate, dipProbe, liftProbe, rinseProbe } from './instruments.ts';
import type { MoveDefinition } from './kinds.ts';
import { addIndicator, addToBoth, dispense, drip, fill, pipette, pour, pourToMark } from './pouring.ts';
import { wear, wipe } from './safety.ts';
import { enterReading, label } from './writing.ts';

/** Undo and start-again are moves of the list, not of a scene: `apply` does them. */
type SceneMoves = { readonly [K in Exclude<MoveKind, 'undo' | 'startAgain'>]: MoveDefinition<K> };

export const moves: SceneMoves = {
  pour,
  pourToMark,
  drip,
  addToBoth,
  dispense,
  pipette,
  fill,
  addIndicator,
  swirl,
  stir,
  dipProbe,
  liftProbe,
  rinseProbe,
  calibrate,
  setTemperature,
  bubble,
  stopper,
  wear,
  rinse,
  discard,
  label,
  enterReading,
  wipe,
};

/** Names, sentences and keys of the two moves that act on the list itself. */
export const listMoves = {
  undo: { kind: 'undo', name: 'Undo', label: 'Takes back the last move that still stands.', key: 'u' },
  startAgain: {
    kind: 'startAgain',
    name: 'Start again',
    label: 'Sets the bench up as it was at the start.',
    key: null,
  },
} as const;

const ALWAYS: readonly MoveKind[] = ['undo', 'startAgain', 'wear', 'wipe'];

/** The kinds of moves that this bench offers, in the registry's order. */
export function offeredMoves(spec: BenchSpec): readonly MoveKind[] {
  const here = (Object.keys(moves) as (keyof SceneMoves)[]).filter(
    (kind) =>
      moves[kind].offered(spec) && (!spec.moves || spec.moves.includes(kind) || ALWAYS.includes(kind)),
  );
  return [...here, 'undo', 'startAgain'];
}
