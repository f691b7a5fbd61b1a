/** The waste bottle: what is in it, and what usually becomes of it. */
import type { Model, Solution } from '../chemistry/types.ts';
import { pHOf } from './liquid.ts';
import { LOCAL_RULES } from './moves/hands.ts';
import { mL, shown } from './precision.ts';

/**
 * Mixed pH and volume of the waste and what to do with it. Near neutral goes down the drain in many places; the rest is
 * collected (common practice).
 * @param open which numbers may be told
 */
export function wasteSentence(waste: Solution, model: Model, open = { volume: true, pH: true }): string {
  if (waste.volume_nL === 0) return 'The waste bottle is empty.';
  const holds = `The waste holds ${open.volume ? mL(waste.volume_nL) : 'liquid'}`;
  if (!open.pH) return `${holds}. ${LOCAL_RULES}`;
  const pH = shown(pHOf(waste, model), 2);
  const advice =
    pH >= 6 && pH <= 9
      ? 'Between pH 6 and 9 many places let it run to the drain with much water'
      : `Bring it to between pH 6 and 9 with dilute ${pH < 6 ? 'alkali' : 'acid'} before it goes anywhere`;
  return `${holds} at pH ${pH.toFixed(2)}. ${advice}. ${LOCAL_RULES}`;
}
