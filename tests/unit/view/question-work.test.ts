// @vitest-environment happy-dom
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { createQuestionWork, type GivenQuestion } from '../../../src/islands/question/work';
import { countUnsentAnswers, keyOf } from '../../../src/islands/question/local';
import { draftFor, moved, stillMisplaced } from '../../../src/islands/question/drafts';
import type { Answer, Marking } from '../../../src/lessons/questions/types';

const ME = '11111111-1111-4111-8111-111111111111';
const given: GivenQuestion = {
  lesson: 'two-beakers',
  revision: 1,
  question: 'which',
  person: ME,
  done: false,
};
const visitor: GivenQuestion = { ...given, person: null };
const chosen = (...ids: string[]): Answer => ({ kind: 'choice', chosen: ids });
const NOT_YET: Marking = { verdict: 'not-yet', feedback: 'Chloride takes nothing in.', misconceptions: [] };
const RIGHT: Marking = { verdict: 'right', feedback: 'Both partners are there.', misconceptions: [] };

type Sent = { opId: string; attempt: number; person: string | null; answer: Answer };
let sent: Sent[];
let answers: (() => Response | Promise<Response>)[];
const json =
  (body: unknown, status = 200) =>
  () =>
    new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });
const offline = () => Promise.reject(new TypeError('no connection'));

beforeEach(() => {
  vi.useFakeTimers();
  localStorage.clear();
  sent = [];
  answers = [];
  vi.stubGlobal('fetch', (_: string, init: { body: string }) => {
    sent.push(JSON.parse(init.body) as Sent);
    return Promise.resolve(answers.shift()!());
  });
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

/** A page with this question; `leave` is what closing it does. */
function open(page: GivenQuestion) {
  const work = createQuestionWork(page);
  return { work, leave: work.start(), view: () => work.store.getState() };
}

describe('an answer on its way', () => {
  it('keeps its id through lost connections and a reload, until the server has it', async () => {
    answers = [offline, json({}, 503), offline, json({ attempt: 1, marking: RIGHT, done: true })];
    const first = open(given);
    first.work.submit(chosen('both'));
    await vi.advanceTimersByTimeAsync(0);
    expect(first.view().phase).toBe('waiting');
    await vi.advanceTimersByTimeAsync(1000);
    expect(first.view().phase).toBe('waiting');
    expect(countUnsentAnswers(ME)).toBe(1);
    first.leave();

    const second = open(given);
    await vi.advanceTimersByTimeAsync(0);
    expect(second.view()).toMatchObject({ phase: 'waiting', draft: chosen('both') });
    window.dispatchEvent(new Event('online'));
    await vi.advanceTimersByTimeAsync(0);
    expect(second.view()).toMatchObject({
      phase: 'open',
      done: true,
      marked: { attempt: 1, marking: RIGHT },
    });
    expect(sent).toHaveLength(4);
    expect(new Set(sent.map(({ opId }) => opId)).size).toBe(1);
    expect(countUnsentAnswers(ME)).toBe(0);
    second.leave();
  });

  it('may be changed while it waits; then another one counts', async () => {
    answers = [offline, json({ attempt: 1, marking: RIGHT, done: true })];
    const { work, view, leave } = open(given);
    work.submit(chosen('salt'));
    await vi.advanceTimersByTimeAsync(0);
    work.takeBack();
    work.submit(chosen('both'));
    await vi.advanceTimersByTimeAsync(60_000);
    expect(view().marked!.answer).toEqual(chosen('both'));
    expect(new Set(sent.map(({ opId }) => opId)).size).toBe(2);
    leave();
  });

  it('stays where its person was signed out, and goes when they are back', async () => {
    answers = [
      json({ status: 401, code: 'signed-in-otherwise', title: 'You are signed out here.' }, 401),
      json({ attempt: 1, marking: RIGHT, done: true }),
    ];
    const first = open(given);
    first.work.submit(chosen('both'));
    await vi.advanceTimersByTimeAsync(0);
    expect(first.view()).toMatchObject({ phase: 'open', word: 'You are signed out here.' });
    first.leave();
    const second = open(given);
    await vi.advanceTimersByTimeAsync(0);
    expect(second.view().done).toBe(true);
    expect(sent[0]!.opId).toBe(sent[1]!.opId);
    second.leave();
  });

  it('is let go where the server will never take it', async () => {
    answers = [json({ status: 422, code: 'no-such-answer', title: 'This question has changed.' }, 422)];
    const { work, view, leave } = open(given);
    work.submit(chosen('gone'));
    await vi.advanceTimersByTimeAsync(0);
    expect(view()).toMatchObject({ phase: 'open', word: 'This question has changed.' });
    expect(countUnsentAnswers(ME)).toBe(0);
    leave();
  });
});

describe('a visitor', () => {
  it('has their attempts counted here, and what is done stays done', async () => {
    answers = [
      json({ attempt: 1, marking: NOT_YET, done: false }),
      json({ attempt: 2, marking: { verdict: 'ask', feedback: 'Choose.', misconceptions: [] }, done: false }),
      json({ attempt: 2, marking: RIGHT, done: true }),
      json({ attempt: 3, marking: NOT_YET, done: false }),
    ];
    const first = open(visitor);
    for (const answer of [chosen('salt'), chosen(), chosen('both'), chosen('salt')]) {
      first.work.submit(answer);
      await vi.advanceTimersByTimeAsync(0);
    }
    expect(sent.map(({ attempt }) => attempt)).toEqual([1, 2, 2, 3]);
    first.leave();
    const second = open(visitor);
    expect(second.view()).toMatchObject({ done: true, marked: { attempt: 3, marking: NOT_YET } });
    second.leave();
    // Another revision may ask for something else; what was written stays.
    const revised = open({ ...visitor, revision: 2 });
    expect(revised.view()).toMatchObject({ done: true, marked: null, draft: chosen('salt') });
    revised.leave();
  });
});

describe('what was written before signing in', () => {
  it('is offered once, taken over where it is theirs, and forgotten where it is not', () => {
    for (const mine of [true, false]) {
      localStorage.clear();
      const before = open(visitor);
      before.work.edit(chosen('both'));
      before.leave();
      const { work, view, leave } = open(given);
      expect(view()).toMatchObject({ stranger: chosen('both'), draft: null });
      work.claim(mine);
      expect(view()).toMatchObject({ stranger: null, draft: mine ? chosen('both') : null });
      expect(localStorage.getItem(keyOf(null, 'two-beakers', 'which'))).toBeNull();
      leave();
    }
  });
  it('is not offered where the numbers were another’s', () => {
    const before = open(visitor);
    before.work.edit({ kind: 'numeric', typed: '4.76' });
    before.leave();
    const { view, leave } = open(given);
    expect(view().stranger).toBeNull();
    leave();
  });
});

describe('a draft', () => {
  it('gives way to a newer answer from elsewhere', () => {
    const first = open(given);
    first.work.edit(chosen('salt'));
    first.leave();
    const second = open({
      ...given,
      marked: { answer: chosen('both'), marking: RIGHT, attempt: 1 },
      done: true,
    });
    expect(second.view().draft).toEqual(chosen('both'));
    second.leave();
  });
  it('fits its question: ids that are gone fall away', () => {
    const options = [
      { id: 'a', text: 'A' },
      { id: 'b', text: 'B' },
    ];
    const choice = { id: 'q', ask: '', kind: 'choice', several: false, options } as const;
    expect(draftFor(choice, chosen('gone', 'b', 'a'))).toEqual(chosen('b'));
    const order = { id: 'q', ask: '', kind: 'order', items: options } as const;
    expect(draftFor(order, { kind: 'order', order: ['b', 'gone'] })).toEqual({
      kind: 'order',
      order: ['a', 'b'],
    });
    expect(draftFor(order, { kind: 'order', order: ['b', 'a'] })).toEqual({
      kind: 'order',
      order: ['b', 'a'],
    });
    const match = {
      id: 'q',
      ask: '',
      kind: 'match',
      lefts: options,
      rights: [{ id: 'r1', text: '' }],
    } as const;
    expect(draftFor(match, { kind: 'match', matched: { a: 'r1', b: 'r9', c: 'r1' } })).toEqual({
      kind: 'match',
      matched: { a: 'r1' },
    });
    expect(draftFor(choice, null)).toEqual(chosen());
  });
  it('moves an item and knows which of the misplaced still stand where they did', () => {
    expect(moved(['a', 'b', 'c'], 'c', 0)).toEqual(['c', 'a', 'b']);
    expect(moved(['a', 'b', 'c'], 'a', 9)).toEqual(['b', 'c', 'a']);
    const was: Answer = { kind: 'order', order: ['b', 'a', 'c'] };
    expect(stillMisplaced({ kind: 'order', order: ['a', 'b', 'c'] }, was, ['a', 'b'])).toEqual(new Set());
    expect(stillMisplaced({ kind: 'order', order: ['b', 'c', 'a'] }, was, ['a', 'b'])).toEqual(
      new Set(['b']),
    );
  });
});
