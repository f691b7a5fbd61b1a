/** The hand-held pH meter: what its electrode gives, what its display shows, and when that is to be doubted. */
import { join, pHOf, sealed, take } from './liquid.ts';
import { pHShown, shown } from './precision.ts';
import { triangular, uniform } from './seed.ts';
import type { BenchSpec, Probe, Scene } from './types.ts';

interface At {
  readonly spec: BenchSpec;
  readonly seed: number;
  readonly scene: Scene;
}

/** Around the tip of an unrinsed probe, its old film is spread over this much of the new liquid until it is swirled. */
const AROUND_TIP_NL = 1_000_000;

/** An electrode out of the cupboard: 92 to 98 % of the ideal slope, up to 0.3 pH beside (common practice, assumed). */
const electrode = (seed: number) => ({
  slope: 0.92 + 0.06 * uniform(seed, 'slope'),
  offset: 0.3 * triangular(seed, 'offset'),
});

/** The line that the display puts through the set standards. */
export function fitOf(points: Probe['points']): { slope: number; offset: number; calibrated: boolean } {
  const [a, b] = points;
  if (!a) return { slope: 1, offset: 0, calibrated: false };
  if (!b) return { slope: 1, offset: a.value_pH - a.raw_pH, calibrated: false };
  const slope = (b.value_pH - a.value_pH) / (b.raw_pH - a.raw_pH);
  return Number.isFinite(slope)
    ? { slope, offset: a.value_pH - slope * a.raw_pH, calibrated: true }
    : { slope: 1, offset: a.value_pH - a.raw_pH, calibrated: false };
}

/** pH of what touches the probe: the bulk, tinted by an old film where it was not rinsed. Null without liquid. */
function atTip(at: At): number | null {
  const { probe } = at.scene;
  const vessel = probe.at === null ? undefined : at.scene.vessels[probe.at];
  if (!vessel || vessel.liquid.volume_nL === 0) return null;
  if (!probe.carried) return pHOf(vessel.liquid, at.spec.model);
  const around = take(vessel.liquid, Math.min(AROUND_TIP_NL, vessel.liquid.volume_nL)).taken;
  return pHOf(join(probe.carried, sealed(around, at.spec.model)), at.spec.model);
}

/** What the uncalibrated electrode gives, two decimals. */
export function rawReading(at: At): number | null {
  const pH = atTip(at);
  if (pH === null) return null;
  if (at.spec.instruments?.meter?.calibration !== 'ask') return pHShown(pH);
  const { slope, offset } = electrode(at.seed);
  return shown(7 + (pH - 7) * slope + offset, 2);
}

/** What the hand-held meter's display shows, two decimals; null while the probe hangs on its clip. */
export function displayed(at: At): number | null {
  const raw = rawReading(at);
  if (raw === null) return null;
  const { slope, offset } = fitOf(at.scene.probe.points);
  return pHShown(slope * raw + offset);
}

export const meterCalibrated = (at: At): boolean =>
  at.spec.instruments?.meter?.calibration !== 'ask' || fitOf(at.scene.probe.points).calibrated;

/** Calibrated, and right: between pH 4 and 10 within 0.05 of the truth. */
export function meterTrue(at: At): boolean {
  if (at.spec.instruments?.meter?.calibration !== 'ask') return true;
  const fit = fitOf(at.scene.probe.points);
  if (!fit.calibrated) return false;
  const { slope, offset } = electrode(at.seed);
  return [4, 10].every(
    (pH) => Math.abs(shown(fit.slope * (7 + (pH - 7) * slope + offset) + fit.offset - pH, 3)) <= 0.05,
  );
}
