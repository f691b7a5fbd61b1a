import { useEffect, useRef, useState } from 'react';
import { CloseIcon, UndoIcon } from '../scene/icons';

export interface ToastWords {
  /** A new number shows the toast anew. */
  readonly n: number;
  readonly text: string;
  readonly action?: { readonly label: string; readonly onDo: () => void };
}

const SHOWN_MS = 6000;

/** Says what was taken back. Goes by itself after six seconds, but not from under a pointer or the focus. */
export function Toast({ toast, onGone }: { toast: ToastWords | null; onGone: () => void }) {
  const [kept, setKept] = useState(false);
  const gone = useRef(onGone);
  useEffect(() => {
    gone.current = onGone;
  }, [onGone]);
  useEffect(() => {
    if (toast === null || kept) return;
    const timer = window.setTimeout(() => gone.current(), SHOWN_MS);
    return () => window.clearTimeout(timer);
  }, [toast, kept]);
  if (toast === null) return null;
  return (
    <div
      className="toast"
      onMouseEnter={() => setKept(true)}
      onMouseLeave={() => setKept(false)}
      onFocus={() => setKept(true)}
      onBlur={() => setKept(false)}
    >
      <UndoIcon />
      <span className="toast-words">{toast.text}</span>
      {toast.action && (
        <button
          type="button"
          className="button"
          onClick={() => {
            setKept(false);
            toast.action!.onDo();
          }}
        >
          {toast.action.label}
        </button>
      )}
      <button
        type="button"
        className="button button-icon"
        aria-label="Close"
        onClick={() => {
          setKept(false);
          onGone();
        }}
      >
        <CloseIcon />
      </button>
    </div>
  );
}
