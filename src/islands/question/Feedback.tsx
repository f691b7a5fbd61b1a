import type { Marking, QuestionForLearner } from '../../lessons/questions/types';
import { DoneIcon } from '../bench/scene/icons';
import { Html } from './Html';
import { NoteIcon } from './icons';
import { Poured } from './Poured';

/** What was said to an answer: never right or wrong alone. Stands in a live region, so it is read as it comes. */
export function Feedback({ spec, marking }: { spec: QuestionForLearner; marking: Marking }) {
  const { verdict, feedback, poured, key, solution, misplaced } = marking;
  const right = verdict === 'right';
  return (
    <div className="question-feedback">
      <p className="question-verdict" tabIndex={-1}>
        {right ? <DoneIcon /> : <NoteIcon />}
        {headOf(spec, marking)}
      </p>
      {misplaced && misplaced.length > 0 && <p>{placesOf(spec, misplaced.length)}</p>}
      {poured ? (
        <div className="question-poured">
          <Poured {...poured} />
          <Html html={feedback} className="question-said" />
        </div>
      ) : (
        <Html html={feedback} className="question-said" />
      )}
      {key !== undefined && !right && (
        <div className="question-key">
          <p className="question-label">The answer</p>
          <Html html={key} className={`question-key-${spec.kind}`} />
        </div>
      )}
      {solution !== undefined && spec.kind === 'numeric' && (
        <div className="question-key">
          <p className="question-label">Worked out</p>
          <Html html={solution} />
        </div>
      )}
      {key !== undefined && !right && (
        <p className="question-hint">Follow it through, then give the answer once more yourself.</p>
      )}
    </div>
  );
}

function headOf(spec: QuestionForLearner, { verdict, poured }: Marking): string {
  if (verdict === 'right') return spec.kind === 'explain' ? 'Complete.' : 'Right.';
  if (verdict === 'compare') return 'Now compare.';
  return poured ? 'Not yet. We poured your answer.' : 'Not yet.';
}

function placesOf(spec: QuestionForLearner, misplaced: number): string {
  const all = spec.kind === 'order' ? spec.items.length : spec.kind === 'match' ? spec.lefts.length : 0;
  const good = all - misplaced;
  return good === 0
    ? 'None is in its place yet.'
    : `${good} of ${all} ${good === 1 ? 'is' : 'are'} in place.`;
}
