import { apply, createState, read, type BenchSpec } from '../bench/index.ts';
import type { PredictionOutcome } from './types.ts';

/**
 * What a prediction is about, found out by dripping: how many drops each vessel takes until its colour is one of the
 * words, or null within the most drops. Nothing of it is typed by an author.
 * @returns an error sentence where the bench refuses to drip at all.
 */
export function computeOutcome(
  bench: BenchSpec,
  ask: { drip: string; into: readonly string[]; until: readonly string[]; most_drops: number },
  options: readonly { id: string; first: string }[],
): PredictionOutcome | { error: string } {
  const drops: { vessel: string; label: string; drops: number | null }[] = [];
  for (const vessel of ask.into) {
    const label = bench.vessels.find((one) => one.id === vessel)?.label ?? vessel;
    let state = createState(bench, { seed: 1 });
    let found: number | null = null;
    for (let n = 1; n <= ask.most_drops && found === null; n++) {
      const outcome = apply(state, { kind: 'drip', from: ask.drip, into: vessel, drops: 1 });
      if (!outcome.ok) return { error: outcome.refusal.sentence };
      state = outcome.state;
      const words = read(state, { predicted: true }).vessels.find((one) => one.id === vessel)?.colour?.words;
      if (words !== undefined && ask.until.includes(words)) found = n;
    }
    drops.push({ vessel, label, drops: found });
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
