import { solve } from '../chemistry/index.ts';
import { apply, createState, read, type BenchSpec } from '../bench/index.ts';
import type { PredictionOutcome } from './types.ts';

/** What an option bets on: a vessel, 'together' or 'none'; or how many. */
export interface Bet {
  readonly id: string;
  readonly first?: string;
  readonly count?: number;
}

/**
 * What a prediction is about, found out by dripping: how many drops each vessel takes until its colour is one of the
 * words, or null within the most drops. Nothing of it is typed by an author.
 * @returns an error sentence where the bench refuses to drip at all.
 */
export function computeOutcome(
  bench: BenchSpec,
  ask: { drip: string; into: readonly string[]; until: readonly string[]; most_drops: number },
  options: readonly Bet[],
): PredictionOutcome | { error: string } {
  const drops: { vessel: string; label: string; drops: number | null }[] = [];
  for (const vessel of ask.into) {
    const label = bench.vessels.find((one) => one.id === vessel)?.label ?? vessel;
    const found = colourOfDrip(bench, ask.drip, vessel, ask.until, ask.most_drops);
    if ('error' in found) return found;
    drops.push({ vessel, label, drops: found.drops });
  }
  const least = Math.min(...drops.map((one) => one.drops ?? Infinity));
  const winners = drops.filter((one) => one.drops === least && least < Infinity);
  const first = winners.length === 1 ? winners[0]!.vessel : winners.length > 1 ? 'together' : 'none';
  const right = options.find((option) => option.first === first);
  if (!right) return { error: `The bench answers '${first}', but no option has 'first: ${first}'.` };
  const sentence = drops
    .map(
      (one) =>
        `${one.label}: ${one.drops === null ? `not within ${ask.most_drops} drops` : one.drops === 1 ? '1 drop' : `${one.drops} drops`}`,
    )
    .join('. ');
  return { right: right.id, drops, sentence: `${sentence}.` };
}

/** After how many drops of a bottle a vessel's colour is one of these words; null where it is not within the most drops. */
export function colourOfDrip(
  bench: BenchSpec,
  bottle: string,
  vessel: string,
  words: readonly string[],
  most: number,
): { drops: number | null } | { error: string } {
  let state = createState(bench, { seed: 1 });
  for (let n = 1; n <= most; n++) {
    const outcome = apply(state, { kind: 'drip', from: bottle, into: vessel, drops: 1 });
    if (!outcome.ok) return { error: outcome.refusal.sentence };
    state = outcome.state;
    const seen = read(state, { predicted: true }).vessels.find((one) => one.id === vessel)?.colour?.words;
    if (seen !== undefined && words.includes(seen)) return { drops: n };
  }
  return { drops: null };
}

/**
 * Which vessel has the lowest or highest pH before the first move, by the engine; 'together' where they agree to the
 * displayed precision.
 */
export function compareOutcome(
  bench: BenchSpec,
  ask: { find: 'lowest-pH' | 'highest-pH'; of: readonly string[] },
  options: readonly Bet[],
): PredictionOutcome | { error: string } {
  const { vessels } = createState(bench, { seed: 1 }).scene;
  const sign = ask.find === 'lowest-pH' ? 1 : -1;
  const read: { id: string; label: string; pH: number }[] = [];
  for (const id of ask.of) {
    const liquid = vessels[id]?.liquid;
    if (!liquid) return { error: `This bench has no vessel '${id}'.` };
    if (liquid.volume_nL === 0) return { error: `The vessel '${id}' is empty.` };
    const label = bench.vessels.find((one) => one.id === id)!.label;
    read.push({ id, label, pH: Math.round(solve(liquid, bench.model).pH * 100) / 100 });
  }
  read.sort((a, b) => sign * (a.pH - b.pH));
  const first = read[0]!.pH === read[1]!.pH ? 'together' : read[0]!.id;
  const right = options.find((option) => option.first === first);
  if (!right) return { error: `The bench answers '${first}', but no option has 'first: ${first}'.` };
  return {
    right: right.id,
    drops: [],
    sentence: `${read.map(({ label, pH }) => `${label}: pH ${pH.toFixed(2)}`).join('. ')}.`,
  };
}

/** How many vessels have one of these colours before the first move. */
export function countOutcome(
  bench: BenchSpec,
  ask: { count: readonly string[]; of: readonly string[] },
  options: readonly Bet[],
): PredictionOutcome | { error: string } {
  const { vessels } = read(createState(bench, { seed: 1 }), { predicted: true });
  const seen: { label: string; words: string }[] = [];
  for (const id of ask.of) {
    const vessel = vessels.find((one) => one.id === id);
    if (!vessel) return { error: `This bench has no vessel '${id}'.` };
    if (!vessel.colour) return { error: `The vessel '${id}' shows no colour at the start.` };
    seen.push({ label: vessel.label, words: vessel.colour.words });
  }
  const n = seen.filter(({ words }) => ask.count.includes(words)).length;
  const right = options.find(({ count }) => count === n);
  if (!right) return { error: `The bench answers ${n}, but no option has 'count: ${n}'.` };
  return {
    right: right.id,
    drops: [],
    sentence: `${seen.map(({ label, words }) => `${label}: ${words}`).join('. ')}.`,
  };
}
