import { memo, useState } from 'react';
import { useWords } from '../../words';

export interface NoteLook {
  readonly key: string;
  readonly n: number;
  readonly vessel: string;
  readonly what: string;
  /** '1.00', '3 drops', or '' for a move without a volume. */
  readonly added: string;
  /** pH as shown then, '?' where it was hidden, '' without a probe. */
  readonly ph: string;
  readonly hex: string;
  readonly words: string;
  /** Taken back, or before a fresh start. */
  readonly struck: boolean;
}

const SHOWN_FIRST = 12;

/** Every move with what could be read after it. The newest line is last; long runs show their end first. */
export const NotebookTable = memo(function NotebookTable({
  notes,
  moved,
}: {
  notes: readonly NoteLook[];
  moved: boolean;
}) {
  const words = useWords();
  const [all, setAll] = useState(false);
  const hiddenCount = all ? 0 : Math.max(0, notes.length - SHOWN_FIRST);
  const shown = notes.slice(hiddenCount);
  const last = notes.filter((note) => !note.struck).at(-1)?.n;
  return (
    <section className="part">
      <h3>Notebook</h3>
      {hiddenCount > 0 && (
        <button type="button" className="button button-quiet earlier" onClick={() => setAll(true)}>
          Show {hiddenCount} earlier {hiddenCount === 1 ? 'line' : 'lines'}
        </button>
      )}
      <table className="notebook">
        <thead>
          <tr>
            <th scope="col" className="wide-only">
              <span className="visually-hidden">Move</span>
            </th>
            <th scope="col">Vessel</th>
            <th scope="col" className="wide-only">
              What
            </th>
            <th scope="col" className="number">
              {words('Added, mL')}
            </th>
            <th scope="col" className="number">
              pH
            </th>
            <th scope="col">Colour</th>
          </tr>
        </thead>
        <tbody>
          {shown.map((note) => (
            <tr
              key={note.key}
              data-struck={note.struck || undefined}
              data-last={(moved && note.n === last && !note.struck) || undefined}
            >
              <td className="wide-only line-number">{note.n === 0 ? '' : note.n}</td>
              <th scope="row">{note.vessel}</th>
              <td className="wide-only">
                {note.struck ? <s>{words(note.what)}</s> : words(note.what)}
                {note.struck && <span className="struck-word"> taken back</span>}
              </td>
              <td className="number">{note.struck ? <s>{words(note.added)}</s> : words(note.added)}</td>
              <td className="number">{note.struck ? '' : words(note.ph)}</td>
              <td>
                {!note.struck && note.words !== '' && (
                  <span className="with-chip">
                    <span className="chip chip-small" style={{ background: note.hex }} />
                    {note.words}
                  </span>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {!moved && (
        <p className="empty">
          <strong>No moves yet.</strong> Pour something and it will be written here.
        </p>
      )}
    </section>
  );
});
