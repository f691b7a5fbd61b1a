/** What a registered move is made of. */
import type { BenchSpec, Move, MoveKind, MoveOf, Notice, Refusal, Scene } from '../types.ts';

/** What a move may look at. */
export interface Situation {
  readonly spec: BenchSpec;
  readonly seed: number;
  /** How many moves stand before this one; careful mode's draws hang on it. */
  readonly number: number;
  readonly scene: Scene;
}

export interface Effect {
  readonly scene: Scene;
  readonly notices: readonly Notice[];
}

/** The kind of control that asks for each field, so that buttons, forms and spoken help need no table of their own. */
export type FieldKind =
  | 'source'
  | 'vessel'
  | 'burette'
  | 'pipette'
  | 'indicator'
  | 'wash'
  | 'two-vessels'
  | 'volume'
  | 'drops'
  | 'mark'
  | 'pH'
  | 'temperature'
  | 'seconds'
  | 'gas'
  | 'gear'
  | 'on'
  | 'text'
  | 'reading';

/** One thing that hands can do: shared by buttons, keys, drag, undo, saving and replay. */
export interface MoveDefinition<K extends MoveKind = MoveKind> {
  readonly kind: K;
  /** A verb, as it stands on a button. */
  readonly name: string;
  /** One sentence that says what it does. */
  readonly label: string;
  /** The key that does it while the bench has the focus, or null. */
  readonly key: string | null;
  readonly fields: Readonly<Record<string, FieldKind>>;
  /** Takes liquid in hand: goggles first where the bench says so, refused beside an unwiped spill. */
  readonly handlesLiquid: boolean;
  /** Delivers a volume: where the bench asks for careful reading it cannot be taken back. */
  readonly delivers: boolean;
  /** Whether the bench has what it needs. */
  readonly offered: (spec: BenchSpec) => boolean;
  readonly check: (at: Situation, move: MoveOf<K>) => Refusal | null;
  /** Pure. Called only after `check` found nothing. */
  readonly perform: (at: Situation, move: MoveOf<K>) => Effect;
  /** What was done, in the past tense, for notebook and live region. */
  readonly tell: (at: Situation, move: MoveOf<K>) => string;
}

export const define = <K extends MoveKind>(definition: MoveDefinition<K>): MoveDefinition<K> => definition;

export const refuse = (code: Refusal['code'], sentence: string, possible_uL?: number): Refusal =>
  possible_uL === undefined ? { code, sentence } : { code, sentence, possible_uL };

export type AnyMove = Move;
