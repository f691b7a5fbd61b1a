import { createStore } from 'zustand/vanilla';
import { apply, createState, judge, movesOf, preview, read, replay } from '../../../bench/index.ts';
import type { BenchSpec, BenchState, Move, Seen } from '../../../bench/types.ts';
import { delivery } from '../apron/deeds';
import type { RunStore, RunView } from '../run';

export interface BenchStoreOptions {
  readonly lesson: string;
  readonly spec: BenchSpec;
  readonly signedIn: boolean;
  readonly seed?: number;
  /** Moves of a run that is taken up again. */
  readonly moves?: readonly Move[];
  readonly metAims?: readonly string[];
  readonly predicted?: boolean;
}

/**
 * One run of a bench in this page: moves go through the same engine as on the server, a pour under way is a preview, and
 * what a reader may see follows from what they have earned.
 */
export function createBenchStore(options: BenchStoreOptions): RunStore {
  const { spec, seed = 1 } = options;
  const first: BenchState =
    options.moves && options.moves.length > 0
      ? replay(spec, seed, options.moves).state
      : createState(spec, { seed });
  let pour: { readonly from: string; readonly into: string } | null = null;

  return createStore<RunView>()((set, get) => {
    const seen = (): Seen => ({ predicted: get().predicted === true, metAims: get().locallyMet });
    const settle = (state: BenchState) => {
      const { locallyMet } = get();
      const met = [...locallyMet, ...judge(spec, state, locallyMet)];
      set({
        state,
        moves: movesOf(state),
        locallyMet: met,
        readings: read(state, { ...seen(), metAims: met }),
        refusal: undefined,
        pouring: undefined,
      });
    };
    const act = (move: Move) => {
      const outcome = apply(get().state, move);
      if (outcome.ok) settle(outcome.state);
      else set({ refusal: outcome.refusal });
    };
    const metAims = options.metAims ?? [];
    const predicted = options.predicted ?? false;
    return {
      state: first,
      readings: read(first, { predicted, metAims }),
      moves: movesOf(first),
      metAims,
      locallyMet: metAims,
      predicted,
      saving: 'local',
      act,
      startPour: (from, into) => {
        pour = { from, into };
        set({ pouring: { from, into, volume_uL: 0 }, refusal: undefined });
      },
      growPour: (wanted_uL) => {
        if (pour === null || wanted_uL < 1) return;
        const { state } = get();
        let volume_uL = wanted_uL;
        let outcome = preview(state, delivery(spec, pour.from, pour.into, volume_uL));
        // At the brim, or with the last of the bottle, exactly what goes is poured.
        if (!outcome.ok && (outcome.refusal.possible_uL ?? 0) > 0) {
          volume_uL = outcome.refusal.possible_uL!;
          outcome = preview(state, delivery(spec, pour.from, pour.into, volume_uL));
        }
        if (outcome.ok) set({ readings: read(outcome.state, seen()), pouring: { ...pour, volume_uL } });
        else set({ refusal: outcome.refusal });
      },
      endPour: () => {
        const { pouring, state, refusal } = get();
        pour = null;
        if (pouring && pouring.volume_uL > 0 && refusal === undefined) {
          act(delivery(spec, pouring.from, pouring.into, pouring.volume_uL));
        } else {
          set({ pouring: undefined, readings: read(state, seen()) });
        }
      },
      cancelPour: () => {
        pour = null;
        set({ pouring: undefined, readings: read(get().state, seen()) });
      },
      undo: () => act({ kind: 'undo' }),
      startAgain: () => act({ kind: 'startAgain' }),
    };
  });
}
