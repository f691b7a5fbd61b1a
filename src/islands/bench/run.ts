import type { StoreApi } from 'zustand/vanilla';
import type { BenchState, Move, Readings, Refusal } from '../../bench/types';

/** Whether a run's moves are safe, and where. */
export type Saving = 'local' | 'saving' | 'saved' | 'offline' | 'conflict' | 'full';

/** What the view needs of a run. The store fulfils it; the view shows a run only through this. */
export interface RunView {
  readonly state: BenchState;
  readonly readings: Readings;
  readonly moves: readonly Move[];
  /** Met, said the server. */
  readonly metAims: readonly string[];
  /** Met as far as this browser can tell. */
  readonly locallyMet: readonly string[];
  /** The prediction that this bench waits for is locked in. */
  readonly predicted?: boolean | undefined;
  readonly saving: Saving;
  readonly pouring?: { readonly from: string; readonly into: string; readonly volume_uL: number } | undefined;
  readonly refusal?: Pick<Refusal, 'code' | 'sentence'> | undefined;
  readonly act: (move: Move) => void;
  readonly startPour: (from: string, into: string) => void;
  readonly growPour: (volume_uL: number) => void;
  readonly endPour: () => void;
  readonly cancelPour: () => void;
  readonly undo: () => void;
  readonly startAgain: () => void;
}

export type RunStore = StoreApi<RunView>;
