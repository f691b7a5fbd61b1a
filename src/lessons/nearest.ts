/** The word of a list that is closest to a mistyped one (optimal string alignment), or null where none is close. */
export function nearest(word: string, list: readonly string[]): string | null {
  let best: string | null = null;
  let least = Math.max(2, Math.floor(word.length / 3)) + 1;
  for (const candidate of list) {
    const d = distance(word.toLowerCase(), candidate.toLowerCase());
    if (d < least) [best, least] = [candidate, d];
  }
  return best;
}

function distance(a: string, b: string): number {
  let [twoAbove, above]: [number[], number[]] = [[], Array.from({ length: b.length + 1 }, (_, j) => j)];
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1] ? 0 : 1;
      let d = Math.min(above[j]! + 1, row[j - 1]! + 1, above[j - 1]! + same);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        d = Math.min(d, twoAbove[j - 2]! + 1);
      row.push(d);
    }
    [twoAbove, above] = [above, row];
  }
  return above[b.length]!;
}
