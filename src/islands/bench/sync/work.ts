import { createStore, type StoreApi } from 'zustand/vanilla';
import type { Move } from '../../../bench/types';
import type { Saving } from '../run';
import { tellDone } from './done';
import { clearWork, keepWork, loadWork, type LockedPrediction, type Op, type WorkRecord } from './local';
import * as server from './server';
import { Refused, Unreachable, type Outcome } from './server';

/** How long quick moves wait for one another, so that drops in a row are stored as one move. */
const GATHER_MS = 500;
const FIRST_RETRY_MS = 1000;
const LONGEST_RETRY_MS = 30_000;
const MOST_AT_ONCE = 200;

/** What a page was given by the server about this bench. */
export interface GivenWork {
  readonly lesson: string;
  readonly bench: string;
  /** Public id of the person who is signed in. */
  readonly person: string | null;
  readonly prediction: string | null;
  readonly run?: { readonly runId: string; readonly seed: number; readonly moves: readonly Move[] };
  readonly locked?: {
    readonly answer: string;
    readonly confidence: number;
    readonly observed: string | null;
    readonly outcome?: Outcome;
  };
  readonly metAims?: readonly string[];
}

export interface WorkView {
  /** The browser's own storage was read. Until then nothing can be lost, and nothing is offered. */
  readonly ready: boolean;
  readonly saving: Saving;
  readonly prediction: { readonly answer: string; readonly confidence: number } | null;
  readonly observed: string | null;
  readonly outcome: Outcome | null;
  readonly metAims: readonly string[];
  readonly moved: boolean;
  /** Work from before signing in waits for 'is this your work?'. */
  readonly strangers: boolean;
  /** A sentence that has to be read: what the server refused, or what went wrong. */
  readonly word: string | null;
}

/** What the bench's store does when its list changes from outside. */
export interface Listener {
  load(seed: number, moves: readonly Move[]): void;
}

export interface Work {
  readonly store: StoreApi<WorkView>;
  readonly given: GivenWork;
  seed(): number;
  moves(): readonly Move[];
  /** True where the newest move may still grow: it was not sent. */
  newestIsHere(): boolean;
  listen(listener: Listener): () => void;
  add(move: Move): void;
  growNewest(move: Move): void;
  lock(answer: string, confidence: number): void;
  observe(answer: string): void;
  claim(mine: boolean): Promise<void>;
  resolve(choice: 'mine' | 'theirs'): Promise<void>;
  beginAnew(): void;
}

const works = new Map<string, Work>();

/** The work on one bench of this page; prediction and bench islands share it. Lives in browsers alone. */
export function workFor(given: GivenWork): Work {
  // On the server every rendering has its own: nothing of one person may be shown to another.
  if (typeof window === 'undefined') return createWork(given);
  const key = `${given.lesson}/${given.bench}`;
  let work = works.get(key);
  if (!work) works.set(key, (work = createWork(given)));
  return work;
}

const newSeed = () => 1 + Math.floor(Math.random() * (2 ** 31 - 1));

export function createWork(given: GivenWork): Work {
  const { lesson, bench, person } = given;
  const stored = given.run?.moves.length ?? 0;
  let record: WorkRecord = {
    person,
    runId: given.run?.runId ?? crypto.randomUUID(),
    seed: given.run?.seed ?? newSeed(),
    ops: (given.run?.moves ?? []).map((move) => ({ opId: crypto.randomUUID(), move })),
    confirmed: stored,
    ...(given.prediction && given.locked
      ? {
          prediction: {
            id: given.prediction,
            answer: given.locked.answer,
            confidence: given.locked.confidence,
            sent: true,
          },
        }
      : {}),
    ...(given.locked?.observed ? { observed: given.locked.observed } : {}),
    at: Date.now(),
  };
  let open = given.run !== undefined;
  let waiting: WorkRecord | null = null;
  let foreign: readonly Op[] | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let sending = false;
  let sendingTo = 0;
  let retry_ms = FIRST_RETRY_MS;
  const listeners = new Set<Listener>();
  const channel =
    typeof window === 'undefined' || typeof BroadcastChannel === 'undefined'
      ? null
      : new BroadcastChannel('dropwise-runs');

  const store = createStore<WorkView>(() => ({
    ready: false,
    saving: person === null ? 'local' : 'saved',
    prediction: given.locked ? { answer: given.locked.answer, confidence: given.locked.confidence } : null,
    observed: given.locked?.observed ?? null,
    outcome: given.locked?.outcome ?? null,
    metAims: given.metAims ?? [],
    moved: stored > 0,
    strangers: false,
    word: null,
  }));
  const show = (part: Partial<WorkView>) => store.setState(part);
  const unsent = () => record.ops.length - record.confirmed > 0 || record.prediction?.sent === false;

  /** The last writing to the browser's own storage. */
  let kept: Promise<unknown> = Promise.resolve();
  const write = (next: Partial<WorkRecord>) => {
    record = { ...record, ...next, at: Date.now() };
    kept = keepWork(lesson, bench, record);
  };
  const reload = () => {
    for (const listener of listeners)
      listener.load(
        record.seed,
        record.ops.map((op) => op.move),
      );
    show({ moved: record.ops.length > 0 });
  };
  const plan = (ms: number) => {
    if (person === null) return;
    // 'Saved' is said of nothing that still waits.
    if (unsent() && store.getState().saving === 'saved') show({ saving: 'saving' });
    clearTimeout(timer);
    timer = setTimeout(() => void flush(), ms);
  };

  async function start(): Promise<void> {
    const found = await loadWork(lesson, bench);
    if (found && found.person === null && person !== null) {
      // Somebody worked here before signing in. Perhaps somebody else: asked, not assumed.
      if (found.ops.length > 0 || found.prediction) waiting = found;
    } else if (found && found.person === person) {
      if (person === null) record = found;
      else if (found.runId === record.runId && found.confirmed === stored) {
        record = { ...record, ops: [...record.ops, ...found.ops.slice(found.confirmed)] };
      } else if (found.ops.length > found.confirmed && found.runId === record.runId) {
        // Moves made here without a connection, and others elsewhere meanwhile.
        record = { ...record, ops: found.ops, confirmed: found.confirmed };
      } else if (found.ops.length > found.confirmed && !given.run) {
        record = { ...found };
        open = false;
      }
      if (!record.prediction && found.prediction) record = { ...record, prediction: found.prediction };
      if (!record.observed && found.observed) record = { ...record, observed: found.observed };
    }
    const { prediction } = record;
    show({
      ready: true,
      strangers: waiting !== null,
      prediction: prediction ? { answer: prediction.answer, confidence: prediction.confidence } : null,
      observed: record.observed ?? null,
    });
    reload();
    if (prediction) tellDone([prediction.id]);
    if (record.observed && person === null) void tellOutcome(record.observed);
    if (person !== null && unsent()) plan(0);
  }

  async function flush(keepalive = false): Promise<void> {
    if (person === null || sending || !unsent()) return;
    if (store.getState().saving === 'conflict' || store.getState().saving === 'full') return;
    sending = true;
    show({ saving: 'saving' });
    try {
      if (record.prediction && !record.prediction.sent) {
        const { id, answer, confidence } = record.prediction;
        const kept = await server.sendPrediction({ lesson, prediction: id, answer, confidence });
        write({ prediction: { id, answer: kept.answer, confidence: kept.confidence, sent: true } });
        show({ prediction: { answer: kept.answer, confidence: kept.confidence } });
      }
      while (record.ops.length > record.confirmed) {
        if (!open) {
          const answer = await server.openRun({ runId: record.runId, lesson, bench, seed: record.seed });
          open = true;
          if (answer.count > record.confirmed && record.confirmed > 0) write({ confirmed: record.confirmed });
        }
        const part = record.ops.slice(record.confirmed, record.confirmed + MOST_AT_ONCE);
        sendingTo = record.confirmed + part.length;
        const answer = await server.sendMoves(record.runId, record.confirmed, part, keepalive);
        show({ metAims: [...new Set([...store.getState().metAims, ...answer.metAims])] });
        if (answer.refused) {
          // The server's word counts: what it did not take is taken back here, with its reason.
          write({ ops: record.ops.slice(0, answer.count), confirmed: answer.count });
          show({ word: answer.refused.sentence });
          reload();
        } else write({ confirmed: Math.max(record.confirmed, Math.min(answer.count, record.ops.length)) });
        channel?.postMessage({ runId: record.runId, count: record.confirmed });
      }
      retry_ms = FIRST_RETRY_MS;
      await kept;
      show({ saving: unsent() ? 'saving' : 'saved' });
    } catch (error) {
      if (error instanceof Unreachable) {
        show({ saving: 'offline' });
        plan(retry_ms);
        retry_ms = Math.min(LONGEST_RETRY_MS, retry_ms * 2);
      } else if (error instanceof Refused) onRefusal(error);
      else throw error;
    } finally {
      sending = false;
      sendingTo = 0;
    }
    if (unsent() && ['saved', 'saving'].includes(store.getState().saving)) plan(0);
  }

  function onRefusal({ problem }: Refused): void {
    if (problem.code === 'other-moves') {
      foreign = problem.since ?? [];
      show({ saving: 'conflict' });
    } else if (problem.code === 'run-full') show({ saving: 'full', word: problem.title });
    else if (problem.status === 401)
      show({
        saving: 'offline',
        word: 'You are signed out. Sign in again: your moves are kept in this browser.',
      });
    else show({ saving: 'offline', word: problem.title });
  }

  async function tellOutcome(observed: string): Promise<void> {
    if (!given.prediction) return;
    try {
      const { outcome } = await server.askOutcome({ lesson, prediction: given.prediction, observed });
      show({ outcome: outcome ?? null });
    } catch (error) {
      if (error instanceof Unreachable)
        show({ word: 'Not connected: the computed result comes when you are.' });
      else if (error instanceof Refused) show({ word: error.problem.title });
      else throw error;
    }
  }

  /** Keeps this tab's list as a run of its own, and makes it the one that goes on. */
  async function branch(): Promise<void> {
    const runId = crypto.randomUUID();
    await server.openRun({ runId, lesson, bench, seed: record.seed, branchedFrom: record.runId });
    const ops = record.ops.map((op) => ({ ...op, opId: crypto.randomUUID() }));
    const answer = await server.sendMoves(runId, 0, ops);
    write({ runId, ops: ops.slice(0, answer.count), confirmed: answer.count });
    show({ metAims: [...new Set([...store.getState().metAims, ...answer.metAims])] });
  }

  const work: Work = {
    store,
    given,
    seed: () => record.seed,
    moves: () => record.ops.map((op) => op.move),
    newestIsHere: () => record.ops.length > Math.max(record.confirmed, sendingTo),
    listen(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    add(move) {
      write({ ops: [...record.ops, { opId: crypto.randomUUID(), move }] });
      show({ moved: true, word: null });
      plan(GATHER_MS);
    },
    growNewest(move) {
      const newest = record.ops.at(-1)!;
      write({ ops: [...record.ops.slice(0, -1), { ...newest, move }] });
      plan(GATHER_MS);
    },
    lock(answer, confidence) {
      if (!given.prediction || record.prediction) return;
      const prediction: LockedPrediction = { id: given.prediction, answer, confidence, sent: false };
      write({ prediction });
      show({ prediction: { answer, confidence } });
      tellDone([given.prediction]);
      plan(0);
    },
    observe(answer) {
      if (!given.prediction) return;
      write({ observed: answer });
      show({ observed: answer });
      if (person === null) return void tellOutcome(answer);
      void (async () => {
        try {
          await flush();
          const told = await server.sendObservation({
            lesson,
            prediction: given.prediction!,
            observed: answer,
          });
          show({ observed: told.observed, outcome: told.outcome ?? null });
        } catch (error) {
          show({
            observed: null,
            word: error instanceof Refused ? error.problem.title : 'Not connected. Try again in a moment.',
          });
          const { observed: _observed, ...rest } = record;
          record = rest;
          void keepWork(lesson, bench, record);
        }
      })();
    },
    async claim(mine) {
      const theirs = waiting;
      waiting = null;
      show({ strangers: false });
      if (!theirs) return;
      if (!mine) {
        await clearWork(lesson, bench);
        void keepWork(lesson, bench, record);
        return;
      }
      try {
        const { prediction } = theirs;
        const answer = await server.takeOver({
          lesson,
          bench,
          runId: theirs.runId,
          seed: theirs.seed,
          moves: theirs.ops,
          ...(prediction
            ? {
                prediction: {
                  id: prediction.id,
                  answer: prediction.answer,
                  confidence: prediction.confidence,
                },
              }
            : {}),
        });
        open = true;
        record = {
          ...theirs,
          person,
          ops: theirs.ops.slice(0, answer.count),
          confirmed: answer.count,
          ...(prediction ? { prediction: { ...prediction, sent: true } } : {}),
        };
        void keepWork(lesson, bench, record);
        show({
          metAims: [...new Set([...store.getState().metAims, ...answer.metAims])],
          prediction: prediction ? { answer: prediction.answer, confidence: prediction.confidence } : null,
          saving: 'saved',
        });
        reload();
      } catch (error) {
        waiting = theirs;
        show({
          strangers: true,
          word: error instanceof Refused ? error.problem.title : 'Not connected. Try again in a moment.',
        });
      }
    },
    async resolve(choice) {
      try {
        const old = record.runId;
        const others = foreign ?? [];
        const before = record.ops.slice(0, record.confirmed);
        await branch();
        if (choice === 'theirs') {
          write({ runId: old, ops: [...before, ...others], confirmed: before.length + others.length });
          reload();
        }
        foreign = null;
        show({ saving: 'saved' });
      } catch (error) {
        show({
          word: error instanceof Refused ? error.problem.title : 'Not connected. Try again in a moment.',
        });
      }
    },
    beginAnew() {
      open = false;
      write({ runId: crypto.randomUUID(), seed: newSeed(), ops: [], confirmed: 0 });
      show({ saving: person === null ? 'local' : 'saved', word: null });
      reload();
    },
  };

  if (typeof window !== 'undefined') {
    window.addEventListener('online', () => plan(0));
    window.addEventListener('pagehide', () => void flush(true));
    document.addEventListener('visibilitychange', () => {
      if (document.visibilityState === 'hidden') void flush(true);
    });
    if (channel)
      channel.onmessage = (event: MessageEvent<{ runId: string; count: number }>) => {
        const { runId, count } = event.data;
        if (runId !== record.runId || unsent() || count <= record.confirmed) return;
        void server
          .askProgress(lesson)
          .then(({ runs, metAims }) => {
            const run = runs.find((one) => one.runId === runId);
            if (!run || unsent()) return;
            write({
              ops: run.moves.map((move) => ({ opId: crypto.randomUUID(), move })),
              confirmed: run.moves.length,
            });
            show({ metAims });
            reload();
          })
          .catch(() => undefined);
      };
    void start();
  }
  return work;
}
