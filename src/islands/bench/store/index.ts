import { createStore } from 'zustand/vanilla';
import {
  apply,
  applyJoined,
  createState,
  judge,
  judgeRun,
  movesOf,
  preview,
  read,
  replay,
} from '../../../bench/index.ts';
import type { BenchSpec, BenchState, Move, Seen } from '../../../bench/types.ts';
import { delivery } from '../apron/deeds';
import type { RunStore, RunView } from '../run';
import { tellDone } from '../sync/done';
import type { Work, WorkView } from '../sync/work';

const PREDICT_FIRST = {
  code: 'predict-first',
  sentence: 'Lock in your prediction above, then the bench opens.',
} as const;

/**
 * One run of a bench in this page: moves go through the same engine as on the server, a pour under way is a preview, and
 * what a reader may see follows from what they have earned. What is kept, and where, is the work's business.
 * @param work absent where nothing is kept: the home page's bench
 */
export function createBenchStore({ spec, work }: { spec: BenchSpec; work?: Work | undefined }): RunStore {
  const needsPrediction = work?.given.prediction != null;
  const begin = (seed: number, moves: readonly Move[]): BenchState =>
    moves.length > 0 ? replay(spec, seed, moves).state : createState(spec, { seed });
  // As the server drew it. What this browser keeps of its own comes after: the page then becomes alive without a break.
  const given = work?.given;
  const first = begin(given?.run?.seed ?? work?.seed() ?? 1, given?.run?.moves ?? []);
  let pour: { readonly from: string; readonly into: string } | null = null;
  let catchUp = (): void => undefined;

  const store = createStore<RunView>()((set, get) => {
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
      if (met.length > locallyMet.length) tellDone(met);
      return met.length > locallyMet.length;
    };
    /** The newest move met an aim: it stays as it is, so that the server sees that state, too. */
    let fixed = true;
    const act = (move: Move) => {
      if (needsPrediction && !get().predicted) return set({ refusal: PREDICT_FIRST });
      const mayGrow = !fixed && (work?.newestIsHere() ?? true);
      const outcome = mayGrow ? applyJoined(get().state, move) : apply(get().state, move);
      if (!outcome.ok) return set({ refusal: outcome.refusal });
      const grown = 'grown' in outcome && outcome.grown === true;
      fixed = settle(outcome.state);
      if (grown) work?.growNewest(outcome.state.move!);
      else work?.add(move);
    };

    if (work) {
      const load = () => {
        const state = begin(work.seed(), work.moves());
        pour = null;
        fixed = true;
        const met = [...work.store.getState().metAims, ...judgeRun(state).map(({ id }) => id)];
        set({ locallyMet: [...new Set(met)] });
        settle(state);
        tellDone(met);
      };
      const follow = ({ saving, metAims, prediction, word }: WorkView) => {
        const predicted = !needsPrediction || prediction !== null;
        const now = get();
        set({
          saving,
          metAims,
          locallyMet: [...new Set([...now.locallyMet, ...metAims])],
          predicted,
          ...(predicted === now.predicted
            ? {}
            : { refusal: undefined, readings: read(now.state, { ...seen(), predicted }) }),
          ...(word ? { refusal: { code: 'not-offered' as const, sentence: word } } : {}),
        });
      };
      work.listen({ load });
      work.store.subscribe(follow);
      catchUp = () => {
        if (!work.store.getState().ready) return;
        follow(work.store.getState());
        load();
      };
    }
    const metAims = given?.metAims ?? [];
    const predicted = !needsPrediction || given?.locked !== undefined;
    return {
      state: first,
      readings: read(first, { predicted, metAims }),
      moves: movesOf(first),
      metAims,
      locallyMet: metAims,
      predicted,
      saving: given?.person != null ? 'saved' : 'local',
      act,
      startPour: (from, into) => {
        if (needsPrediction && !get().predicted) return set({ refusal: PREDICT_FIRST });
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
  catchUp();
  return store;
}
