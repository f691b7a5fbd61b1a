import { createStore, type StoreApi } from 'zustand/vanilla';
import { flowed_uL } from './flow';
import { REST, step, type Hand, type HandEvent } from './machine';

/** What a pour under way asks of the run. */
export interface Pourable {
  startPour: (from: string, into: string) => void;
  /** Sets what has flowed since the start; false when no more can flow (brim, empty bottle, refusal). */
  growPour: (volume_uL: number) => boolean;
  endPour: () => void;
  cancelPour: () => void;
}

/** The browser's frames, replaceable in tests. */
export interface Clock {
  readonly now: () => number;
  readonly frame: (call: () => void) => number;
  readonly stop: (handle: number) => void;
}

const BROWSER: Clock = {
  now: () => performance.now(),
  frame: (call) => requestAnimationFrame(call),
  stop: (handle) => cancelAnimationFrame(handle),
};

export interface HandState {
  readonly hand: Hand;
  readonly dispatch: (event: HandEvent) => void;
}

export type HandStore = StoreApi<HandState>;

/** The hand and its pour: one frame loop, alive only while something flows. */
export function createHandStore(run: Pourable, clock: Clock = BROWSER): HandStore {
  let handle: number | null = null;
  let began = 0;

  const stop = () => {
    if (handle !== null) clock.stop(handle);
    handle = null;
  };

  return createStore<HandState>()((set, get) => {
    const flow = () => {
      handle = clock.frame(flow);
      if (!run.growPour(flowed_uL(clock.now() - began))) get().dispatch({ kind: 'letGo' });
    };
    return {
      hand: REST,
      dispatch: (event) => {
        const { hand, effects } = step(get().hand, event);
        for (const effect of effects) {
          if (effect.kind === 'startPour') {
            run.startPour(effect.from, effect.into);
            began = clock.now();
            handle = clock.frame(flow);
            continue;
          }
          // What has flowed up to this moment counts, also between two frames.
          if (effect.kind === 'endPour') {
            run.growPour(flowed_uL(clock.now() - began));
            stop();
            run.endPour();
          } else {
            stop();
            run.cancelPour();
          }
        }
        if (hand !== get().hand) set({ hand });
      },
    };
  });
}
