import { movesOf } from '../../../bench/apply';
import { amountsHidden } from '../../../bench/hiding';
import { notebook } from '../../../bench/notebook';
import { read } from '../../../bench/read';
import type { BenchSpec, BenchState, Move, Readings, Seen } from '../../../bench/types';
import { pairBar } from '../../../bench/views/amounts';
import { trace } from '../../../bench/views/trace';
import { formatPh } from '../scene/looks';
import type { AimLook } from './Aims';
import type { NoteLook } from './NotebookTable';
import type { PairLook } from './PairBar';
import { chemicalName, withChemicalNames } from './chemicalName';
import type { TraceProps } from './Trace';

/** What came out of the bottle, as a notebook's line says it: 'hydrochloric acid 0.10 mol/L'. */
function sourceOf(spec: BenchSpec, readings: Readings, move: Move): string | null {
  const id =
    'from' in move
      ? move.from
      : 'burette' in move
        ? move.burette
        : 'indicator' in move
          ? move.indicator
          : null;
  if (id === null) return null;
  const bottle = readings.bottles.find((one) => one.id === id);
  if (bottle) return [bottle.label.toLowerCase(), bottle.concentration].filter(Boolean).join(' ');
  return spec.vessels.find((vessel) => vessel.id === id)?.label.toLowerCase() ?? null;
}

const plural = (drops: number): string => (drops === 1 ? '1 drop' : `${drops} drops`);

/** Lines of the notebook table. What is undone is struck through where it stood; the undoing itself has no line. */
export function notesOf(spec: BenchSpec, state: BenchState, seen: Seen): NoteLook[] {
  const moves = movesOf(state);
  const readings = read(state, seen);
  const hidden = (id: string): boolean =>
    readings.vessels.find((vessel) => vessel.id === id)?.hidden.includes('pH') ?? false;
  return notebook(state, seen)
    .filter((row) => row.kind !== 'undo')
    .flatMap((row): NoteLook[] => {
      const move = moves[row.n - 1];
      const what =
        row.kind === 'setUp'
          ? 'at the start'
          : row.kind === 'startAgain'
            ? 'started again'
            : ((move && sourceOf(spec, readings, move)) ?? row.what);
      const base = {
        n: row.n,
        what,
        added: row.drops ? plural(row.drops) : (row.added_mL?.toFixed(2) ?? ''),
        struck: row.takenBack,
      };
      if (row.readings.length === 0)
        return [{ ...base, key: `${row.n}`, vessel: '', ph: '', hex: '', words: '' }];
      return row.readings.map((reading) => ({
        ...base,
        key: `${row.n} ${reading.vessel}`,
        vessel: reading.label,
        ph: hidden(reading.vessel) ? '?' : reading.pH === undefined ? '' : formatPh(reading.pH),
        hex: reading.colour?.hex ?? '',
        words: reading.mixed ? (reading.colour?.words ?? '') : 'not mixed',
      }));
    });
}

/** The trace with what its axes need; a sentence instead of a figure while it is hidden. */
export function traceOf(spec: BenchSpec, state: BenchState, seen: Seen): Omit<TraceProps, 'strip'> {
  const series = trace(state, seen);
  const hidden =
    series.length === 0 &&
    spec.hide?.some((rule) => rule.what.includes('pH') || rule.what.includes('trace')) === true;
  const bottles = new Set(
    series.flatMap((one) => one.points.flatMap((point) => (point.of === undefined ? [] : [point.of]))),
  );
  const only = bottles.size === 1 ? spec.shelf.find((item) => bottles.has(item.id)) : undefined;
  return {
    series: series.map((one) => ({
      id: one.vessel,
      name: one.label.toLowerCase(),
      points: one.points.map((point) => ({
        x_mL: point.added_mL,
        pH: point.pH,
        hex: point.hex ?? '#ffffff',
      })),
      curve: one.curve,
    })),
    aims: spec.aims.flatMap((aim) =>
      aim.kind === 'pH' && aim.min !== undefined && aim.max !== undefined && aim.max - aim.min <= 1
        ? [(aim.min + aim.max) / 2]
        : [],
    ),
    added: only ? `${only.label.toLowerCase()} added, mL` : 'added, mL',
    absent: hidden ? 'Hidden until you predict. The points are kept and drawn then.' : null,
  };
}

/** Aims with how they stand. `met` is the server's word where there is one. */
export function aimsOf(
  spec: BenchSpec,
  readings: Readings,
  met: readonly string[],
  local: readonly string[],
  asksServer: boolean,
): AimLook[] {
  let under = false;
  return spec.aims.map((aim) => {
    const done = met.includes(aim.id) || (!asksServer && local.includes(aim.id));
    if (done) return { id: aim.id, text: aim.text, state: 'met', note: 'done' };
    if (local.includes(aim.id))
      return { id: aim.id, text: aim.text, state: 'checking', note: 'being checked' };
    const first = !under;
    under = true;
    return { id: aim.id, text: aim.text, state: first ? 'next' : 'open', note: nowOf(aim, readings) };
  });
}

function nowOf(aim: BenchSpec['aims'][number], readings: Readings): string {
  if (aim.kind !== 'pH') return '';
  const pH = readings.vessels.find((vessel) => vessel.id === aim.vessel)?.pH;
  return pH === undefined ? '' : `now ${formatPh(pH)}`;
}

/** The pair bar of a vessel: its largest pair, and where that pair began. */
export function pairOf(
  spec: BenchSpec,
  state: BenchState,
  start: BenchState,
  id: string,
  seen: Seen,
): PairLook | null {
  if (amountsHidden(spec, seen, id)) return null;
  const bar = pairBar(state, id, seen);
  const largest = [...(bar?.pairs ?? [])].sort(
    (a, b) => b.acid_mmol + b.base_mmol - (a.acid_mmol + a.base_mmol),
  );
  const pair =
    largest.find((one) => Math.min(one.acid_mmol, one.base_mmol) > 1e-3 * (one.acid_mmol + one.base_mmol)) ??
    largest[0];
  if (!bar || !pair || pair.acid_mmol + pair.base_mmol < 1e-4) return null;
  const before = pairBar(start, id, seen)?.pairs.find(
    (one) => one.acid === pair.acid && one.base === pair.base,
  );
  return {
    vessel: state.scene.vessels[id]?.label ?? spec.vessels.find((vessel) => vessel.id === id)?.label ?? id,
    acid: chemicalName(pair.acid),
    base: chemicalName(pair.base),
    acid_mmol: pair.acid_mmol,
    base_mmol: pair.base_mmol,
    startShare: before
      ? before.acid_mmol / (before.acid_mmol + before.base_mmol)
      : pair.acid_mmol / (pair.acid_mmol + pair.base_mmol),
    sentence: withChemicalNames(
      bar.sentence,
      bar.pairs.flatMap((one) => [one.acid, one.base]),
    ),
  };
}
