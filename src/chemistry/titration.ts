/** Titrations: pH against volume added, equivalence and half-equivalence points. */
import { pKaAt } from './compiled.ts';
import { familyOf, strongIons } from './components.ts';
import { pHOf } from './equilibrium.ts';
import { checked, ChemistryError } from './errors.ts';
import { mix } from './solution.ts';
import type { Model, Solution } from './types.ts';
import { indicators } from './indicators.ts';

export interface TitrationPoint {
  readonly added_mL: number;
  readonly pH: number;
}

/** Where the protons of one step are all taken (or given), or half of them. */
export interface TitrationMark extends TitrationPoint {
  /** Component whose step it is; 'strong' for strong acid or base. */
  readonly family: string;
  /** Step of that family, from 1; 0 for strong acid or base. */
  readonly step: number;
}

export interface Titration {
  readonly model: Model;
  readonly points: readonly TitrationPoint[];
  /** Those that show as a jump: neighbouring steps at least 3 units of pKa apart. */
  readonly equivalence: readonly TitrationMark[];
  /** Half way to an equivalence point over one single step, where pH is near its pKa. */
  readonly halfEquivalence: readonly TitrationMark[];
}

/** Steps closer than this melt into one: their jump is not seen. */
const APART = 3;
/** No two neighbouring points of a trace are further apart than this in pH, as far as whole nanolitres allow. */
const FINE_PH = 0.15;
const NL_PER_ML = 1e6;
/** pKa that free strong acid and hydroxide count as. */
const STRONG_ACID = 0;
const HYDROXIDE = 14;

/** The analyte with so much titrant in it, amounts exact also below a nanolitre. */
function after(analyte: Solution, titrant: Solution, added_mL: number): Solution {
  const share = (added_mL * NL_PER_ML) / titrant.volume_nL;
  const amounts: Record<string, number> = {};
  for (const id in titrant.amounts) amounts[id] = titrant.amounts[id]! * share;
  return mix(analyte, { ...titrant, volume_nL: added_mL * NL_PER_ML, amounts });
}

/** Protons that strong base has taken from the fully protonated families of a solution, mol; negative: free strong acid. */
function taken(s: Solution): number {
  let sum = 0;
  for (const id in s.amounts) sum += s.amounts[id]! * (strongIons[id] ?? familyOf(id)?.charge ?? 0);
  return sum;
}

interface Step {
  readonly family: string;
  readonly step: number;
  readonly pKa: number;
  /** mol in the analyte, and mol brought by each mL of titrant. */
  readonly analyte: number;
  readonly perMl: number;
}

/** Steps of every family in either liquid, by pKa. Indicators are left out: their amounts are traces. */
function stepsOf(analyte: Solution, titrant: Solution, model: Model): Step[] {
  const ids = new Set([...Object.keys(analyte.amounts), ...Object.keys(titrant.amounts)]);
  const t = analyte.temperature_C;
  return [...ids]
    .flatMap((id) => {
      const family = Object.hasOwn(indicators, id) ? undefined : familyOf(id);
      return (family?.steps ?? []).map((step, i) => ({
        family: id,
        step: i + 1,
        pKa: model === 'real' ? pKaAt(step, t) : step.pKa,
        analyte: analyte.amounts[id] ?? 0,
        perMl: ((titrant.amounts[id] ?? 0) / titrant.volume_nL) * NL_PER_ML,
      }));
    })
    .filter((step) => step.analyte + step.perMl > 0)
    .sort((a, b) => a.pKa - b.pKa);
}

/**
 * Volumes at which the protons of the first k steps, and no others, have been taken: where the charge of strong ions is as large as
 * their sum. Both grow in proportion to the volume, so each is the root of a straight line.
 */
function boundaries(analyte: Solution, titrant: Solution, steps: readonly Step[]): number[] {
  const start = taken(analyte);
  const perMl = (taken(titrant) / titrant.volume_nL) * NL_PER_ML;
  let sum = 0;
  let sumPerMl = 0;
  const volumes = [start / -perMl];
  for (const step of steps) {
    sum += step.analyte;
    sumPerMl += step.perMl;
    volumes.push((sum - start) / (perMl - sumPerMl));
  }
  return volumes;
}

/**
 * A titration computed as if poured ever so slowly and stirred.
 * @param analyte what stands in the flask; not empty
 * @param titrant what is added; not empty. Strong or weak acid or base, or a buffer
 * @param to_mL up to this volume of titrant
 * @param points evenly spread points to start from; jumps are filled in until neighbours lie within 0.15 of pH
 * @throws ChemistryError where a volume is no volume, or as `solve` does
 */
export function titrate(
  analyte: Solution,
  titrant: Solution,
  to_mL: number,
  model: Model,
  points = 60,
): Titration {
  checked('to_mL', to_mL, 'a number of mL', Number.MIN_VALUE);
  checked('points', points, 'a number of points', 2, 10_000);
  if (titrant.volume_nL === 0) throw new ChemistryError('titrant', 'The titrant is an empty bottle.');
  const at = (added_mL: number): TitrationPoint => ({
    added_mL,
    pH: pHOf(after(analyte, titrant, added_mL), model),
  });
  const trace: TitrationPoint[] = [at(0)];
  const fill = (right: TitrationPoint, depth: number): void => {
    const left = trace[trace.length - 1]!;
    if (depth > 0 && Math.abs(right.pH - left.pH) > FINE_PH) {
      fill(at((left.added_mL + right.added_mL) / 2), depth - 1);
      fill(right, depth - 1);
    } else trace.push(right);
  };
  for (let i = 1; i <= points; i++) fill(at((to_mL * i) / points), 12);

  const steps = stepsOf(analyte, titrant, model);
  const volumes = boundaries(analyte, titrant, steps);
  const pKa = [STRONG_ACID, ...steps.map((s) => s.pKa), HYDROXIDE];
  const inside = (mL: number) => mL > 1e-9 * to_mL && mL <= to_mL;
  const seen = (k: number) => pKa[k + 1]! - pKa[k]! >= APART;
  const mark = (k: number, mL: number): TitrationMark => ({
    ...at(mL),
    family: steps[k - 1]?.family ?? 'strong',
    step: steps[k - 1]?.step ?? 0,
  });
  const equivalence = volumes.flatMap((mL, k) => (seen(k) && inside(mL) ? [mark(k, mL)] : []));
  // A half-way point needs a clear step: both its ends are jumps, or one of them is where the titration begins.
  const isEnd = (k: number) => Math.abs(volumes[k]!) < 1e-9 * to_mL || (seen(k) && volumes[k]! > 0);
  const halfEquivalence = steps.flatMap((_, i) => {
    const half = (volumes[i]! + volumes[i + 1]!) / 2;
    return isEnd(i) && isEnd(i + 1) && inside(half) ? [mark(i + 1, half)] : [];
  });
  const byVolume = (a: TitrationPoint, b: TitrationPoint) => a.added_mL - b.added_mL;
  return {
    model,
    points: trace,
    equivalence: equivalence.sort(byVolume),
    halfEquivalence: halfEquivalence.sort(byVolume),
  };
}
