/** What is displayed decides: aims, limits and comparisons are judged on these roundings. */

/**
 * Rounds to `decimals`. The small push keeps a value that lies on a tie from falling to either side with the last bit of
 * the engine that computed it.
 */
export function shown(value: number, decimals: number): number {
  const scale = 10 ** decimals;
  return Math.round(value * scale + 1e-7) / scale;
}

export const pHShown = (pH: number): number => shown(pH, 2);
/** Nanolitres to mL with two decimals. */
export const mLShown = (volume_nL: number): number => shown(volume_nL / 1e6, 2);

/** 'x.xx mL' for sentences. */
export const mL = (volume_nL: number): string => `${mLShown(volume_nL).toFixed(2)} mL`;
