import { createStore, type StoreApi } from 'zustand/vanilla';
import type { Answer, Marking } from '../../lessons/questions/types';
import { tellDone } from '../bench/sync/done';
import { post, Refused, Unreachable } from '../bench/sync/server';
import { forgetQuestion, keepQuestion, keyOf, loadQuestion, type MarkedAnswer, type Pending } from './local';

const FIRST_RETRY_MS = 1000;
const LONGEST_RETRY_MS = 30_000;

/** What a page was given by the server about this question. */
export interface GivenQuestion {
  readonly lesson: string;
  readonly revision: number;
  readonly question: string;
  /** Public id of the person who is signed in. */
  readonly person: string | null;
  readonly marked?: MarkedAnswer;
  readonly done: boolean;
}

export interface QuestionView {
  readonly draft: Answer | null;
  /** 'waiting': not connected; the answer is kept and sent again. */
  readonly phase: 'open' | 'sending' | 'waiting';
  readonly marked: MarkedAnswer | null;
  /** What was asked back about the last answer, which does not count. */
  readonly askedBack: Marking | null;
  readonly done: boolean;
  /** A sentence that has to be read: why an answer was not taken. */
  readonly word: string | null;
  /** What somebody wrote here before this person signed in; perhaps somebody else. */
  readonly stranger: Answer | null;
}

export interface QuestionWork {
  readonly store: StoreApi<QuestionView>;
  edit(draft: Answer): void;
  submit(answer: Answer): void;
  /** Changes one's mind about an answer that could not be sent yet. */
  takeBack(): void;
  /** Answers 'is this yours?': what is, is taken over as a draft; what is not, is forgotten. */
  claim(mine: boolean): void;
  start(): () => void;
}

interface Marked {
  readonly attempt: number;
  readonly marking: Marking;
  readonly done: boolean;
}

/** The work on one question: its draft is kept, its answer sent until the server has it, its marking shown. */
export function createQuestionWork(given: GivenQuestion): QuestionWork {
  const { lesson, revision, question, person } = given;
  const key = keyOf(person, lesson, question);
  const visitorKey = keyOf(null, lesson, question);
  let pending: Pending | null = null;
  let retry_ms = FIRST_RETRY_MS;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let touched = false;

  const store = createStore<QuestionView>(() => ({
    draft: given.marked?.answer ?? null,
    phase: 'open',
    marked: given.marked ?? null,
    askedBack: null,
    done: given.done,
    word: null,
    stranger: null,
  }));
  const show = (part: Partial<QuestionView>) => store.setState(part);
  const keep = () => {
    const { draft, marked, done } = store.getState();
    const attempt = marked?.attempt ?? 0;
    keepQuestion(key, {
      revision,
      draft,
      attempt,
      pending,
      marked: person === null ? marked : null,
      done,
    });
  };

  function load(): void {
    const found = loadQuestion(key);
    if (!found && person !== null && !given.marked && !touched) show({ stranger: strangersDraft() });
    if (!found) return;
    // Another revision may ask for something else: what was said to the old one does not stand below it.
    const same = found.revision === revision;
    pending ??= same ? found.pending : null;
    const newest = found.attempt >= (given.marked?.attempt ?? 0);
    show({
      ...(found.draft && newest && !touched ? { draft: found.draft } : {}),
      ...(person === null ? { done: found.done, marked: same ? found.marked : null } : {}),
    });
    if (store.getState().done) tellDone([question]);
    if (pending) void send();
  }

  /** Words and choices mean the same to everyone; numbers and orders differ from learner to learner. */
  function strangersDraft(): Answer | null {
    const draft = loadQuestion(visitorKey)?.draft;
    if (draft?.kind === 'choice' && draft.chosen.length > 0) return draft;
    return draft?.kind === 'explain' && draft.text !== '' ? { kind: 'explain', text: draft.text } : null;
  }

  async function send(): Promise<void> {
    const sent = pending;
    if (!sent || store.getState().phase === 'sending') return;
    clearTimeout(timer);
    show({ phase: 'sending', word: null });
    try {
      const { attempt, marking, done } = await post<Marked>('/api/answers', {
        lesson,
        question,
        person,
        ...sent,
      });
      if (pending !== sent) return;
      pending = null;
      retry_ms = FIRST_RETRY_MS;
      if (marking.verdict === 'ask') show({ phase: 'open', askedBack: marking });
      else
        show({
          phase: 'open',
          askedBack: null,
          marked: { answer: sent.answer, marking, attempt },
          // A visitor's browser keeps what is done; a wrong answer later takes nothing back.
          done: done || store.getState().done,
        });
      if (store.getState().done) tellDone([question]);
      keep();
    } catch (error) {
      if (pending !== sent) return;
      if (error instanceof Unreachable) {
        show({ phase: 'waiting' });
        timer = setTimeout(() => void send(), retry_ms);
        retry_ms = Math.min(LONGEST_RETRY_MS, retry_ms * 2);
      } else if (error instanceof Refused) {
        // Signed out meanwhile: the answer stays here and goes when its person is back.
        if (error.problem.status !== 401) pending = null;
        show({ phase: 'open', word: error.problem.title });
        keep();
      } else throw error;
    }
  }

  return {
    store,
    edit(draft) {
      touched = true;
      show({ draft });
      keep();
    },
    submit(answer) {
      if (store.getState().phase !== 'open') return;
      touched = true;
      const attempt = (store.getState().marked?.attempt ?? 0) + 1;
      pending = { opId: crypto.randomUUID(), answer, attempt };
      show({ draft: answer, askedBack: null, word: null });
      keep();
      void send();
    },
    takeBack() {
      clearTimeout(timer);
      pending = null;
      retry_ms = FIRST_RETRY_MS;
      show({ phase: 'open', word: null });
      keep();
    },
    claim(mine) {
      const { stranger } = store.getState();
      forgetQuestion(visitorKey);
      show({ stranger: null });
      if (!mine || !stranger) return;
      touched = true;
      show({ draft: stranger });
      keep();
    },
    start() {
      const online = () => {
        if (pending) void send();
      };
      window.addEventListener('online', online);
      load();
      return () => {
        clearTimeout(timer);
        window.removeEventListener('online', online);
      };
    },
  };
}
