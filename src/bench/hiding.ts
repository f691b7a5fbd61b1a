/** What stays hidden, from whom, until when. Hidden means absent: every output asks here. */
import type { BenchSpec, Hideable, HideSpec, Seen } from './types.ts';

function open(spec: BenchSpec, until: HideSpec['until'], seen: Seen): boolean {
  const met = seen.metAims ?? [];
  if (until === 'never') return false;
  if (until === 'prediction') return seen.predicted === true;
  if (until === 'end') return spec.aims.length > 0 && spec.aims.every((aim) => met.includes(aim.id));
  return met.includes(until.aim);
}

const dealtOut = (spec: BenchSpec, id: string): boolean =>
  (spec.samples ?? []).some((s) => s.into.includes(id));

/**
 * Whether a quantity of a vessel or bottle is hidden.
 * @param id vessel or bottle; null asks for the bench as a whole
 */
export function isHidden(spec: BenchSpec, seen: Seen, what: Hideable, id: string | null): boolean {
  // Dealt-out contents are what is asked for: they stay closed until a rule or the end opens them.
  if (what === 'contents' && id !== null && dealtOut(spec, id)) {
    const rules = (spec.hide ?? []).filter(
      (rule) => rule.what.includes('contents') && (!rule.of || rule.of.includes(id)),
    );
    return rules.length > 0 ? rules.some((rule) => !open(spec, rule.until, seen)) : !open(spec, 'end', seen);
  }
  return (spec.hide ?? []).some(
    (rule) =>
      rule.what.includes(what) &&
      (!rule.of || id === null || rule.of.includes(id)) &&
      !open(spec, rule.until, seen),
  );
}

const ALL: readonly Hideable[] = ['pH', 'colour', 'volume', 'temperature', 'contents', 'trace', 'ledger'];

export const hiddenOf = (spec: BenchSpec, seen: Seen, id: string): Hideable[] =>
  ALL.filter((what) => isHidden(spec, seen, what, id));

/** Whether amounts and species of a vessel are hidden: they would tell pH, contents and what was poured. */
export const amountsHidden = (spec: BenchSpec, seen: Seen, id: string): boolean =>
  (['ledger', 'pH', 'contents', 'volume'] as const).some((what) => isHidden(spec, seen, what, id));

/** Whether any vessel hides this: sums over the bench (waste, stock) would tell it. */
export const anyHidden = (spec: BenchSpec, seen: Seen, what: Hideable): boolean =>
  spec.vessels.some((v) => isHidden(spec, seen, what, v.id));

/** Whether the trace of a vessel is hidden: it is drawn from pH and volumes. */
export const traceHidden = (spec: BenchSpec, seen: Seen, id: string): boolean =>
  isHidden(spec, seen, 'trace', id) || isHidden(spec, seen, 'pH', id) || isHidden(spec, seen, 'volume', id);

/** Graded samples: readings of this bench come from the server. */
export const isGraded = (spec: BenchSpec): boolean => (spec.samples ?? []).some((s) => s.graded);

/**
 * The specification as a browser may have it: the contents of graded samples are left out, so nothing there can compute
 * them. Without them the browser does not replay; it asks the server for readings.
 */
export function forBrowser(spec: BenchSpec): BenchSpec {
  if (!isGraded(spec)) return spec;
  const into = new Set((spec.samples ?? []).filter((s) => s.graded).flatMap((s) => s.into));
  const bare = <T extends { readonly id: string; readonly contents?: unknown }>(thing: T): T => {
    if (!into.has(thing.id)) return thing;
    const { contents: _contents, ...rest } = thing;
    return rest as T;
  };
  return {
    ...spec,
    vessels: spec.vessels.map(bare),
    shelf: spec.shelf.map(bare),
    samples: (spec.samples ?? []).map((s) => (s.graded ? { ...s, contents: [] } : s)),
  };
}
