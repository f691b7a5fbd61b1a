import type { BenchState, Move, Readings, Refusal } from '../../bench/types';

/** Whether a run's moves are safe, and where. */
export type Saving = 'local' | 'saving' | 'saved' | 'offline' | 'conflict' | 'full';
