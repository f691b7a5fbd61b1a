import { formatVolume } from '../hand/volume';
import type { VesselLook } from '../scene/looks';

/** What a vessel reads now, for the live region: 'pH 4.67, blue-green'. */
export function reading(vessel: VesselLook): string {
  const parts: string[] = [];
  if (vessel.ph.kind === 'value') parts.push(`pH ${vessel.ph.text}`);
  if (vessel.ph.kind === 'hidden') parts.push(vessel.ph.sentence.replace(/\.$/, ''));
  if (vessel.words) parts.push(vessel.words);
  if (!vessel.mixed) parts.push('not mixed');
  return parts.join(', ');
}

export function added(volume_uL: number, vessel: VesselLook): string {
  const now = reading(vessel);
  return `${formatVolume(volume_uL)} mL added.${now === '' ? '' : ` ${now}.`}`;
}

export function tookBack(volume_uL: number | null, what: string): string {
  return volume_uL === null ? `Took back: ${what}.` : `Took back ${formatVolume(volume_uL)} mL.`;
}

export const full = (vessel: VesselLook): string => `The ${vessel.name.toLowerCase()} vessel is full.`;
