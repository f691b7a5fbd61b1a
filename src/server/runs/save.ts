import { QueryTypes, type Transaction } from 'sequelize';
import {
  apply,
  judge,
  MAX_MOVES,
  read,
  type BenchSpec,
  type BenchState,
  type Move,
} from '../../bench/index.ts';
import { ENGINE_VERSION } from '../../chemistry/index.ts';
import { sequelize, withTransaction } from '../database/index.ts';
import { readLessonById, type StoredLesson } from '../lessons/index.ts';
import { ProblemError } from '../problem.ts';
import { benchOf, ownRun, RUN_COLUMNS, stateKey, type StoredRun } from './open.ts';
import { drop, keep, movesAfter, stateOf } from './state.ts';

export interface SentMove {
  readonly opId: string;
  readonly move: Move;
}

export interface Saved {
  /** Moves stored now. */
  readonly count: number;
  /** Every aim of this bench that the person has met. */
  readonly metAims: readonly string[];
  readonly refused?: { readonly opId: string; readonly code: string; readonly sentence: string };
}

/**
 * Stores moves in order, replays them with the bench's own code, and answers which aims are met.
 *
 * `after` is how many stored moves the sender knows of. Moves that are stored already (same id) count once, so a request
 * may be repeated. Where somebody else's moves came in between, nothing is stored and the answer is a 409 with them.
 * @throws ProblemError 404, 409 (`other-moves`, `predict-first`), 422 (`run-full`)
 */
export async function saveMoves(
  personId: number,
  publicId: string,
  after: number,
  sent: readonly SentMove[],
): Promise<Saved> {
  const before = await ownRun(personId, publicId);
  const lesson = await readLessonById(before.lessonId, before.revision);
  const spec = benchOf(lesson!, before.bench);
  try {
    return await withTransaction((transaction) =>
      store(personId, publicId, after, sent, lesson!, spec, transaction),
    );
  } catch (error) {
    // What was kept in memory may be ahead of what was stored.
    drop(before.id);
    throw error;
  }
}

async function store(
  personId: number,
  publicId: string,
  after: number,
  sent: readonly SentMove[],
  lesson: StoredLesson,
  spec: BenchSpec,
  transaction: Transaction,
): Promise<Saved> {
  const [run] = await sequelize.query<StoredRun>(
    `SELECT ${RUN_COLUMNS} FROM runs WHERE public_id = ? AND person_id = ? FOR UPDATE`,
    {
      replacements: [publicId, personId],
      type: QueryTypes.SELECT,
      transaction,
    },
  );
  const since = run!.moveCount > after ? await movesAfter(run!.id, after, transaction) : [];
  const fresh = unknownOf(sent, since);
  if (fresh === null || run!.moveCount < after)
    throw new ProblemError({
      status: 409,
      code: 'other-moves',
      title: 'This bench was worked on somewhere else, too.',
      extensions: { count: run!.moveCount, since: since.map(({ opId, move }) => ({ opId, move })) },
    });
  const met = new Map<string, number>();
  const rows = await sequelize.query<{ aim: string }>(
    'SELECT aim FROM met_aims WHERE person_id = ? AND lesson_id = ?',
    {
      replacements: [personId, lesson.id],
      type: QueryTypes.SELECT,
      transaction,
    },
  );
  const known = new Set(spec.aims.map((aim) => aim.id));
  const already = rows.map((row) => row.aim).filter((aim) => known.has(aim));
  if (fresh.length === 0) return { count: run!.moveCount, metAims: already };
  await predictedOrThrow(personId, lesson, spec, transaction);

  const key = stateKey(run!);
  let state = await stateOf(run!, spec, key, transaction);
  let refused: Saved['refused'];
  const accepted: { number: number; sent: SentMove; shown: string }[] = [];
  for (const one of fresh) {
    const outcome = apply(state, one.move);
    if (!outcome.ok) {
      refused = { opId: one.opId, code: outcome.refusal.code, sentence: outcome.refusal.sentence };
      break;
    }
    state = outcome.state;
    for (const aim of judge(spec, state, [...already, ...met.keys()])) met.set(aim, state.count);
    accepted.push({ number: state.count, sent: one, shown: JSON.stringify(shownOf(state)) });
  }
  if (accepted.length > 0) await write(run!, accepted, state, transaction);
  for (const [aim, number] of met)
    await sequelize.query(
      'INSERT IGNORE INTO met_aims (person_id, lesson_id, aim, run_id, move_number, met_at) VALUES (?, ?, ?, ?, ?, NOW(3))',
      { replacements: [personId, lesson.id, aim, run!.id, number], type: QueryTypes.INSERT, transaction },
    );
  keep(run!.id, key, state);
  if (refused?.code === 'run-full' && accepted.length === 0)
    throw new ProblemError({
      status: 422,
      code: 'run-full',
      title: `A run holds ${MAX_MOVES} moves. This one is full: begin a new run to go on.`,
    });
  return { count: state.count, metAims: [...already, ...met.keys()], ...(refused ? { refused } : {}) };
}

/**
 * The moves that are not stored yet, or null where the stored ones are not the sender's own. A request that comes late, after
 * a later one of the same sender, brings nothing new.
 */
function unknownOf(
  sent: readonly SentMove[],
  since: readonly { opId: string }[],
): readonly SentMove[] | null {
  const both = Math.min(sent.length, since.length);
  for (let i = 0; i < both; i++) if (sent[i]!.opId !== since[i]!.opId) return null;
  return sent.slice(both);
}

/** A bench with a prediction takes no move before it is locked in. */
async function predictedOrThrow(
  personId: number,
  lesson: StoredLesson,
  spec: BenchSpec,
  transaction: Transaction,
): Promise<void> {
  const asked = lesson.lesson.blocks.find(
    (block) => block.kind === 'prediction' && block.spec.bench === spec.id,
  );
  if (asked?.kind !== 'prediction') return;
  const [row] = await sequelize.query(
    'SELECT 1 FROM predictions WHERE person_id = ? AND lesson_id = ? AND prediction = ?',
    {
      replacements: [personId, lesson.id, asked.spec.id],
      type: QueryTypes.SELECT,
      transaction,
    },
  );
  if (!row)
    throw new ProblemError({ status: 409, code: 'predict-first', title: 'Lock in your prediction first.' });
}

/** The readings that the person saw after a move, as they were shown. */
function shownOf(state: BenchState) {
  return read(state, { predicted: true }).vessels.map(({ id, volume_mL, pH, colour }) => ({
    id,
    volume_mL,
    pH,
    words: colour?.words,
  }));
}

async function write(
  run: StoredRun,
  accepted: readonly { number: number; sent: SentMove; shown: string }[],
  state: BenchState,
  transaction: Transaction,
): Promise<void> {
  const now = new Date();
  const values = accepted.map(({ number, sent, shown }) => [
    run.id,
    number,
    sent.opId,
    JSON.stringify(sent.move),
    shown,
    ENGINE_VERSION,
    now,
  ]);
  await sequelize.query(
    'INSERT INTO run_moves (run_id, number, op_id, move, shown, engine_version, at) VALUES ?',
    {
      replacements: [values],
      type: QueryTypes.INSERT,
      transaction,
    },
  );
  const last = lastSolution(state);
  await sequelize.query(
    'UPDATE runs SET move_count = ?, updated_at = ?, last_words = ?, last_hex = ?, last_pH = ? WHERE id = ?',
    {
      replacements: [state.count, now, last?.words ?? null, last?.hex ?? null, last?.pH ?? null, run.id],
      type: QueryTypes.UPDATE,
      transaction,
    },
  );
}

/** The solution that the last move went into: what the rack's tube holds. */
function lastSolution(state: BenchState): { words: string; hex: string; pH?: number } | null {
  const { vessels } = read(state, { predicted: true });
  const move = state.move as { into?: string | readonly string[]; vessel?: string } | null;
  const into = Array.isArray(move?.into) ? move.into.at(-1) : move?.into;
  const vessel =
    vessels.find(({ id }) => id === (into ?? move?.vessel)) ?? vessels.find(({ empty }) => !empty);
  return vessel?.colour ? { ...vessel.colour, ...(vessel.pH === undefined ? {} : { pH: vessel.pH }) } : null;
}
