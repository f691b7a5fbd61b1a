import type { Saving } from '../run';
import type { Work } from './work';

interface Props {
  readonly work: Work;
  readonly strangers: boolean;
  readonly saving: Saving;
  readonly word: string | null;
}

/** What only the person can answer: whose work this is, and which of two lists goes on. Nothing is lost either way. */
export function WorkQuestions({ work, strangers, saving, word }: Props) {
  if (strangers)
    return (
      <Question title="Is this your work?">
        <p>This browser holds work on this bench from before you signed in.</p>
        <Choices>
          <button type="button" className="action action-main" onClick={() => void work.claim(true)}>
            Yes, take it over
          </button>
          <button type="button" className="action" onClick={() => void work.claim(false)}>
            No, clear it
          </button>
        </Choices>
      </Question>
    );
  if (saving === 'conflict')
    return (
      <Question title="This bench was worked on somewhere else, too">
        <p>Both lists are kept in your notebook. Which one do you want on this bench?</p>
        <Choices>
          <button type="button" className="action action-main" onClick={() => void work.resolve('mine')}>
            What I see here
          </button>
          <button type="button" className="action" onClick={() => void work.resolve('theirs')}>
            What was done elsewhere
          </button>
        </Choices>
        {word && <p role="status">{word}</p>}
      </Question>
    );
  if (saving === 'full')
    return (
      <Question title="This run is full">
        <p>A run holds 2,000 moves. It stays in your notebook; a new one begins with the bench as it was.</p>
        <Choices>
          <button type="button" className="action action-main" onClick={() => work.beginAnew()}>
            Begin a new run
          </button>
        </Choices>
      </Question>
    );
  return null;
}

function Question({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <section className="work-question porcelain" role="alert" aria-label={title}>
      <h3>{title}</h3>
      {children}
    </section>
  );
}

const Choices = ({ children }: { children: React.ReactNode }) => <p className="work-choices">{children}</p>;
