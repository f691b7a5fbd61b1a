/** Room left: how much of a bottle a buffer takes before its ratio passes 1 : 10 or 10 : 1, and whether the glass has space for it. */
import { glassware } from '../glassware.ts';
import { amountsHidden } from '../hiding.ts';
import { join, pHOf, take } from '../liquid.ts';
import { findSource, settle, volumeOf, whole } from '../moves/hands.ts';
import { situationOf } from '../apply.ts';
import { pairsOf } from '../pairs.ts';
import { mLShown, pHShown } from '../precision.ts';
import type { Solution } from '../../chemistry/types.ts';
import type { BenchState, Seen } from '../types.ts';

export interface RoomLeft {
  readonly vessel: string;
  readonly of: string;
  readonly family: string;
  /** What ends it: the buffer's ratio, the space in the glass, or the stock in the bottle. */
  readonly endedBy: 'ratio' | 'space' | 'stock';
  readonly mL: number;
  /** pH after so much. */
  readonly pH: number;
  readonly sentence: string;
}

/** pKa ± 1 is a ratio of ten between the partners. */
const RATIO = 10;
const HALVINGS = 40;

/** Base : acid of the pair, or null where neither is there. */
function ratioOf(liquid: Solution, state: BenchState, family: string, acid: string): number | null {
  const pair = pairsOf(liquid, state.spec.model).find((p) => p.family === family && p.acid === acid);
  return pair ? pair.base_mmol / pair.acid_mmol : null;
}

/**
 * How much of a source a vessel's buffer takes.
 * @param of a bottle of the shelf or another vessel
 * @returns null where amounts are hidden, the vessel holds no buffer (a pair with both partners between 1 : 10 and 10 : 1), or
 *   the source does not move its ratio
 */
export function roomLeft(state: BenchState, id: string, of: string, seen: Seen = {}): RoomLeft | null {
  const vessel = state.scene.vessels[id];
  const spec = state.spec.vessels.find((v) => v.id === id);
  const source = findSource(situationOf(state), of);
  if (!vessel || !spec || !source || id === of || amountsHidden(state.spec, seen, id)) return null;
  if (source.liquid.volume_nL === 0 || source.item?.kind === 'indicator') return null;
  const start = whole(vessel);
  const pair = pairsOf(start, state.spec.model)
    .filter((p) => p.base_mmol / p.acid_mmol <= RATIO && p.acid_mmol / p.base_mmol <= RATIO)
    .sort((a, b) => Math.min(b.acid_mmol, b.base_mmol) - Math.min(a.acid_mmol, a.base_mmol))[0];
  if (!pair || Math.min(pair.acid_mmol, pair.base_mmol) < 1e-3) return null;
  const after = (nL: number) => settle(vessel, spec, join(start, take(source.liquid, nL).taken));
  const within = (nL: number): boolean => {
    const ratio = ratioOf(after(nL), state, pair.family, pair.acid);
    return ratio !== null && ratio <= RATIO && ratio >= 1 / RATIO;
  };
  const space = Math.max(0, Math.round(glassware[spec.glass].capacity_mL * 1e6) - volumeOf(vessel));
  const stock = source.liquid.volume_nL;
  const most = Math.min(space, stock);
  let low = 0;
  let high = most;
  const fitsAll = most === 0 || within(most);
  for (let i = 0; i < HALVINGS && !fitsAll && high - low > 1000; i++) {
    const middle = Math.floor((low + high) / 2);
    if (within(middle)) low = middle;
    else high = middle;
  }
  const nL = fitsAll ? most : low;
  const endedBy = fitsAll ? (space <= stock ? 'space' : 'stock') : 'ratio';
  const mL = mLShown(nL);
  const pH = pHShown(pHOf(nL === 0 ? start : after(nL), state.spec.model));
  const end = {
    ratio: `before ${pair.acid} and ${pair.base} stand at 1 to 10 (pH ${pH.toFixed(2)})`,
    space: 'then the glass is full; its buffer would take more',
    stock: 'then the bottle is empty; its buffer would take more',
  }[endedBy];
  return {
    vessel: id,
    of,
    family: pair.family,
    endedBy,
    mL,
    pH,
    sentence: `Room left in ${vessel.label ?? spec.label}: ${mL.toFixed(2)} mL of ${source.label}, ${end}.`,
  };
}
