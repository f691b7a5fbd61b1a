import { useEffect, useRef, useState } from 'react';
import { useStore } from 'zustand';
import { DWELL_MS, TAP_MS } from './flow';
import type { Hand } from './machine';
import { createHandStore, type HandStore, type Pourable } from './store';

/** How far a pointer may tremble while it is held still over a vessel, px. */
const STILL_PX = 4;

export interface Hands {
  readonly hand: Hand;
  readonly dispatch: ReturnType<HandStore['getState']>['dispatch'];
  /** Read at once, outside rendering. */
  readonly current: () => Hand;
  /** A press on a tipped bottle: pours once it has been held longer than a tap. */
  readonly press: () => void;
  readonly release: () => void;
  readonly lost: () => void;
}

/**
 * The hand of one bench. Escape gives up; losing the window or the page interrupts (what flowed stays).
 * @param run what pours
 * @param onTap a press too short for a pour: one drop from the bottle into the vessel
 */
export function useHand(run: Pourable, onTap: (from: string, into: string) => void): Hands {
  const [store] = useState(() => createHandStore(run));
  const hand = useStore(store, (state) => state.hand);
  const { dispatch } = store.getState();
  const timer = useRef<number | null>(null);
  const tap = useRef(onTap);
  useEffect(() => {
    tap.current = onTap;
  }, [onTap]);

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.key === 'Escape' && store.getState().hand.at !== 'rest') dispatch({ kind: 'cancel' });
    };
    const onLeave = () => {
      if (document.visibilityState === 'hidden') dispatch({ kind: 'interrupt' });
    };
    const onBlur = () => {
      if (store.getState().hand.at === 'pouring') dispatch({ kind: 'interrupt' });
    };
    document.addEventListener('keydown', onKey);
    document.addEventListener('visibilitychange', onLeave);
    window.addEventListener('blur', onBlur);
    return () => {
      document.removeEventListener('keydown', onKey);
      document.removeEventListener('visibilitychange', onLeave);
      window.removeEventListener('blur', onBlur);
      if (timer.current !== null) window.clearTimeout(timer.current);
      dispatch({ kind: 'interrupt' });
    };
  }, [store, dispatch]);

  useDwell(hand, () => dispatch({ kind: 'hold' }));

  const disarm = (): boolean => {
    if (timer.current === null) return false;
    window.clearTimeout(timer.current);
    timer.current = null;
    return true;
  };
  const press = () => {
    disarm();
    timer.current = window.setTimeout(() => {
      timer.current = null;
      dispatch({ kind: 'hold' });
    }, TAP_MS);
  };
  const release = () => {
    const now = store.getState().hand;
    if (disarm()) {
      if (now.at === 'poised') tap.current(now.from, now.into);
      if (now.at === 'carried' && now.over !== null) tap.current(now.from, now.over);
    } else {
      dispatch({ kind: 'letGo' });
    }
  };
  const lost = () => {
    if (!disarm()) dispatch({ kind: 'interrupt' });
  };

  useSpace(hand, press, release, lost);

  return { hand, dispatch, current: () => store.getState().hand, press, release, lost };
}

/** A bottle that a pointer holds still over a vessel begins to pour, once for each visit. */
function useDwell(hand: Hand, begin: () => void) {
  const over = hand.at === 'carried' && hand.by === 'pointer' ? hand.over : null;
  const beginRef = useRef(begin);
  useEffect(() => {
    beginRef.current = begin;
  });
  useEffect(() => {
    if (over === null) return;
    let from: { x: number; y: number } | null = null;
    let timer = window.setTimeout(() => beginRef.current(), DWELL_MS);
    const onMove = (event: PointerEvent) => {
      if (from !== null && Math.hypot(event.clientX - from.x, event.clientY - from.y) < STILL_PX) return;
      from = { x: event.clientX, y: event.clientY };
      window.clearTimeout(timer);
      timer = window.setTimeout(() => beginRef.current(), DWELL_MS);
    };
    document.addEventListener('pointermove', onMove, { passive: true });
    return () => {
      window.clearTimeout(timer);
      document.removeEventListener('pointermove', onMove);
    };
  }, [over]);
}

/** While keys carry a bottle over a vessel, Space pours as long as it is held; a short press is one drop. */
function useSpace(hand: Hand, press: () => void, release: () => void, lost: () => void) {
  const carriedByKeys =
    (hand.at === 'carried' && hand.by === 'keys' && hand.over !== null) ||
    (hand.at === 'pouring' && hand.grip === 'carried' && hand.by === 'keys');
  const calls = useRef({ press, release, lost });
  useEffect(() => {
    calls.current = { press, release, lost };
  });
  useEffect(() => {
    if (!carriedByKeys) return;
    let held = false;
    const onDown = (event: KeyboardEvent) => {
      if (event.code !== 'Space') return;
      event.preventDefault();
      event.stopPropagation();
      if (event.repeat || held) return;
      held = true;
      calls.current.press();
    };
    const onUp = (event: KeyboardEvent) => {
      if (event.code !== 'Space') return;
      event.preventDefault();
      if (!held) return;
      held = false;
      calls.current.release();
    };
    document.addEventListener('keydown', onDown, true);
    document.addEventListener('keyup', onUp, true);
    return () => {
      document.removeEventListener('keydown', onDown, true);
      document.removeEventListener('keyup', onUp, true);
      if (held) calls.current.lost();
    };
  }, [carriedByKeys]);
}
