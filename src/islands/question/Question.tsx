import { useEffect, useRef, useState, type FormEvent } from 'react';
import { useStore } from 'zustand';
import { USUAL, type Conventions } from '../../lessons/conventions';
import type { Answer, QuestionForLearner } from '../../lessons/questions/types';
import '../bench/bench.css';
import { useLiveRegion } from '../bench/words/LiveRegion';
import { ReaderProvider } from '../words';
import { draftFor, stillMisplaced, typedBefore } from './drafts';
import { Feedback } from './Feedback';
import { Html } from './Html';
import { Choice } from './kinds/Choice';
import { Explain } from './kinds/Explain';
import { Match } from './kinds/Match';
import { Numeric } from './kinds/Numeric';
import { Order } from './kinds/Order';
import './question.css';
import { createQuestionWork, type GivenQuestion } from './work';

const KIND: Record<QuestionForLearner['kind'], string> = {
  choice: 'Question',
  numeric: 'Work it out',
  order: 'Put in order',
  match: 'Find partners',
  explain: 'In your words',
};

interface Props {
  readonly spec: QuestionForLearner;
  readonly given: GivenQuestion;
  readonly conventions?: Conventions | undefined;
}

/** A question: answered here, marked by the server, and never answered with right or wrong alone. */
export function Question({ conventions = USUAL, ...props }: Props) {
  return (
    <ReaderProvider value={conventions}>
      <Card {...props} />
    </ReaderProvider>
  );
}

function Card({ spec, given }: Omit<Props, 'conventions'>) {
  // Read while the server's form still stands: its fields are about to be taken over.
  const [before] = useState(() => (given.marked ? null : typedBefore(spec)));
  const [work] = useState(() => createQuestionWork(given));
  const view = useStore(work.store);
  const [say, live] = useLiveRegion();
  useEffect(() => {
    const stop = work.start();
    if (before) work.edit(before);
    return stop;
  }, [work, before]);
  const { marked, askedBack, phase, word } = view;
  const draft = draftFor(spec, view.draft);
  const answered = marked?.marking.verdict === 'right';
  const fixed = answered || phase !== 'open';
  // The button goes with the right answer, and with it the focus of whoever pressed it: on to what was said.
  const card = useRef<HTMLElement>(null);
  const wasAnswered = useRef(answered);
  useEffect(() => {
    if (answered && !wasAnswered.current && document.activeElement === document.body)
      card.current?.querySelector<HTMLElement>('.question-verdict')?.focus({ preventScroll: true });
    wasAnswered.current = answered;
  }, [answered]);
  const ask = `${spec.id}-ask`;
  const onDraft = (next: Answer) => work.edit(next);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (!fixed) work.submit(draft);
  };
  const misplaced =
    draft.kind === 'order' || draft.kind === 'match'
      ? stillMisplaced(draft, marked?.answer, marked?.marking.misplaced ?? [])
      : new Set<string>();
  return (
    <section
      ref={card}
      className="question porcelain"
      id={spec.id}
      aria-labelledby={`${spec.id}-kind ${ask}`}
    >
      <p className="tape tape-ink question-kind" id={`${spec.id}-kind`}>
        {KIND[spec.kind]}
      </p>
      {view.stranger && (
        <div className="question-stranger" role="group" aria-label="Is this yours?">
          <p>This question was answered in this browser before you signed in. Is it yours?</p>
          <p className="question-row">
            <button type="button" className="action" onClick={() => work.claim(true)}>
              It is mine
            </button>
            <button type="button" className="action" onClick={() => work.claim(false)}>
              It is not
            </button>
          </p>
        </div>
      )}
      <form onSubmit={submit} noValidate>
        <Html html={spec.ask} className="question-ask" id={ask} />
        {spec.kind === 'choice' && draft.kind === 'choice' && (
          <Choice {...{ spec, draft, fixed, onDraft }} labelledBy={ask} />
        )}
        {spec.kind === 'numeric' && draft.kind === 'numeric' && (
          <Numeric {...{ spec, draft, fixed, askedBack, onDraft }} labelledBy={ask} />
        )}
        {spec.kind === 'order' && draft.kind === 'order' && (
          <Order {...{ spec, draft, fixed, misplaced, onDraft, say }} labelledBy={ask} />
        )}
        {spec.kind === 'match' && draft.kind === 'match' && (
          <Match {...{ spec, draft, fixed, misplaced, onDraft }} />
        )}
        {spec.kind === 'explain' && draft.kind === 'explain' && (
          <Explain
            {...{ draft, fixed, askedBack, onDraft }}
            labelledBy={ask}
            marking={marked?.marking ?? null}
          />
        )}
        <div role="alert">
          {word && <p className="fault">{word}</p>}
          {askedBack && spec.kind !== 'numeric' && spec.kind !== 'explain' && (
            <Html as="p" className="fault" html={askedBack.feedback} />
          )}
        </div>
        {!answered && (
          <p className="question-row">
            <button type="submit" className="action action-main" aria-disabled={fixed || undefined}>
              {phase === 'sending' ? 'Checking' : buttonOf(spec, marked !== null)}
            </button>
            {phase === 'waiting' && (
              <>
                <span role="status">Not connected. Your answer is kept here and sent when you are.</span>
                <button type="button" className="action" onClick={() => work.takeBack()}>
                  Change it
                </button>
              </>
            )}
          </p>
        )}
      </form>
      <div role="status" className="question-word">
        {marked && <Feedback key={marked.attempt} spec={spec} marking={marked.marking} />}
      </div>
      {view.done && !answered && <p className="question-hint">This question counts as done.</p>}
      {live}
    </section>
  );
}

function buttonOf(spec: QuestionForLearner, again: boolean): string {
  if (spec.kind === 'explain') return again ? 'This is what mine says' : 'Show me a good answer';
  return again ? 'Check again' : 'Check';
}

export default Question;
