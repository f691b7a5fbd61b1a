/** Bad input to the chemistry: names the field and, where there is one, the nearest valid word. */
export class ChemistryError extends Error {
  constructor(
    readonly field: string,
    message: string,
    readonly nearest?: string,
  ) {
    super(message);
    this.name = 'ChemistryError';
  }
}

/** A finite number within bounds, or a ChemistryError that names the field. */
export function checked(field: string, value: unknown, what: string, least = 0, most = Infinity): number {
  if (typeof value !== 'number' || !Number.isFinite(value) || value < least || value > most)
    throw new ChemistryError(field, `${field} is ${what}${rangeOf(least, most)}; found ${describe(value)}.`);
  return value;
}

function rangeOf(least: number, most: number): string {
  if (most !== Infinity) return `, ${least} to ${most}`;
  return least === Number.MIN_VALUE ? ' above 0' : `, ${least} or more`;
}

const describe = (value: unknown): string =>
  typeof value === 'number' ? String(value) : value === undefined ? 'nothing' : JSON.stringify(value);

/** Number of single-letter insertions, deletions and replacements between two words (Levenshtein 1966). */
function edits(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, i) => i);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++)
      next[j] = Math.min(next[j - 1]! + 1, row[j]! + 1, row[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1));
    row = next;
  }
  return row[b.length]!;
}

/** The word of a list nearest to what was written, or undefined where none is near. */
export function nearestWord(written: string, words: Iterable<string>): string | undefined {
  const wanted = written.toLowerCase();
  let best: string | undefined;
  let least = Math.max(2, Math.ceil(wanted.length / 3)) + 1;
  for (const word of words) {
    if (Math.abs(word.length - wanted.length) >= least) continue;
    const distance = edits(wanted, word.toLowerCase());
    if (distance < least) [least, best] = [distance, word];
  }
  return best;
}
