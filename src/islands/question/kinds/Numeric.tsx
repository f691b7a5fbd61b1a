import { useId } from 'react';
import type { Answer, Marking } from '../../../lessons/questions/types';
import { Html } from '../Html';
import type { SpecOf } from '../drafts';

interface Props {
  spec: SpecOf<'numeric'>;
  draft: Extract<Answer, { kind: 'numeric' }>;
  labelledBy: string;
  fixed: boolean;
  askedBack: Marking | null;
  onDraft: (draft: Answer) => void;
}

/** A number: as readers write it, with comma or point, with its unit or without. */
export function Numeric({ spec, draft, labelledBy, fixed, askedBack, onDraft }: Props) {
  const id = useId();
  return (
    <>
      {spec.example && (
        <div className="question-steps">
          <p className="question-label">Worked example</p>
          <Html html={spec.example.ask} />
          <Steps steps={spec.example.steps} />
          <p className="question-label question-turn">Now yours, with other numbers</p>
        </div>
      )}
      {spec.steps && (
        <div className="question-steps">
          <p className="question-label">It begins like this; the last step is yours</p>
          <Steps steps={spec.steps} />
        </div>
      )}
      <div className="question-number">
        <label htmlFor={id} className="sr-only">
          Your answer
        </label>
        <input
          id={id}
          className="field"
          name="answer"
          type="text"
          inputMode={spec.unit === '' ? 'decimal' : 'text'}
          autoComplete="off"
          autoCapitalize="off"
          spellCheck={false}
          maxLength={60}
          value={draft.typed}
          readOnly={fixed}
          aria-describedby={`${labelledBy} ${id}-hint ${id}-back`}
          aria-invalid={askedBack ? true : undefined}
          onChange={(event) => onDraft({ kind: 'numeric', typed: event.target.value })}
        />
        {spec.unit !== '' && <span className="question-unit">{spec.unit}</span>}
      </div>
      <p className="question-hint" id={`${id}-hint`}>
        {spec.hint}
      </p>
      <div id={`${id}-back`} role="alert">
        {askedBack && <Html as="p" className="fault" html={askedBack.feedback} />}
      </div>
    </>
  );
}

const Steps = ({ steps }: { steps: readonly string[] }) => (
  <ol>
    {steps.map((step, n) => (
      <Html as="li" key={n} html={step} />
    ))}
  </ol>
);
