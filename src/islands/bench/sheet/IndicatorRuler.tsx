import { memo } from 'react';
import { useWidth } from './useWidth';

export interface RulerLook {
  readonly indicator: string;
  /** Computed colours from pH 0 to 14, evenly spaced. */
  readonly cells: readonly string[];
  readonly markers: readonly { readonly id: string; readonly name: string; readonly pH: number }[];
  readonly sentence: string;
}

/** A pH scale painted with an indicator's computed colours, with a tape where each vessel stands. */
export const IndicatorRuler = memo(function IndicatorRuler({ ruler }: { ruler: RulerLook | null }) {
  const [ref, width] = useWidth<HTMLDivElement>(372);
  return (
    <section className="part">
      <h3>Indicator ruler {ruler && <span className="h3-note">{ruler.indicator.toLowerCase()}</span>}</h3>
      <div ref={ref}>
        {ruler ? (
          <Ruler ruler={ruler} width={width} />
        ) : (
          <p className="empty">No indicator stands in a vessel yet.</p>
        )}
      </div>
      {ruler && <p className="says">{ruler.sentence}</p>}
    </section>
  );
});

function Ruler({ ruler, width }: { ruler: RulerLook; width: number }) {
  const from = 12;
  const to = width - 12;
  const x = (pH: number): number => from + (Math.min(14, Math.max(0, pH)) / 14) * (to - from);
  const tags = place(ruler.markers, x, width);
  const lanes = Math.max(1, ...tags.map((tag) => tag.lane + 1));
  const top = 8 + lanes * 32;
  const cell = (to - from) / ruler.cells.length;
  return (
    <svg className="figure" width={width} height={top + 66} role="img" aria-label={ruler.sentence}>
      {ruler.cells.map((hex, i) => (
        <rect key={i} x={from + i * cell} y={top} width={cell + 0.6} height={34} fill={hex} />
      ))}
      <rect className="figure-frame" x={from} y={top} width={to - from} height={34} />
      {Array.from({ length: 29 }, (_, i) => i / 2).map((pH) => (
        <line
          key={pH}
          className="figure-tick"
          x1={x(pH)}
          x2={x(pH)}
          y1={top + 34}
          y2={top + (pH % 1 === 0 ? 43 : 39)}
        />
      ))}
      {Array.from({ length: 15 }, (_, i) => i)
        .filter((pH) => width > 480 || pH % 2 === 0)
        .map((pH) => (
          <text key={pH} className="figure-number" x={x(pH)} y={top + 59} textAnchor="middle">
            {pH}
          </text>
        ))}
      {tags.map((tag) => (
        <g key={tag.id}>
          <line className="ruler-now" x1={tag.at} x2={tag.at} y1={4 + tag.lane * 32 + 26} y2={top + 34} />
          <path
            className="ruler-tape"
            d={`M ${tag.left} ${4 + tag.lane * 32} H ${tag.left + tag.wide - 9} L ${tag.left + tag.wide} ${13 + tag.lane * 32} V ${30 + tag.lane * 32} H ${tag.left} Z`}
          />
          <text className="figure-name ruler-name" x={tag.left + 8} y={22 + tag.lane * 32}>
            {tag.text}
          </text>
        </g>
      ))}
    </svg>
  );
}

interface Placed {
  id: string;
  text: string;
  at: number;
  left: number;
  wide: number;
  lane: number;
}

/** Tapes over their marks, in as many lanes as keeps them from covering each other. */
function place(markers: RulerLook['markers'], x: (pH: number) => number, width: number): Placed[] {
  const placed: Placed[] = [];
  for (const marker of [...markers].sort((a, b) => a.pH - b.pH)) {
    const text = `${marker.name.toLowerCase()} ${marker.pH.toFixed(2)}`;
    const wide = text.length * 7.6 + 22;
    const at = x(marker.pH);
    const left = Math.min(width - wide - 1, Math.max(1, at - wide / 2));
    let lane = 0;
    while (
      placed.some(
        (other) => other.lane === lane && left < other.left + other.wide + 8 && other.left < left + wide + 8,
      )
    )
      lane += 1;
    placed.push({ id: marker.id, text, at, left, wide, lane });
  }
  return placed;
}
