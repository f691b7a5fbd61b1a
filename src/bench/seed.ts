/**
 * Draws that hang on a run's seed and on what they are for, never on the order in which they are asked. Integer arithmetic
 * alone, so that every engine draws the same.
 */

/** FNV-1a over the text, then a finaliser that spreads nearby texts apart (Appleby's 32-bit mix, public domain). */
function hash(text: string): number {
  let h = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) h = Math.imul(h ^ text.charCodeAt(i), 0x01000193);
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}

/** 0 (included) to 1 (excluded), evenly. */
export const uniform = (seed: number, ...what: readonly (string | number)[]): number =>
  hash(`${seed}/${what.join('/')}`) / 0x100000000;

/**
 * -1 to 1, most often near 0: a triangular distribution, as JCGM 100:2008 (GUM) 4.3.9 suggests for a tolerance whose
 * middle is likelier than its ends.
 */
export const triangular = (seed: number, ...what: readonly (string | number)[]): number =>
  uniform(seed, ...what, 'a') - uniform(seed, ...what, 'b');

/** An order of `items` drawn from the seed. */
export function shuffled<T>(items: readonly T[], seed: number, what: string): T[] {
  return items
    .map((item, i) => ({ item, key: uniform(seed, what, i), i }))
    .sort((a, b) => a.key - b.key || a.i - b.i)
    .map(({ item }) => item);
}
