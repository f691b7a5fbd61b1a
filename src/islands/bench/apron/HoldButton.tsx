import { useRef, type KeyboardEvent, type MouseEvent, type PointerEvent } from 'react';
import { DropIcon } from '../scene/icons';
import { useWords } from '../../words';
import { formatMl } from '../scene/looks';

interface Props {
  off: boolean;
  /** What has flowed so far, while this button is held. */
  running_uL: number | null;
  onStart: (by: 'pointer' | 'keys') => void;
  onEnd: () => void;
  onInterrupt: () => void;
  onCancel: () => void;
}

/**
 * Pours as long as it is held: by pointer, by Space or by Enter. A press that comes without either (a switch, a screen
 * reader's own click) starts the pour, and the next one ends it.
 */
export function HoldButton({ off, running_uL, onStart, onEnd, onInterrupt, onCancel }: Props) {
  const words = useWords();
  const held = useRef<'no' | 'pointer' | 'key' | 'switch'>('no');

  const end = (how: () => void) => {
    if (held.current === 'no') return;
    held.current = 'no';
    how();
  };

  const onPointerDown = (event: PointerEvent<HTMLButtonElement>) => {
    if (off || event.button !== 0 || held.current !== 'no') return;
    event.currentTarget.setPointerCapture(event.pointerId);
    held.current = 'pointer';
    onStart('pointer');
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'Escape' && held.current !== 'no') {
      event.preventDefault();
      end(onCancel);
      return;
    }
    if (event.key !== ' ' && event.key !== 'Enter') return;
    event.preventDefault();
    if (off || event.repeat || held.current !== 'no') return;
    held.current = 'key';
    onStart('keys');
  };
  const onKeyUp = (event: KeyboardEvent) => {
    if (event.key !== ' ' && event.key !== 'Enter') return;
    event.preventDefault();
    if (held.current === 'key') end(onEnd);
  };
  const onClick = (event: MouseEvent) => {
    // Pointer and keys have been handled; `detail` is 0 only for a click that neither of them made.
    if (off || event.detail !== 0) return;
    if (held.current === 'switch') end(onEnd);
    else if (held.current === 'no') {
      held.current = 'switch';
      onStart('keys');
    }
  };

  return (
    <button
      type="button"
      className="button button-main hold touch-none"
      aria-disabled={off || undefined}
      data-held={running_uL !== null || undefined}
      onPointerDown={onPointerDown}
      onPointerUp={() => held.current === 'pointer' && end(onEnd)}
      onPointerCancel={() => end(onInterrupt)}
      onLostPointerCapture={() => held.current === 'pointer' && end(onInterrupt)}
      onKeyDown={onKeyDown}
      onKeyUp={onKeyUp}
      onClick={onClick}
      onBlur={() => end(onInterrupt)}
      onContextMenu={(event) => event.preventDefault()}
    >
      <DropIcon />
      <span className="hold-words" aria-hidden={running_uL !== null || undefined}>
        {running_uL === null ? 'Hold to pour' : words(formatMl(running_uL))}
      </span>
      {running_uL !== null && <span className="visually-hidden">Pouring. Let go to stop</span>}
    </button>
  );
}
