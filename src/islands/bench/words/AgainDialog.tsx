import { useEffect, useId, useRef } from 'react';

interface Props {
  open: boolean;
  moves: number;
  onKeep: () => void;
  onAgain: () => void;
}

/** Asks before the vessels go back to how they stood. Nothing is lost: the notebook keeps every line. */
export function AgainDialog({ open, moves, onKeep, onAgain }: Props) {
  const ref = useRef<HTMLDialogElement>(null);
  const id = useId();
  useEffect(() => {
    const dialog = ref.current;
    if (!dialog) return;
    if (open && !dialog.open) dialog.showModal();
    if (!open && dialog.open) dialog.close();
  }, [open]);
  return (
    <dialog ref={ref} className="dialog" aria-labelledby={`${id}-title`} onClose={onKeep}>
      <h2 id={`${id}-title`}>Start this bench again?</h2>
      <p>
        {moves === 1 ? 'Your move stays' : `Your ${moves} moves stay`} in the notebook. The vessels go back to
        how they stood.
      </p>
      <div className="dialog-buttons">
        <button type="button" className="button button-quiet" onClick={onKeep}>
          Keep going
        </button>
        <button type="button" className="button button-main" onClick={onAgain}>
          Start again
        </button>
      </div>
    </dialog>
  );
}
