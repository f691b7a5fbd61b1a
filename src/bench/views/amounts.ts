/** Amounts in a vessel: pair bar, species bars, and the mole ledger of the last addition. */
import { lastStanding } from '../apply.ts';
import { amountsHidden } from '../hiding.ts';
import { solve } from '../liquid.ts';
import { whole } from '../moves/hands.ts';
import { pairsOf, type Pair } from '../pairs.ts';
import { shown } from '../precision.ts';
import type { BenchState, Seen, Vessel } from '../types.ts';

export interface PairBar {
  readonly vessel: string;
  readonly pairs: readonly Pair[];
  readonly sentence: string;
}

const labelOf = (state: BenchState, id: string): string =>
  state.scene.vessels[id]?.label ?? state.spec.vessels.find((v) => v.id === id)?.label ?? id;

const indicatorsOf = (state: BenchState): ReadonlySet<string> =>
  new Set([
    ...state.spec.shelf.flatMap((s) => [
      ...(s.indicator ? [s.indicator.id] : []),
      ...(s.contents?.indicators ?? []).map((d) => d.indicator),
    ]),
    ...state.spec.vessels.flatMap((v) => (v.contents?.indicators ?? []).map((d) => d.indicator)),
    ...(state.spec.samples ?? []).flatMap((s) =>
      s.contents.flatMap((c) => (c.indicators ?? []).map((d) => d.indicator)),
    ),
  ]);

/** Weak acid and conjugate base as one bar, in mmol; null while amounts of this vessel are hidden or it is empty. */
export function pairBar(state: BenchState, id: string, seen: Seen = {}): PairBar | null {
  const vessel = state.scene.vessels[id];
  if (!vessel || amountsHidden(state.spec, seen, id)) return null;
  const dyes = indicatorsOf(state);
  const found = pairsOf(whole(vessel), state.spec.model).filter((p) => !dyes.has(p.family));
  const main = [...found].sort(
    (a, b) => Math.min(b.acid_mmol, b.base_mmol) - Math.min(a.acid_mmol, a.base_mmol),
  )[0];
  return {
    vessel: id,
    pairs: found,
    sentence: main
      ? `${labelOf(state, id)} holds ${main.acid_mmol.toFixed(3)} mmol ${main.acid} and ${main.base_mmol.toFixed(3)} mmol ${main.base}.`
      : `${labelOf(state, id)} holds no weak acid with its conjugate base.`,
  };
}

export interface SpeciesBar {
  readonly name: string;
  readonly component: string;
  readonly charge: number;
  readonly mmol: number;
}

/** Every dissolved species, most first; null while hidden or empty. */
export function speciesBars(
  state: BenchState,
  id: string,
  seen: Seen = {},
): { readonly bars: readonly SpeciesBar[]; readonly sentence: string } | null {
  const vessel = state.scene.vessels[id];
  if (!vessel || vessel.liquid.volume_nL === 0 || amountsHidden(state.spec, seen, id)) return null;
  const bars = solve(whole(vessel), state.spec.model)
    .species.map((s) => ({
      name: s.name,
      component: s.component,
      charge: s.charge,
      mmol: s.amount_mol * 1000,
    }))
    .filter((b) => b.mmol > 0)
    .sort((a, b) => b.mmol - a.mmol || (a.name < b.name ? -1 : 1));
  const top = bars.slice(0, 3).map((b) => `${b.name} ${figures(b.mmol)} mmol`);
  return { bars, sentence: `Dissolved in ${labelOf(state, id)}, most first: ${top.join(', ')}.` };
}

/** Three figures, also for very small amounts. */
const figures = (mmol: number): string => (mmol >= 0.001 ? mmol.toFixed(3) : mmol.toExponential(2));

export interface LedgerRow {
  readonly species: string;
  readonly component: string;
  readonly before_mmol: number;
  readonly change_mmol: number;
  readonly after_mmol: number;
}

export interface Ledger {
  readonly vessel: string;
  readonly n: number;
  readonly volume_before_mL: number;
  readonly volume_after_mL: number;
  readonly rows: readonly LedgerRow[];
  readonly sentence: string;
}

const amounts = (vessel: Vessel, state: BenchState): Map<string, { component: string; mmol: number }> =>
  vessel.liquid.volume_nL === 0
    ? new Map()
    : new Map(
        solve(whole(vessel), state.spec.model).species.map((s) => [
          s.name,
          { component: s.component, mmol: s.amount_mol * 1000 },
        ]),
      );

/** Changes smaller than this do not show in a ledger kept to 0.001 mmol. */
const LEAST_MMOL = 5e-4;

/**
 * The mole ledger of a vessel: amounts before and after the last addition that still stands.
 * Null where nothing was added yet, or amounts of this vessel are hidden.
 */
export function ledger(state: BenchState, id: string, seen: Seen = {}): Ledger | null {
  if (amountsHidden(state.spec, seen, id)) return null;
  for (let s = lastStanding(state); s?.back && s.move?.kind !== 'startAgain'; s = lastStanding(s.back)) {
    const before = s.back.scene.vessels[id];
    const after = s.scene.vessels[id];
    if (!before || !after || before.added === after.added || Object.keys(after.added).length === 0) continue;
    const was = amounts(before, state);
    const is = amounts(after, state);
    const rows = [...new Set([...was.keys(), ...is.keys()])]
      .map((species) => {
        const a = was.get(species)?.mmol ?? 0;
        const b = is.get(species)?.mmol ?? 0;
        return {
          species,
          component: (is.get(species) ?? was.get(species))?.component ?? '',
          before_mmol: shown(a, 6),
          change_mmol: shown(b - a, 6),
          after_mmol: shown(b, 6),
        };
      })
      .filter((row) => row.before_mmol >= LEAST_MMOL || row.after_mmol >= LEAST_MMOL);
    return {
      vessel: id,
      n: s.count,
      volume_before_mL: shown(whole(before).volume_nL / 1e6, 2),
      volume_after_mL: shown(whole(after).volume_nL / 1e6, 2),
      rows,
      sentence: ledgerSentence(labelOf(state, id), rows),
    };
  }
  return null;
}

function ledgerSentence(label: string, rows: readonly LedgerRow[]): string {
  const moved = rows
    .filter((r) => Math.abs(r.change_mmol) >= LEAST_MMOL)
    .sort((a, b) => Math.abs(b.change_mmol) - Math.abs(a.change_mmol))
    .slice(0, 3)
    .map(
      (r) =>
        `${r.species} ${r.change_mmol > 0 ? 'rose' : 'fell'} by ${Math.abs(r.change_mmol).toFixed(3)} to ${r.after_mmol.toFixed(3)} mmol`,
    );
  return moved.length > 0
    ? `In ${label}: ${moved.join('; ')}.`
    : `In ${label} no amount changed by 0.001 mmol or more.`;
}
