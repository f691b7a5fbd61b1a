import { wordsIn, type Sentence } from './sentences.ts';

export interface Reading {
  readonly words: number;
  /** LIX: words a sentence plus the percentage of words longer than six letters. */
  readonly lix: number;
  /** Sentences that a second-language reader loses. */
  readonly long: readonly (Sentence & { readonly words: number })[];
}

/** Around 40 is the language of newspapers; textbooks for sixteen-year-olds stay under it. */
export const HARDEST_LIX = 42;
export const LONGEST_SENTENCE = 28;

/**
 * How hard a text is to read, in any European language: LIX (C. H. Björnsson, Läsbarhet, 1968; formula and bands from
 * memory).
 */
export function readingOf(sentences: readonly Sentence[]): Reading {
  const counted = sentences.map((sentence) => ({ ...sentence, list: wordsIn(sentence.text) }));
  const words = counted.flatMap(({ list }) => list);
  const longWords = words.filter((word) => word.length > 6).length;
  return {
    words: words.length,
    lix:
      words.length === 0 ? 0 : Math.round(words.length / counted.length + (100 * longWords) / words.length),
    long: counted
      .filter(({ list }) => list.length > LONGEST_SENTENCE)
      .map(({ line, text, list }) => ({ line, text, words: list.length })),
  };
}
