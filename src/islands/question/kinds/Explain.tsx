import { useId } from 'react';
import type { Answer, Marking } from '../../../lessons/questions/types';
import { Html } from '../Html';

interface Props {
  draft: Extract<Answer, { kind: 'explain' }>;
  labelledBy: string;
  fixed: boolean;
  /** With a model answer to compare with, once a text of one's own was given. */
  marking: Marking | null;
  askedBack: Marking | null;
  onDraft: (draft: Answer) => void;
}

const MOST = 4000;

/** Words of one's own first; then the model answer, and the learner says which of its points theirs makes. */
export function Explain({ draft, labelledBy, fixed, marking, askedBack, onDraft }: Props) {
  const id = useId();
  const points = new Set(draft.points ?? []);
  const tick = (n: number) => {
    if (fixed) return;
    if (points.has(n)) points.delete(n);
    else points.add(n);
    onDraft({ ...draft, points: [...points].sort((a, b) => a - b) });
  };
  return (
    <>
      <label htmlFor={id} className="sr-only">
        Your answer
      </label>
      <textarea
        id={id}
        name="answer"
        className="field question-text"
        rows={4}
        maxLength={MOST}
        value={draft.text}
        readOnly={fixed}
        aria-describedby={`${labelledBy} ${id}-back`}
        aria-invalid={askedBack ? true : undefined}
        onChange={(event) => onDraft({ ...draft, text: event.target.value })}
      />
      <div id={`${id}-back`} role="alert">
        {askedBack && <Html as="p" className="fault" html={askedBack.feedback} />}
      </div>
      {marking?.solution && (
        <div className="question-model">
          <p className="question-label">One good answer</p>
          <Html html={marking.solution} />
        </div>
      )}
      {marking?.points && (
        <fieldset className="question-points">
          <legend>What does yours say? Tick honestly: you may add to your answer first.</legend>
          {marking.points.map((point, n) => (
            <label
              key={n}
              className="question-option"
              data-chosen={points.has(n) || undefined}
              data-fixed={fixed || undefined}
            >
              <input
                type="checkbox"
                checked={points.has(n)}
                aria-disabled={fixed || undefined}
                onChange={() => tick(n)}
              />
              <Html as="span" html={point} />
            </label>
          ))}
        </fieldset>
      )}
    </>
  );
}
