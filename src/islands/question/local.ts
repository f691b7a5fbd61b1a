import type { Answer, Marking } from '../../lessons/questions/types';

/** An answer that is on its way, with the id that makes it count once. */
export interface Pending {
  readonly opId: string;
  readonly answer: Answer;
  readonly attempt: number;
}

export interface MarkedAnswer {
  readonly answer: Answer;
  readonly marking: Marking;
  /** How many answers to this question were counted, this one included. */
  readonly attempt: number;
}

/** What this browser keeps of one question: what is being written, what is not sent yet, and a visitor's own standing. */
export interface QuestionRecord {
  readonly revision: number;
  readonly draft: Answer | null;
  /** Answers that were counted when the draft was written: one given elsewhere since is newer than the draft. */
  readonly attempt: number;
  readonly pending: Pending | null;
  readonly marked: MarkedAnswer | null;
  readonly done: boolean;
}

const PREFIX = 'dropwise-answer:';

/** Whose record it is stands in its key: on a shared computer nobody meets another one's words. */
export const keyOf = (person: string | null, lesson: string, question: string): string =>
  `${PREFIX}${person ?? 'visitor'}/${lesson}/${question}`;

/** Private windows and full disks may refuse storage: a draft then lasts as long as the page. */
function quietly<T>(work: () => T, otherwise: T): T {
  try {
    return work();
  } catch {
    return otherwise;
  }
}

/** Local storage, and not a database: what is written is there at once, also when the page goes with the next key. */
export const loadQuestion = (key: string): QuestionRecord | null =>
  quietly(() => JSON.parse(localStorage.getItem(key) ?? 'null') as QuestionRecord | null, null);

export const keepQuestion = (key: string, record: QuestionRecord): void =>
  quietly(() => localStorage.setItem(key, JSON.stringify(record)), undefined);

export const forgetQuestion = (key: string): void => quietly(() => localStorage.removeItem(key), undefined);

/** How many answers of a person this browser holds that the server does not have. */
export const countUnsentAnswers = (person: string): number =>
  quietly(
    () =>
      Object.keys(localStorage).filter(
        (key) => key.startsWith(`${PREFIX}${person}/`) && loadQuestion(key)?.pending,
      ).length,
    0,
  );
