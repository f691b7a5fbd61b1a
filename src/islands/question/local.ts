import { createStore, entries, get, set } from 'idb-keyval';
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
  readonly pending: Pending | null;
  readonly marked: MarkedAnswer | null;
  readonly done: boolean;
}

let opened: ReturnType<typeof createStore> | undefined;
const store = () => (opened ??= createStore('dropwise-answers', 'answers'));

/** Whose record it is stands in its key: on a shared computer nobody meets another one's words. */
export const keyOf = (person: string | null, lesson: string, question: string): string =>
  `${person ?? 'visitor'}/${lesson}/${question}`;

/** Private windows and full disks may refuse storage: a draft then lasts as long as the page. */
async function quietly<T>(work: () => Promise<T>, otherwise: T): Promise<T> {
  try {
    return await work();
  } catch {
    return otherwise;
  }
}

export const loadQuestion = (key: string): Promise<QuestionRecord | undefined> =>
  quietly(() => get<QuestionRecord>(key, store()), undefined);

export const keepQuestion = (key: string, record: QuestionRecord): Promise<void> =>
  quietly(() => set(key, record, store()), undefined);

/** How many answers of a person this browser holds that the server does not have. */
export const countUnsentAnswers = (person: string): Promise<number> =>
  quietly(async () => {
    const all = await entries<string, QuestionRecord>(store());
    return all.filter(([key, record]) => key.startsWith(`${person}/`) && record.pending).length;
  }, 0);
