/** How fast a held bottle pours: slowly at first, so that a short hold is a small volume. Rates are a proposal of the look. */
export const SLOW_UL_PER_S = 200;
export const FAST_UL_PER_S = 1000;
export const SLOW_MS = 1000;

/** A press that is shorter than this on a tipped bottle is a tap: one drop. */
export const TAP_MS = 220;
/** A carried bottle that rests over a vessel for this long begins to pour. */
export const DWELL_MS = 450;

/**
 * Volume that has flowed after `held_ms` of holding, in whole microlitres (0 or more).
 */
export function flowed_uL(held_ms: number): number {
  const t = Math.max(0, held_ms);
  const slow = (Math.min(t, SLOW_MS) / 1000) * SLOW_UL_PER_S;
  const fast = (Math.max(0, t - SLOW_MS) / 1000) * FAST_UL_PER_S;
  return Math.floor(slow + fast);
}
