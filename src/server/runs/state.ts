import { QueryTypes, type Transaction } from 'sequelize';
import { createState, replay, type BenchSpec, type BenchState, type Move } from '../../bench/index.ts';
import { sequelize } from '../database/index.ts';

/**
 * Replayed states of runs in use, so that saving a move replays only that move. Never the truth: a kept state is used
 * only where the database's own count of moves says that it is still the newest, or as the start of what came since.
 */
const kept = new Map<number, { key: string; state: BenchState }>();
const MOST = 500;

export interface RunRow {
  readonly id: number;
  readonly seed: number;
  readonly moveCount: number;
}

export async function movesAfter(
  runId: number,
  after: number,
  transaction?: Transaction,
): Promise<{ number: number; opId: string; move: Move }[]> {
  const rows = await sequelize.query<{ number: number; opId: string; move: string | Move }>(
    'SELECT number, op_id AS opId, move FROM run_moves WHERE run_id = ? AND number > ? ORDER BY number',
    { replacements: [runId, after], type: QueryTypes.SELECT, transaction },
  );
  return rows.map((row) => ({
    ...row,
    move: typeof row.move === 'string' ? (JSON.parse(row.move) as Move) : row.move,
  }));
}

/** The state of a run after its stored moves. `key` names the revision and engine that it is replayed with. */
export async function stateOf(
  run: RunRow,
  spec: BenchSpec,
  key: string,
  transaction?: Transaction,
): Promise<BenchState> {
  const known = kept.get(run.id);
  let from =
    known?.key === key && known.state.count <= run.moveCount
      ? known.state
      : createState(spec, { seed: run.seed });
  if (from.count < run.moveCount) {
    const missing = await movesAfter(run.id, from.count, transaction);
    const done = replay(
      from,
      run.seed,
      missing.map((row) => row.move),
    );
    // A later engine may refuse what an earlier one took; the run is shown up to there, its verdicts stay.
    from = done.state;
  }
  keep(run.id, key, from);
  return from;
}

export function keep(runId: number, key: string, state: BenchState): void {
  kept.delete(runId);
  if (kept.size >= MOST) kept.delete(kept.keys().next().value!);
  kept.set(runId, { key, state });
}

export const drop = (runId: number): void => void kept.delete(runId);
