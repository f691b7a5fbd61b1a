import type { BottleLook } from '../glass/Bottle';
import type { Paint } from '../glass/light';
import type { GlassShape } from '../glass/shape';

/** What a vessel's tag may say of its pH. */
export type PhReading =
  | { readonly kind: 'value'; readonly text: string }
  /** Hidden by the bench (until a prediction is locked in, or for good). */
  | { readonly kind: 'hidden'; readonly sentence: string }
  /** No probe stands in it: there is nothing to read. */
  | { readonly kind: 'none' };

/** One vessel as it is to be drawn now. */
export interface VesselLook {
  readonly id: string;
  readonly name: string;
  readonly shape: GlassShape;
  readonly level_mm: number | null;
  /** Null where the bench hides it. */
  readonly volume_uL: number | null;
  readonly paint: Paint;
  readonly hex: string;
  /** Colour in words; empty for an empty vessel, or where the bench hides it. */
  readonly words: string;
  readonly ph: PhReading;
  /** Why the probe's number is not to be trusted. */
  readonly doubt: string | null;
  readonly temperature_C: number | null;
  readonly unmixed: { readonly paint: Paint; readonly words: string; readonly depth: number } | null;
  readonly mixed: boolean;
  readonly probe: boolean;
  readonly stirrer: boolean;
  readonly stirring: boolean;
  readonly stoppered: boolean;
  /** What still fits, µL; null where the bench hides the volume. */
  readonly room_uL: number | null;
  /** Height and words of the brim line, when the vessel is full. */
  readonly full: { readonly h: number; readonly text: string } | null;
}

/** One thing on the shelf as it is to be drawn now. */
export interface ShelfLook extends BottleLook {
  readonly id: string;
  readonly paint: Paint;
  /** Share of its first volume that is left. */
  readonly level: number;
  readonly left_uL: number;
}

/** '4.67', with a true minus. */
export const formatPh = (pH: number): string => pH.toFixed(2).replace('-', '\u2212');

/** '55.00 mL'. */
export const formatMl = (volume_uL: number): string => `${(volume_uL / 1000).toFixed(2)} mL`;

/** What a vessel shows, as one sentence for those who do not see the drawing. */
export function describeVessel(vessel: VesselLook): string {
  if (vessel.level_mm === null) return `${vessel.name}: empty.`;
  const parts = vessel.volume_uL === null ? [] : [formatMl(vessel.volume_uL)];
  if (vessel.ph.kind === 'value') parts.push(`pH ${vessel.ph.text}`);
  if (vessel.ph.kind === 'hidden') parts.push(vessel.ph.sentence.replace(/\.$/, '').toLowerCase());
  if (vessel.words) parts.push(vessel.words);
  if (!vessel.mixed)
    parts.push(vessel.unmixed ? `not mixed, ${vessel.unmixed.words} where it came in` : 'not mixed');
  if (vessel.stoppered) parts.push('stoppered');
  if (vessel.stirring) parts.push('stirring');
  if (vessel.full) parts.push('full');
  return `${vessel.name}: ${parts.join(', ')}.`;
}
