import { useWords } from '../../words';
import type { VesselLook } from './looks';

/** A reading tag: pH large, then the colour as a chip and a word. It hangs from its glass by a leader line. */
export function Tag({
  vessel,
  side,
  settling,
}: {
  vessel: VesselLook;
  side: 'left' | 'right' | 'under';
  settling: boolean;
}) {
  const words = useWords();
  if (vessel.level_mm === null && vessel.ph.kind === 'none') {
    return (
      <div className="tag" data-side={side}>
        <p className="tag-quiet">empty</p>
      </div>
    );
  }
  return (
    <div className="tag" data-side={side}>
      {vessel.ph.kind !== 'none' && (
        <p className="tag-ph">
          <span className="tag-unit">pH</span>
          <span className="tag-value" data-settling={settling || undefined}>
            {vessel.ph.kind === 'value' ? vessel.ph.text : '?'}
          </span>
        </p>
      )}
      {vessel.ph.kind === 'hidden' && <p className="tag-quiet">{vessel.ph.sentence}</p>}
      {vessel.words !== '' && (
        <p className="tag-colour">
          <span className="chip" style={{ background: vessel.hex }} />
          {vessel.words}
        </p>
      )}
      {!vessel.mixed && <p className="tag-quiet">not mixed</p>}
      {vessel.doubt && vessel.mixed && <p className="tag-quiet">{vessel.doubt}</p>}
      {/* The turning bar says it; where nothing may move, words do. */}
      {vessel.stirring && <p className="tag-quiet still-words">stirring</p>}
      {side !== 'under' && <span className="leader" aria-hidden="true" />}
      {vessel.temperature_C !== null && (
        <p className="tag-quiet">{words(vessel.temperature_C.toFixed(1))} °C</p>
      )}
    </div>
  );
}
