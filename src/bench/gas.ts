/**
 * Carbon dioxide in and out of a liquid while a gas is bubbled through it.
 *
 * The dissolved gas approaches what Henry's law gives for the bubbled gas at a rate proportional to its distance from it
 * (two-film model; W. G. Whitman 1923). The time constant of a minute for a gas frit in a small beaker is an assumption.
 */
import type { Model, Solution } from '../chemistry/types.ts';
import { carbonateOf, solve } from './liquid.ts';

const TIME_CONSTANT_S = 60;
/** Air today: about 420 parts per million. */
export const AIR_CO2_ATM = 4.2e-4;

export const GASES = {
  air: { name: 'air', co2_atm: AIR_CO2_ATM },
  co2: { name: 'carbon dioxide', co2_atm: 1 },
  nitrogen: { name: 'nitrogen', co2_atm: 0 },
} as const;

const CARBONIC = 'carbonic';
const STEPS_PER_CONSTANT = 8;

const dissolved = (liquid: Solution, model: Model): number =>
  solve(liquid, model).species.reduce(
    (sum, s) => (s.component === CARBONIC && s.charge === 0 ? sum + s.amount_mol : sum),
    0,
  );

/**
 * The liquid after so many seconds of bubbling; only its carbonate changes.
 * @param seconds 1 to 3600
 */
export function bubbled(liquid: Solution, gas: keyof typeof GASES, seconds: number, model: Model): Solution {
  const { gas: _former, ...start } = liquid;
  const former = carbonateOf(liquid, model);
  const { co2_atm } = GASES[gas];
  const goal = co2_atm === 0 ? 0 : dissolved({ ...start, gas: { co2_atm } }, model);
  const steps = Math.ceil((seconds / TIME_CONSTANT_S) * STEPS_PER_CONSTANT);
  const share = 1 - Math.exp(-seconds / TIME_CONSTANT_S / steps);
  let now: Solution = { ...start, amounts: { ...start.amounts, [CARBONIC]: former } };
  for (let i = 0; i < steps; i++) {
    const total = now.amounts[CARBONIC] ?? 0;
    const next = Math.max(0, total + share * (goal - dissolved(now, model)));
    now = { ...now, amounts: { ...now.amounts, [CARBONIC]: next } };
  }
  return now;
}
