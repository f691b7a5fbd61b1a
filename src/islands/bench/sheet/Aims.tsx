import { memo } from 'react';
import { useWords } from '../../words';
import { DoneIcon, OpenIcon, UnderWayIcon } from '../scene/icons';

export interface AimLook {
  readonly id: string;
  readonly text: string;
  readonly state: 'met' | 'checking' | 'next' | 'open';
  /** How it stands: 'now 4.67', 'done'. */
  readonly note: string;
}

const STATE_WORDS = {
  met: 'done',
  checking: 'being checked',
  next: 'under way',
  open: 'not started',
} as const;

export const Aims = memo(function Aims({ aims }: { aims: readonly AimLook[] }) {
  const words = useWords();
  return (
    <section className="part" aria-labelledby={undefined}>
      <h3>Aims</h3>
      <ul className="aims">
        {aims.map((aim) => (
          <li key={aim.id} className="aim" data-aim={aim.id} data-state={aim.state}>
            {aim.state === 'met' ? <DoneIcon /> : aim.state === 'open' ? <OpenIcon /> : <UnderWayIcon />}
            <span className="visually-hidden">{STATE_WORDS[aim.state]}: </span>
            <span className="aim-text">{aim.text}</span>
            <span className="aim-note">{words(aim.note)}</span>
          </li>
        ))}
      </ul>
    </section>
  );
});
