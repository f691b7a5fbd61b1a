/** The glass that a move is on. */
import type { Refusal } from '../types.ts';
import { findVessel, unknownThing, volumeOf } from './hands.ts';
import { refuse, type Situation } from './kinds.ts';

export type Found = NonNullable<ReturnType<typeof findVessel>>;

/** The vessel, or a refusal; with liquid in it where `wet` asks for some. */
export function on(
  at: Situation,
  id: string,
  wet: boolean,
): { ok: true; found: Found } | { ok: false; refusal: Refusal } {
  const found = findVessel(at, id);
  if (!found) return { ok: false, refusal: unknownThing(id) };
  if (wet && volumeOf(found.state) === 0) {
    return {
      ok: false,
      refusal: refuse('vessel-empty', `${found.spec.label} is empty. Pour something into it first.`),
    };
  }
  return { ok: true, found };
}

export const must = (at: Situation, id: string): Found => {
  const found = findVessel(at, id);
  if (!found) throw new Error(`no vessel ${id}`);
  return found;
};
