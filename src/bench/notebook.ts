/** The notebook: one row for each move with what was read after it, and the same as CSV. */
import { definitionOf, lastStanding, situationOf, statesOf } from './apply.ts';
import { isHidden } from './hiding.ts';
import { nameOf } from './moves/hands.ts';
import { openNotices, readOne } from './read.ts';
import { mLShown } from './precision.ts';
import type { BenchState, ColourReading, Move, Seen } from './types.ts';

export interface NotebookReading {
  readonly vessel: string;
  readonly label: string;
  readonly volume_mL?: number;
  readonly pH?: number;
  readonly doubt?: string;
  readonly temperature_C?: number;
  readonly colour?: ColourReading;
  readonly mixed: boolean;
}

export interface NotebookRow {
  /** Number of the move; 0 is the set-up. */
  readonly n: number;
  readonly kind: Move['kind'] | 'setUp';
  /** What was done, in words. */
  readonly what: string;
  /** Volume added by this move to each vessel, as read, mL; absent where the move adds none or volumes are hidden. */
  readonly added_mL?: number;
  readonly drops?: number;
  /** Vessels that the move changed, as they were read after it. */
  readonly readings: readonly NotebookReading[];
  /** 1 for the first; start-again begins the next. */
  readonly trial: number;
  /** Taken back later: shown struck through. */
  readonly takenBack: boolean;
  readonly notices: readonly string[];
}

/** Vessels whose state differs between two states of a run. */
const changed = (before: BenchState | null, after: BenchState): string[] =>
  after.spec.vessels
    .map((v) => v.id)
    .filter(
      (id) =>
        before?.scene.vessels[id] !== after.scene.vessels[id] ||
        (before?.scene.probe.at !== after.scene.probe.at && after.scene.probe.at === id),
    );

/** Vessels worth a reading after this move: those it was aimed at; the source of a pour is not. */
function aimedAt(before: BenchState, after: BenchState, move: Move): string[] {
  if ('into' in move) return typeof move.into === 'string' ? [move.into] : [...move.into];
  if ('vessel' in move) return [move.vessel];
  if (move.kind === 'calibrate') return after.scene.probe.at === null ? [] : [after.scene.probe.at];
  return move.kind === 'undo' || move.kind === 'startAgain' ? changed(before, after) : [];
}

function readingOf(state: BenchState, id: string, seen: Seen): NotebookReading[] {
  const r = readOne(state, id, seen);
  if (!r) return [];
  return [
    {
      vessel: r.id,
      label: r.label,
      ...(r.volume_mL !== undefined && { volume_mL: r.volume_mL }),
      ...(r.pH !== undefined && { pH: r.pH }),
      ...(r.doubt !== undefined && { doubt: r.doubt }),
      ...(r.temperature_C !== undefined && { temperature_C: r.temperature_C }),
      ...(r.colour && { colour: r.colour }),
      mixed: r.mixed,
    },
  ];
}

const ends = (move: Move): string[] =>
  [
    'from' in move ? move.from : '',
    'burette' in move ? move.burette : '',
    'indicator' in move ? move.indicator : '',
    ...('into' in move ? [move.into].flat() : []),
  ].filter((id) => id !== '');

/** What a move did, in words; without volumes where one of its ends hides them. */
export function tellMove(before: BenchState, move: Move, seen: Seen = {}): string {
  if (move.kind === 'startAgain') return 'started again';
  if (move.kind === 'undo') {
    const undone = lastStanding(before);
    return undone?.move && undone.before
      ? `took back: ${tellMove(undone.before, undone.move, seen)}`
      : 'took back';
  }
  const at = situationOf(before);
  const definition = definitionOf(move.kind);
  if (!definition) return move.kind;
  const hidden = ends(move).some((id) => isHidden(before.spec, seen, 'volume', id));
  if (!hidden || !definition.delivers) return definition.tell(at, move);
  return `${definition.name}: ${ends(move)
    .map((id) => nameOf(at, id))
    .join(' into ')}`;
}

/** Volume that a move adds to each of its vessels, as read. */
function addedBy(before: BenchState, after: BenchState, move: Move): { nL: number; drops: number } | null {
  const into = 'into' in move ? [move.into].flat()[0] : undefined;
  if (into === undefined) return null;
  const sum = (s: BenchState) =>
    Object.values(s.scene.vessels[into]?.added ?? {}).reduce(
      (t, a) => ({ nL: t.nL + a.volume_nL, drops: t.drops + a.drops }),
      { nL: 0, drops: 0 },
    );
  const [a, b] = [sum(before), sum(after)];
  return { nL: b.nL - a.nL, drops: b.drops - a.drops };
}

function standingStates(state: BenchState): ReadonlySet<BenchState> {
  const set = new Set<BenchState>();
  for (let s = lastStanding(state); s; s = s.back && lastStanding(s.back)) set.add(s);
  return set;
}

/**
 * The rows of a run, the set-up first. Hidden quantities are absent.
 * @param seen what the reader has earned
 */
export function notebook(state: BenchState, seen: Seen = {}): NotebookRow[] {
  const stands = standingStates(state);
  let trial = 1;
  return statesOf(state).map((s) => {
    if (!s.move || !s.before) {
      return {
        n: 0,
        kind: 'setUp',
        what: 'set up',
        readings: s.spec.vessels.flatMap((v) => readingOf(s, v.id, seen)),
        trial,
        takenBack: false,
        notices: [],
      } satisfies NotebookRow;
    }
    if (s.move.kind === 'startAgain') trial += 1;
    const added = addedBy(s.before, s, s.move);
    const volumesShown = !ends(s.move).some((id) => isHidden(s.spec, seen, 'volume', id));
    return {
      n: s.count,
      kind: s.move.kind,
      what: tellMove(s.before, s.move, seen),
      ...(added && volumesShown && added.nL > 0 && { added_mL: mLShown(added.nL) }),
      ...(added && volumesShown && added.drops > 0 && { drops: added.drops }),
      readings: aimedAt(s.before, s, s.move).flatMap((id) => readingOf(s, id, seen)),
      trial,
      takenBack: s.move.kind !== 'undo' && !stands.has(s),
      notices: openNotices(s, seen).map((n) => n.sentence),
    };
  });
}

// ---------------------------------------------------------------- CSV

/** RFC 4180 quoting; a leading =, +, - or @ of a text would be run as a formula by spreadsheets, so it gets an apostrophe. */
function cell(value: string | number | undefined): string {
  if (value === undefined) return '';
  const text = typeof value === 'string' && /^[=+\-@\t\r]/.test(value) ? `'${value}` : String(value);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

const COLUMNS = [
  'move',
  'trial',
  'what',
  'added (mL)',
  'drops',
  'vessel',
  'volume (mL)',
  'pH',
  'temperature (°C)',
  'colour',
  'colour (sRGB)',
  'mixed',
  'taken back',
  'remarks',
] as const;

/** The notebook as CSV (RFC 4180, UTF-8, CRLF), a line for each reading. */
export function notebookCsv(rows: readonly NotebookRow[]): string {
  const lines = rows.flatMap((row) => {
    const readings: readonly (NotebookReading | undefined)[] =
      row.readings.length > 0 ? row.readings : [undefined];
    return readings.map((r) => [
      row.n,
      row.trial,
      row.what,
      row.added_mL?.toFixed(2),
      row.drops,
      r?.label,
      r?.volume_mL?.toFixed(2),
      r?.pH?.toFixed(2),
      r?.temperature_C?.toFixed(1),
      r?.colour?.words,
      r?.colour?.hex,
      r ? (r.mixed ? 'yes' : 'no') : undefined,
      row.takenBack ? 'yes' : 'no',
      [...row.notices, ...(r?.doubt === undefined ? [] : [r.doubt])].join(' '),
    ]);
  });
  return [COLUMNS, ...lines].map((line) => line.map(cell).join(',')).join('\r\n') + '\r\n';
}
