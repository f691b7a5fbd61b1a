import { useState } from 'react';
import { useStore } from 'zustand';
import { USUAL, wordsIn, type Conventions } from '../../lessons/conventions';
import type { PredictionForLearner } from '../../lessons/types';
import { workFor, type GivenWork, type Work } from '../bench/sync/work';
import './prediction.css';

interface Props {
  readonly spec: PredictionForLearner;
  readonly given: GivenWork;
  readonly conventions?: Conventions;
}

const SURE = [
  [1, 'a guess'],
  [2, 'not sure'],
  [3, 'fairly sure'],
  [4, 'certain'],
] as const;

/**
 * A prediction: locked in before the bench opens; after the pour the learner first says what they saw, and only then
 * stand prediction, observation and computed result side by side.
 */
export function Prediction({ spec, given, conventions = USUAL }: Props) {
  const [work] = useState(() => workFor(given));
  const { prediction, observed, outcome, moved, ready, word } = useStore(work.store);
  return (
    <section className="prediction porcelain" aria-labelledby={`${spec.id}-title`} id={spec.id}>
      <p className="tape tape-ink prediction-kind" id={`${spec.id}-title`}>
        Prediction
      </p>
      <p className="prediction-ask">{spec.ask}</p>
      {prediction === null ? (
        <Lock spec={spec} work={work} ready={ready} />
      ) : (
        <>
          <Answer
            label="You predicted"
            text={textOf(spec, prediction.answer)}
            note={sureWords(prediction.confidence)}
          />
          {observed === null ? (
            <Observe spec={spec} work={work} moved={moved} word={word} />
          ) : (
            <Compare
              spec={spec}
              observed={observed}
              outcome={outcome && { ...outcome, sentence: wordsIn(outcome.sentence, conventions) }}
              predicted={prediction.answer}
              word={word}
            />
          )}
        </>
      )}
    </section>
  );
}

const textOf = (spec: PredictionForLearner, id: string) =>
  spec.options.find((option) => option.id === id)?.text ?? id;
const sureWords = (confidence: number) => SURE.find(([n]) => n === confidence)?.[1] ?? '';

function Answer({ label, text, note }: { label: string; text: string; note?: string }) {
  return (
    <div className="prediction-answer">
      <p className="prediction-label">{label}</p>
      <p>
        <strong>{text}</strong>
        {note && <span className="prediction-note"> ({note})</span>}
      </p>
    </div>
  );
}

/**
 * The browser itself keeps what is chosen, and the form is read when it is sent: a choice made before the page has come
 * alive counts, too.
 */
function Options({ spec }: { spec: PredictionForLearner }) {
  return spec.options.map((option) => (
    <label key={option.id} className="prediction-option">
      <input type="radio" name="answer" value={option.id} />
      <span>{option.text}</span>
    </label>
  ));
}

const chosenIn = (form: HTMLFormElement, name: string): string => String(new FormData(form).get(name) ?? '');

function Lock({ spec, work, ready }: { spec: PredictionForLearner; work: Work; ready: boolean }) {
  const [missing, setMissing] = useState<string | null>(null);
  return (
    <form
      noValidate
      onChange={() => setMissing(null)}
      onSubmit={(event) => {
        event.preventDefault();
        const answer = chosenIn(event.currentTarget, 'answer');
        const sure = Number(chosenIn(event.currentTarget, 'sure'));
        if (!answer) setMissing('Choose one answer first.');
        else if (!sure) setMissing('Say how sure you are.');
        else work.lock(answer, sure);
      }}
    >
      <fieldset>
        <legend className="sr-only">{spec.ask}</legend>
        <Options spec={spec} />
      </fieldset>
      <fieldset className="prediction-sure">
        <legend>How sure are you?</legend>
        {SURE.map(([n, words]) => (
          <label key={n} className="prediction-option prediction-small">
            <input type="radio" name="sure" value={n} />
            <span>{words}</span>
          </label>
        ))}
      </fieldset>
      <p role="alert" className="fault">
        {missing}
      </p>
      <p className="prediction-row">
        <button type="submit" className="action action-main" disabled={!ready}>
          Lock in my prediction
        </button>
        <span className="hint">Then the bench opens. A locked prediction stays as it is.</span>
      </p>
    </form>
  );
}

function Observe({
  spec,
  work,
  moved,
  word,
}: {
  spec: PredictionForLearner;
  work: Work;
  moved: boolean;
  word: string | null;
}) {
  const [missing, setMissing] = useState(false);
  if (!moved)
    return (
      <p className="prediction-next">
        Locked in. Now try it on the bench below, then come back and say what you saw.
      </p>
    );
  return (
    <form
      noValidate
      onChange={() => setMissing(false)}
      onSubmit={(event) => {
        event.preventDefault();
        const answer = chosenIn(event.currentTarget, 'answer');
        if (answer) work.observe(answer);
        else setMissing(true);
      }}
    >
      <fieldset>
        <legend className="prediction-observe">{spec.observe}</legend>
        <Options spec={spec} />
      </fieldset>
      <p role="alert" className="fault">
        {missing ? 'Choose what you saw.' : word}
      </p>
      <p className="prediction-row">
        <button type="submit" className="action action-main">
          This is what I saw
        </button>
        <span className="hint">Finish your pour first: what you saw cannot be changed later.</span>
      </p>
    </form>
  );
}

function Compare({
  spec,
  observed,
  outcome,
  predicted,
  word,
}: {
  spec: PredictionForLearner;
  observed: string;
  outcome: { right: string; sentence: string } | null;
  predicted: string;
  word: string | null;
}) {
  return (
    <div role="status">
      <Answer label="You saw" text={textOf(spec, observed)} />
      {outcome ? (
        <>
          <Answer
            label="Computed"
            text={textOf(spec, outcome.right)}
            note={outcome.sentence.replace(/\.$/, '')}
          />
          <p className="prediction-next">
            {predicted === outcome.right
              ? 'Your prediction and the solutions agree. Read on to see why.'
              : 'Your prediction and the solutions do not agree. That is what a prediction is for: read on to see why.'}
            {observed !== outcome.right &&
              ' What you saw differs from what was computed. Start the bench again and count once more.'}
          </p>
        </>
      ) : (
        <p className="prediction-next">{word ?? 'Working it out'}</p>
      )}
    </div>
  );
}

export default Prediction;
