import { createContext, useCallback, useContext } from 'react';
import { USUAL, wordsIn, type Conventions } from '../lessons/conventions';

const Reader = createContext<Conventions>(USUAL);

/** Around what is shown to somebody who writes numbers and units in their own way. */
export const ReaderProvider = Reader.Provider;

/** Turns a sentence or a number as it was computed into what this reader is used to. */
export function useWords(): (text: string) => string {
  const conventions = useContext(Reader);
  return useCallback((text: string) => wordsIn(text, conventions), [conventions]);
}
