/** The exact-volume control: what may be typed, and what its buttons and keys step to. Volumes in whole microlitres. */
export const DROP_UL = 50;

/** Where the steps change size: below each bound, the step that holds there. */
const LADDER: readonly { readonly below_uL: number; readonly step_uL: number }[] = [
  { below_uL: 500, step_uL: 50 },
  { below_uL: 5_000, step_uL: 500 },
  { below_uL: 10_000, step_uL: 1_000 },
  { below_uL: Number.POSITIVE_INFINITY, step_uL: 5_000 },
];

function stepUp(volume_uL: number): number {
  return LADDER.find((rung) => volume_uL < rung.below_uL)!.step_uL;
}

function stepDown(volume_uL: number): number {
  return LADDER.find((rung) => volume_uL <= rung.below_uL)!.step_uL;
}

/** The next round volume above, at most `most_uL`. */
export function nextUp(volume_uL: number, most_uL: number): number {
  const step = stepUp(volume_uL);
  return Math.min(most_uL, (Math.floor(volume_uL / step) + 1) * step);
}

/** The next round volume below, at least one drop. */
export function nextDown(volume_uL: number): number {
  const step = stepDown(volume_uL);
  return Math.max(DROP_UL, (Math.ceil(volume_uL / step) - 1) * step);
}

/** A volume nudged by drops (arrow keys), kept between one drop and `most_uL`. */
export function nudge(volume_uL: number, by_uL: number, most_uL: number): number {
  return Math.min(most_uL, Math.max(DROP_UL, volume_uL + by_uL));
}

export type Parsed =
  { readonly ok: true; readonly volume_uL: number } | { readonly ok: false; readonly sentence: string };

/**
 * A typed volume in mL: digits with a point or a comma, at most three decimals, above 0.
 */
export function parseVolume(text: string): Parsed {
  const clean = text
    .trim()
    .replace(/\s*(ml|cm³|cm3)$/i, '')
    .replace(',', '.');
  if (clean === '') return { ok: false, sentence: 'Type a volume in mL, such as 1.00.' };
  if (!/^\d*\.?\d*$/.test(clean) || clean === '.') {
    return { ok: false, sentence: 'Write the volume as a number, such as 1.00.' };
  }
  const volume_uL = Number(clean) * 1000;
  if (Math.abs(volume_uL - Math.round(volume_uL)) > 1e-6) {
    return { ok: false, sentence: 'The smallest step is 0.001 mL.' };
  }
  if (Math.round(volume_uL) < 1) return { ok: false, sentence: 'Choose more than 0 mL.' };
  return { ok: true, volume_uL: Math.round(volume_uL) };
}

/** '1.00' from 1000. Volumes that need it show the third decimal. */
export function formatVolume(volume_uL: number): string {
  return (volume_uL / 1000).toFixed(volume_uL % 10 === 0 ? 2 : 3);
}
