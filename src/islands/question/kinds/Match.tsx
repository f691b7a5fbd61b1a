import { useId } from 'react';
import type { Answer } from '../../../lessons/questions/types';
import type { SpecOf } from '../drafts';
import { Html } from '../Html';

interface Props {
  spec: SpecOf<'match'>;
  draft: Extract<Answer, { kind: 'match' }>;
  fixed: boolean;
  misplaced: ReadonlySet<string>;
  onDraft: (draft: Answer) => void;
}

const LETTERS = 'ABCDEFGHIJKL';

/** Partners: each line on the left takes a letter of the list. Radio buttons, so that touch and keys do it alike. */
export function Match({ spec, draft, fixed, misplaced, onDraft }: Props) {
  const name = useId();
  return (
    <div className="question-match">
      <ul className="question-rights" aria-label="To choose from">
        {spec.rights.map((right, n) => (
          <li key={right.id}>
            <span className="question-letter">{LETTERS[n]}</span>
            <Html as="span" html={right.text} />
          </li>
        ))}
      </ul>
      {spec.lefts.map((left) => (
        <div
          key={left.id}
          className="question-left"
          role="radiogroup"
          aria-labelledby={`${name}-${left.id}`}
          data-misplaced={misplaced.has(left.id) || undefined}
        >
          <span id={`${name}-${left.id}`} className="question-left-text">
            <Html as="span" html={left.text} />
            {misplaced.has(left.id) && <span className="question-mark">another partner</span>}
          </span>
          <span className="question-letters">
            {spec.rights.map((right, n) => (
              <label
                key={right.id}
                className="question-letter-option"
                data-chosen={draft.matched[left.id] === right.id || undefined}
                data-fixed={fixed || undefined}
              >
                <input
                  type="radio"
                  name={`answer-${left.id}`}
                  value={right.id}
                  checked={draft.matched[left.id] === right.id}
                  aria-disabled={fixed || undefined}
                  onChange={() => {
                    if (!fixed)
                      onDraft({ kind: 'match', matched: { ...draft.matched, [left.id]: right.id } });
                  }}
                />
                {LETTERS[n]}
              </label>
            ))}
          </span>
        </div>
      ))}
    </div>
  );
}
