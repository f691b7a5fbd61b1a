/** Medians of work that is too short to be timed alone. */

/**
 * Times rounds of `count` calls and answers with the median time of one call, in the unit that `perSecond` stands for
 * (1e6: µs, 1e3: ms).
 */
export async function medianOf(
  once: () => number,
  { count, perSecond, rounds = 61 }: { count: number; perSecond: number; rounds?: number },
): Promise<{ median: number; samples: number }> {
  let sum = 0;
  for (let i = 0; i < 20 * count; i++) sum += once();
  const times: number[] = [];
  for (let round = 0; round < rounds; round++) {
    const begun = performance.now();
    for (let i = 0; i < count; i++) sum += once();
    times.push(((performance.now() - begun) / 1000 / count) * perSecond);
    await new Promise((resolve) => setImmediate(resolve));
  }
  // The sum is used, so that no call can be left out as without effect.
  if (!Number.isFinite(sum)) throw new Error('A call gave no number.');
  times.sort((a, b) => a - b);
  return { median: times[rounds >> 1]!, samples: rounds };
}
