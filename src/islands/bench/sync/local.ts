import { createStore, del, entries, get, set } from 'idb-keyval';
import type { Move } from '../../../bench/types';

/** A move with the id that makes its saving count once. */
export interface Op {
  readonly opId: string;
  readonly move: Move;
}

export interface LockedPrediction {
  readonly id: string;
  readonly answer: string;
  readonly confidence: number;
  readonly sent: boolean;
}

/** What this browser keeps of the work on one bench, until the server has it and for people without an account. */
export interface WorkRecord {
  /** Public id of whose work it is; null where nobody was signed in. */
  readonly person: string | null;
  readonly runId: string;
  readonly seed: number;
  readonly ops: readonly Op[];
  /** How many of `ops` the server has. */
  readonly confirmed: number;
  readonly prediction?: LockedPrediction;
  readonly observed?: string;
  readonly at: number;
}

const shelf = () => createStore('dropwise', 'work');
let opened: ReturnType<typeof createStore> | undefined;
const store = () => (opened ??= shelf());

const keyOf = (lesson: string, bench: string) => `${lesson}/${bench}`;

/** Private windows and full disks may refuse storage: work then lasts as long as the page, and the bench says so. */
async function quietly<T>(work: () => Promise<T>, otherwise: T): Promise<T> {
  try {
    return await work();
  } catch {
    return otherwise;
  }
}

export const loadWork = (lesson: string, bench: string): Promise<WorkRecord | undefined> =>
  quietly(() => get<WorkRecord>(keyOf(lesson, bench), store()), undefined);

export const keepWork = (lesson: string, bench: string, record: WorkRecord): Promise<boolean> =>
  quietly(async () => {
    await set(keyOf(lesson, bench), record, store());
    return true;
  }, false);

export const clearWork = (lesson: string, bench: string): Promise<void> =>
  quietly(() => del(keyOf(lesson, bench), store()), undefined);

/** How many moves of a person this browser holds that the server does not have. */
export const countUnsent = (person: string): Promise<number> =>
  quietly(async () => {
    const all = await entries<string, WorkRecord>(store());
    return all.reduce(
      (sum, [, record]) => sum + (record.person === person ? record.ops.length - record.confirmed : 0),
      0,
    );
  }, 0);

/** Forgets everything of everyone: for shared computers, when somebody signs out. */
export const clearAllWork = (): Promise<void> =>
  quietly(async () => {
    for (const [key] of await entries<string, WorkRecord>(store())) await del(key, store());
  }, undefined);
