import type { Move } from '../../../bench/types';
import { DROP_UL, formatVolume } from '../hand/volume';
import type { VesselLook } from '../scene/looks';

/** What a vessel reads now, for the live region: 'pH 4.67, blue-green'. */
export function reading(vessel: VesselLook): string {
  const parts: string[] = [];
  if (vessel.ph.kind === 'value') parts.push(`pH ${vessel.ph.text}`);
  if (vessel.ph.kind === 'hidden') parts.push(vessel.ph.sentence);
  if (vessel.words) parts.push(vessel.words);
  if (!vessel.mixed) parts.push('not mixed');
  return parts.join(', ');
}

/** '5.00 mL added. pH 4.67, blue-green.' */
export function added(volume_uL: number, vessel: VesselLook): string {
  const now = reading(vessel);
  return `${formatVolume(volume_uL)} mL added.${now === '' ? '' : ` ${now}.`}`;
}

/** What was taken back, with its volume and from where. */
export function tookBack(move: Move, vessels: readonly VesselLook[]): string {
  const name = (id: string) => vessels.find((vessel) => vessel.id === id)?.name.toLowerCase() ?? 'vessel';
  switch (move.kind) {
    case 'pour':
    case 'dispense':
      return `Took back ${formatVolume(move.volume_uL)} mL from the ${name(move.into)}.`;
    case 'drip':
    case 'addIndicator': {
      const drops = move.drops === 1 ? 'one drop' : `${move.drops} drops`;
      return `Took back ${drops}, ${formatVolume(move.drops * DROP_UL)} mL, from the ${name(move.into)}.`;
    }
    default:
      return 'Took back the last move.';
  }
}

/** Why the exact volume may be no larger. */
export function limitSentence(stock_uL: number, room_uL: number, target: string): string {
  if (room_uL < 1) return `${target} is full.`;
  if (stock_uL < 1) return 'Nothing is left to pour.';
  return stock_uL < room_uL
    ? `Only ${formatVolume(stock_uL)} mL is left.`
    : `Only ${formatVolume(room_uL)} mL fits.`;
}
