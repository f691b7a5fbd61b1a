import { createStore } from 'zustand/vanilla';
import { apply, createState, judge, movesOf, read } from '../../../src/bench/index.ts';
import type { BenchSpec, Move } from '../../../src/bench/types.ts';
import type { RunStore, RunView } from '../../../src/islands/bench/run';

/** A run that lives in memory alone: what the view needs, without keeping or sending anything. */
export function memoryStore(spec: BenchSpec, seed = 1): RunStore {
  return createStore<RunView>()((set, get) => {
    const start = createState(spec, { seed });
    let pour: { from: string; into: string } | null = null;
    const settle = (state: RunView['state']) => {
      const met = get().metAims;
      set({
        state,
        readings: read(state),
        moves: movesOf(state),
        metAims: [...met, ...judge(spec, state, met)],
        refusal: undefined,
        pouring: undefined,
      });
    };
    const move = (volume_uL: number): Move => ({
      kind: 'pour',
      from: pour!.from,
      into: pour!.into,
      volume_uL,
    });
    const act = (next: Move) => {
      const outcome = apply(get().state, next);
      if (outcome.ok) settle(outcome.state);
      else set({ refusal: outcome.refusal });
    };
    return {
      state: start,
      readings: read(start),
      moves: [],
      metAims: [],
      locallyMet: [],
      saving: 'local',
      act,
      startPour: (from, into) => {
        pour = { from, into };
        set({ pouring: { from, into, volume_uL: 0 }, refusal: undefined });
      },
      growPour: (volume_uL) => {
        if (!pour || volume_uL < 1) return;
        let outcome = apply(get().state, move(volume_uL));
        if (!outcome.ok && (outcome.refusal.possible_uL ?? 0) > 0)
          outcome = apply(get().state, move((volume_uL = outcome.refusal.possible_uL!)));
        if (outcome.ok) set({ readings: read(outcome.state), pouring: { ...pour, volume_uL } });
        else set({ refusal: outcome.refusal });
      },
      endPour: () => {
        const { pouring, refusal } = get();
        const last = pour ? move(pouring?.volume_uL ?? 0) : null;
        pour = null;
        if (last && (pouring?.volume_uL ?? 0) > 0) act(last);
        else set({ pouring: undefined, readings: read(get().state), refusal });
      },
      cancelPour: () => {
        pour = null;
        set({ pouring: undefined, readings: read(get().state) });
      },
      undo: () => act({ kind: 'undo' }),
      startAgain: () => act({ kind: 'startAgain' }),
    };
  });
}
