import type { Answer } from '../../../lessons/questions/types';
import type { SpecOf } from '../drafts';
import { Html } from '../Html';

interface Props {
  spec: SpecOf<'choice'>;
  draft: Extract<Answer, { kind: 'choice' }>;
  labelledBy: string;
  fixed: boolean;
  onDraft: (draft: Answer) => void;
}

/** One answer of several, or as many as are right. */
export function Choice({ spec, draft, labelledBy, fixed, onDraft }: Props) {
  const toggle = (id: string) => {
    if (fixed) return;
    const chosen = spec.several
      ? spec.options
          .map((option) => option.id)
          .filter((one) => (one === id ? !draft.chosen.includes(id) : draft.chosen.includes(one)))
      : [id];
    onDraft({ kind: 'choice', chosen });
  };
  return (
    <div
      className="question-options"
      role={spec.several ? 'group' : 'radiogroup'}
      aria-labelledby={labelledBy}
    >
      {spec.several && <p className="question-hint">More than one answer is right.</p>}
      {spec.options.map((option) => {
        const chosen = draft.chosen.includes(option.id);
        return (
          <label
            key={option.id}
            className="question-option"
            data-chosen={chosen || undefined}
            data-fixed={fixed || undefined}
          >
            <input
              type={spec.several ? 'checkbox' : 'radio'}
              name="answer"
              value={option.id}
              checked={chosen}
              aria-disabled={fixed || undefined}
              onChange={() => toggle(option.id)}
            />
            <Html as="span" html={option.text} />
          </label>
        );
      })}
    </div>
  );
}
