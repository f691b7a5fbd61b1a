import { describe, expect, it } from 'vitest';
import { flowed_uL } from '../../../src/islands/bench/hand/flow';
import { createHandStore, type Clock, type Pourable } from '../../../src/islands/bench/hand/store';

describe('the flow of a held bottle', () => {
  it('is 0.2 mL/s for the first second and 1 mL/s after', () => {
    expect([0, 250, 1000, 1500, 6000].map(flowed_uL)).toEqual([0, 50, 200, 700, 5200]);
    expect(flowed_uL(-5)).toBe(0);
  });
});

function rig(room_uL = Number.POSITIVE_INFINITY) {
  const log: string[] = [];
  let now = 0;
  let frames: (() => void)[] = [];
  const clock: Clock = {
    now: () => now,
    frame: (call) => frames.push(call),
    stop: () => {
      frames = [];
    },
  };
  const run: Pourable = {
    startPour: (from, into) => log.push(`start ${from} ${into}`),
    growPour: (volume_uL) => {
      log.push(`grow ${Math.min(room_uL, volume_uL)}`);
      return volume_uL < room_uL;
    },
    endPour: () => log.push('end'),
    cancelPour: () => log.push('cancel'),
  };
  const store = createHandStore(run, clock);
  const pass = (ms: number) => {
    now += ms;
    const due = frames;
    frames = [];
    due.forEach((call) => call());
  };
  return { store, log, pass, waiting: () => frames.length };
}

describe('a pour', () => {
  it('grows with each frame and counts what flowed after the last one', () => {
    const { store, log, pass, waiting } = rig();
    store.getState().dispatch({ kind: 'hold', from: 'acid', into: 'water' });
    pass(500);
    pass(500);
    store.getState().dispatch({ kind: 'letGo' });
    expect(log).toEqual(['start acid water', 'grow 100', 'grow 200', 'grow 200', 'end']);
    expect(waiting()).toBe(0);
  });

  it('stops by itself where nothing more fits', () => {
    const { store, log, pass, waiting } = rig(150);
    store.getState().dispatch({ kind: 'hold', from: 'acid', into: 'water' });
    pass(500);
    pass(500);
    expect(log.at(-1)).toBe('end');
    expect(store.getState().hand.at).toBe('rest');
    expect(waiting()).toBe(0);
  });

  it('leaves no frame running after Escape', () => {
    const { store, log, pass, waiting } = rig();
    store.getState().dispatch({ kind: 'hold', from: 'acid', into: 'water' });
    pass(16);
    store.getState().dispatch({ kind: 'cancel' });
    expect(log.at(-1)).toBe('cancel');
    expect(waiting()).toBe(0);
  });
});
