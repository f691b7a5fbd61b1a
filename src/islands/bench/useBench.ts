import { useCallback, useEffect, useState } from 'react';
import { useStore } from 'zustand';
import type { BenchSpec, Move, ShelfItem } from '../../bench/types';
import { delivery } from './apron/deeds';
import type { Pourable } from './hand/store';
import { useHand } from './hand/useHand';
import type { RunStore, RunView } from './run';
import { createLooks, type Looks } from './scene/looksOf';
import { useWords } from '../words';
import { useLiveRegion } from './words/LiveRegion';
import { added, reading, tookBack } from './words/sentences';
import type { ToastWords } from './words/Toast';

/** The sentence may name both vessels at once: the same goes into each, in one move. */
export const BOTH = 'both vessels';

const DROPPER_STAYS_MS = 1600;
const SETTLE_MS = 600;

/** The newest move that still stands, or null at the start. */
export function standingMove(run: RunView): Move | null {
  let state: RunView['state'] | null = run.state;
  while (state?.move?.kind === 'undo') state = state.before?.back ?? null;
  return state?.move ?? null;
}

/** Clears a passing sign some time after it was set. */
function usePassing<T>(ms: number): [T | null, (value: T | null | ((before: T | null) => T)) => void] {
  const [value, setValue] = useState<T | null>(null);
  useEffect(() => {
    if (value === null) return;
    const timer = window.setTimeout(() => setValue(null), ms);
    return () => window.clearTimeout(timer);
  }, [value, ms]);
  return [value, setValue];
}

/** A bench at work: what is chosen, what the hand does, what was said. Everything that is drawn follows from it. */
export function useBench(
  spec: BenchSpec,
  store: RunStore,
  hazardsOf: (item: ShelfItem) => readonly string[],
) {
  const run = useStore(store);
  const words = useWords();
  const [looksOf] = useState(() => createLooks(spec, hazardsOf, words));
  const looks: Looks = looksOf(run.readings);
  const [from, setFrom] = useState(spec.shelf[0]?.id ?? '');
  const [into, setInto] = useState(spec.vessels[0]?.id ?? '');
  const [volume_uL, setVolume] = useState(1000);
  const [toast, setToast] = useState<ToastWords | null>(null);
  const [settling, settle] = usePassing<string>(SETTLE_MS);
  const [dripping, setDripping] = usePassing<{ from: string; into: string; drops: number }>(DROPPER_STAYS_MS);
  const [speak, liveRegion] = useLiveRegion();
  const say = useCallback((message: string) => speak(words(message)), [speak, words]);

  const lookAt = (id: string) =>
    looksOf(store.getState().readings).vessels.find((vessel) => vessel.id === id);

  /** Does a move; true when the bench took it. A refusal is a sentence under the apron and in the live region. */
  const act = (move: Move): boolean => {
    store.getState().act(move);
    const { refusal } = store.getState();
    if (refusal) say(refusal.sentence);
    return refusal === undefined;
  };

  const [pourable] = useState<Pourable>(() => ({
    startPour: (source, target) => store.getState().startPour(source, target),
    growPour: (wanted_uL) => {
      store.getState().growPour(wanted_uL);
      const { pouring, refusal } = store.getState();
      return refusal === undefined && pouring !== undefined && pouring.volume_uL >= wanted_uL;
    },
    endPour: () => {
      const { pouring, endPour } = store.getState();
      endPour();
      const { refusal } = store.getState();
      if (refusal) say(refusal.sentence);
      else if (pouring && pouring.volume_uL > 0) {
        const vessel = lookAt(pouring.into);
        settle(pouring.into);
        if (vessel)
          say(`${added(pouring.volume_uL, vessel)}${vessel.full ? ` ${vessel.name} is full.` : ''}`);
      }
    },
    cancelPour: () => {
      store.getState().cancelPour();
      say('Nothing poured');
    },
  }));

  const both = (): readonly [string, string] => [spec.vessels[0]!.id, spec.vessels[1]!.id];

  const drip = (source: string, target: string) => {
    const done =
      target === BOTH
        ? act({ kind: 'addToBoth', from: source, into: both(), drops: 1 })
        : act({ kind: 'drip', from: source, into: target, drops: 1 });
    if (!done) return;
    setDripping((before) => ({
      from: source,
      into: target,
      drops: (before?.into === target ? before.drops : 0) + 1,
    }));
    const vessel = lookAt(target);
    say(vessel ? `One drop added. ${reading(vessel)}` : 'One drop added to each');
    settle(target);
  };

  const add = (amount_uL: number) => {
    const done =
      into === BOTH
        ? act({ kind: 'addToBoth', from, into: both(), volume_uL: amount_uL })
        : act(delivery(spec, from, into, amount_uL));
    if (!done) return;
    const vessel = lookAt(into);
    say(vessel ? added(amount_uL, vessel) : 'Added to each');
    settle(into);
  };

  const undo = () => {
    const last = standingMove(store.getState());
    store.getState().undo();
    const { refusal } = store.getState();
    if (refusal) say(refusal.sentence);
    if (refusal || !last) return;
    const taken = tookBack(last, looks.vessels);
    say(taken);
    const putBack = () => {
      setToast(null);
      act(last);
    };
    setToast((seen) => ({
      n: (seen?.n ?? 0) + 1,
      text: words(taken),
      action: { label: 'Put it back', onDo: putBack },
    }));
  };

  const hands = useHand(pourable, drip);

  const startAgain = () => {
    hands.dispatch({ kind: 'cancel' });
    store.getState().startAgain();
    say('The bench stands as it did at the start');
  };

  return {
    run,
    looks,
    hands,
    from,
    setFrom,
    into,
    setInto,
    volume_uL,
    setVolume,
    toast,
    setToast,
    settling,
    dripping,
    say,
    liveRegion,
    act,
    drip,
    add,
    undo,
    startAgain,
  };
}
