import { useId, useState, type KeyboardEvent } from 'react';
import { DROP_UL, formatVolume, nextDown, nextUp, nudge, parseVolume } from '../hand/volume';
import { useWords } from '../../words';
import { WarnIcon } from '../scene/icons';

interface Props {
  volume_uL: number;
  /** What the bottle still holds and the vessel still takes, µL; 0 when nothing fits. */
  most_uL: number;
  /** Why no more than that: 'Only 45.00 mL fits.' */
  limit: string;
  onChange: (volume_uL: number) => void;
  onAdd: (volume_uL: number) => void;
}

/** An exact volume, typed or stepped, and the button that adds it. */
export function VolumeField({ volume_uL, most_uL, limit, onChange, onAdd }: Props) {
  const id = useId();
  const words = useWords();
  const [draft, setDraft] = useState<string | null>(null);
  const parsed = draft === null ? ({ ok: true, volume_uL } as const) : parseVolume(draft);
  const tooMuch = parsed.ok && parsed.volume_uL > most_uL;
  const error = !parsed.ok ? parsed.sentence : tooMuch ? limit : null;

  const set = (next: number) => {
    setDraft(null);
    onChange(next);
  };
  const current = parsed.ok ? parsed.volume_uL : volume_uL;
  const ceiling = Math.max(DROP_UL, most_uL);

  const settle = () => {
    if (draft !== null && parsed.ok) set(parsed.volume_uL);
  };
  const add = () => {
    if (error !== null || most_uL < 1) return;
    settle();
    onAdd(current);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const steps: Record<string, number> = {
      ArrowUp: nudge(current, DROP_UL, ceiling),
      ArrowDown: nudge(current, -DROP_UL, ceiling),
      PageUp: nextUp(current, ceiling),
      PageDown: nextDown(current),
    };
    const next = steps[event.key];
    if (next !== undefined) {
      event.preventDefault();
      set(next);
    } else if (event.key === 'Enter') {
      event.preventDefault();
      add();
    } else if (event.key === 'Escape' && draft !== null) {
      event.stopPropagation();
      setDraft(null);
    }
  };

  return (
    <div className="volume">
      <div className="volume-row">
        <div className="stepper" data-wrong={error !== null || undefined}>
          <button
            type="button"
            className="stepper-button"
            aria-label="Less"
            onClick={() => set(nextDown(current))}
          >
            −
          </button>
          <label className="stepper-field">
            <span className="visually-hidden">{words('Volume in mL')}</span>
            <input
              id={id}
              type="text"
              inputMode="decimal"
              autoComplete="off"
              enterKeyHint="go"
              value={draft ?? words(formatVolume(volume_uL))}
              aria-invalid={error !== null}
              aria-describedby={`${id}-note`}
              onChange={(event) => setDraft(event.target.value)}
              onBlur={settle}
              onFocus={(event) => event.target.select()}
              onKeyDown={onKeyDown}
            />
            <span className="stepper-unit" aria-hidden="true">
              {words('mL')}
            </span>
          </label>
          <button
            type="button"
            className="stepper-button"
            aria-label="More"
            onClick={() => set(nextUp(current, ceiling))}
          >
            +
          </button>
        </div>
        <button
          type="button"
          className="button button-second add"
          aria-disabled={error !== null || most_uL < 1 || undefined}
          onClick={add}
        >
          Add
        </button>
      </div>
      <p className={error === null ? 'under' : 'under under-wrong'} id={`${id}-note`}>
        {error === null ? (
          'type or step an exact volume'
        ) : (
          <>
            <WarnIcon /> {words(error)}
          </>
        )}
      </p>
    </div>
  );
}
