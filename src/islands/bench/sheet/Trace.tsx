import { memo } from 'react';
import { useWords } from '../../words';
import { useWidth } from './useWidth';

export interface TracePoint {
  readonly x_mL: number;
  readonly pH: number;
  readonly hex: string;
}

export interface TraceSeries {
  readonly id: string;
  readonly name: string;
  readonly points: readonly TracePoint[];
  /** The computed way between the points, mL and pH; empty where only the points are known. */
  readonly curve: readonly (readonly [number, number])[];
}

export interface TraceProps {
  series: readonly TraceSeries[];
  /** pH values that an aim asks for. */
  aims: readonly number[];
  /** The indicator's colours from pH 0 to 14, evenly spaced; empty without an indicator. */
  strip: readonly string[];
  added: string;
  /** Said instead of a figure while readings are hidden or there is no probe. */
  absent: string | null;
}

const DASHES = ['', '6 4', '2 4', '10 4 2 4'];

/** pH against volume added. Vessels differ by line and point shape; points hold the computed colours. */
export const Trace = memo(function Trace({ series, aims, strip, added, absent }: TraceProps) {
  const words = useWords();
  const [ref, width] = useWidth<HTMLDivElement>(372);
  const drawn = series.filter((one) => one.points.length > 0);
  return (
    <section className="part">
      <h3>Trace</h3>
      <div ref={ref}>
        {absent !== null || drawn.length === 0 ? (
          <p className="empty">{absent ?? 'pH against volume added. It begins with the first reading.'}</p>
        ) : (
          <Figure width={width} series={drawn} aims={aims} strip={strip} added={added} />
        )}
      </div>
      {absent === null && drawn.length > 0 && <p className="says">{words(say(drawn))}</p>}
    </section>
  );
});

function Figure({ width, series, aims, strip, added }: Omit<TraceProps, 'absent'> & { width: number }) {
  const words = useWords();
  const height = 360;
  const left = strip.length > 0 ? 58 : 36;
  const right = width - 12;
  const top = 26;
  const bottom = height - 52;
  const all = series.flatMap((one) => one.points);
  const pHs = [...all.map((p) => p.pH), ...series.flatMap((one) => one.curve.map(([, pH]) => pH)), ...aims];
  const low = Math.max(0, Math.floor(Math.min(...pHs) - 0.5));
  const high = Math.min(14, Math.ceil(Math.max(...pHs) + 0.5));
  const span = Math.max(2, high - low);
  const most = niceCeiling(Math.max(1, ...all.map((p) => p.x_mL)));
  const step = most / 5 >= 1 ? Math.ceil(most / 6) : most / 5;
  const x = (v: number): number => left + 14 + (v / most) * (right - left - 14);
  const y = (pH: number): number => bottom - ((pH - low) / span) * (bottom - top);
  const rows = Array.from({ length: span + 1 }, (_, i) => low + i).filter((pH) => span <= 8 || pH % 2 === 0);
  const columns: number[] = [];
  for (let v = 0; v <= most + 1e-9; v += step) columns.push(v);
  return (
    <svg className="figure" width={width} height={height} role="img" aria-label={words(say(series))}>
      <text className="figure-unit" x={left - 14} y={14} textAnchor="end">
        pH
      </text>
      {rows.map((pH) => (
        <g key={pH}>
          <line className="figure-grid" x1={left} x2={right} y1={y(pH)} y2={y(pH)} />
          <text
            className="figure-number"
            x={strip.length > 0 ? left - 30 : left - 8}
            y={y(pH) + 5}
            textAnchor="end"
          >
            {pH}
          </text>
        </g>
      ))}
      {strip.length > 0 && (
        <Strip x={left - 22} top={top} bottom={bottom} low={low} high={low + span} strip={strip} />
      )}
      <path className="figure-axis" d={`M ${left} ${top} V ${bottom} H ${right}`} />
      {columns.map((v) => (
        <g key={v}>
          <line className="figure-tick" x1={x(v)} x2={x(v)} y1={bottom} y2={bottom + 6} />
          <text className="figure-number" x={x(v)} y={bottom + 22} textAnchor="middle">
            {words(String(Number(v.toFixed(2))))}
          </text>
        </g>
      ))}
      <text className="figure-words" x={right} y={bottom + 42} textAnchor="end">
        {words(added)}
      </text>
      {aims.map((aim) => (
        <g key={aim}>
          <line className="figure-aim" x1={left} x2={right} y1={y(aim)} y2={y(aim)} />
          <text className="figure-aim-words" x={right} y={y(aim) + 16} textAnchor="end">
            aim {words(aim.toFixed(2))}
          </text>
        </g>
      ))}
      {series.map((one, i) => (
        <polyline
          key={one.id}
          className="figure-line"
          strokeDasharray={DASHES[i % DASHES.length]}
          points={(one.curve.length > 0 ? one.curve : one.points.map((p) => [p.x_mL, p.pH] as const))
            .map(([v, pH]) => `${x(v)},${y(pH)}`)
            .join(' ')}
        />
      ))}
      {series.map((one, i) => (
        <g key={one.id}>
          {thin(one.points, 40).map((p, at) => (
            <Point key={at} shape={i % 4} x={x(p.x_mL)} y={y(p.pH)} fill={p.hex} />
          ))}
        </g>
      ))}
      {labels(series, x, y, left, right, top, bottom).map((label) => (
        <text key={label.id} className="figure-name" x={label.x} y={label.y} textAnchor="end">
          {label.name}
        </text>
      ))}
    </svg>
  );
}

function Point({ shape, x, y, fill }: { shape: number; x: number; y: number; fill: string }) {
  if (shape === 0) return <circle className="figure-point" cx={x} cy={y} r={6} fill={fill} />;
  if (shape === 1)
    return <rect className="figure-point" x={x - 6} y={y - 6} width={12} height={12} fill={fill} />;
  if (shape === 2)
    return (
      <path
        className="figure-point"
        d={`M ${x} ${y - 8} L ${x + 7} ${y + 5} L ${x - 7} ${y + 5} Z`}
        fill={fill}
      />
    );
  return (
    <path
      className="figure-point"
      d={`M ${x} ${y - 8} L ${x + 8} ${y} L ${x} ${y + 8} L ${x - 8} ${y} Z`}
      fill={fill}
    />
  );
}

/** The indicator's colours beside the pH axis. */
function Strip(props: {
  x: number;
  top: number;
  bottom: number;
  low: number;
  high: number;
  strip: readonly string[];
}) {
  const { x, top, bottom, low, high, strip } = props;
  const tall = bottom - top;
  const cell = 14 / strip.length;
  return (
    <g aria-hidden="true">
      {strip.map((hex, i) => {
        const from = Math.max(low, i * cell);
        const to = Math.min(high, (i + 1) * cell);
        if (to <= from) return null;
        return (
          <rect
            key={i}
            x={x}
            width={15}
            y={bottom - ((to - low) / (high - low)) * tall - 0.3}
            height={((to - from) / (high - low)) * tall + 0.6}
            fill={hex}
          />
        );
      })}
      <rect className="figure-frame" x={x} y={top} width={15} height={tall} />
    </g>
  );
}

/** Names on their lines' ends, moved apart where they would touch. */
function labels(
  series: readonly TraceSeries[],
  x: (v: number) => number,
  y: (pH: number) => number,
  left: number,
  right: number,
  top: number,
  bottom: number,
): { id: string; name: string; x: number; y: number }[] {
  const placed: { id: string; name: string; x: number; y: number }[] = [];
  for (const one of series) {
    const end = one.points[one.points.length - 1]!;
    let at = y(end.pH) - 14;
    if (at < top + 12) at = y(end.pH) + 24;
    while (placed.some((other) => Math.abs(other.y - at) < 17) && at < bottom - 4) at += 17;
    const wide = one.name.length * 7.8;
    const ends = Math.min(right, Math.max(x(end.x_mL) + wide / 2, left + wide + 8));
    placed.push({ id: one.id, name: one.name, x: ends, y: at });
  }
  return placed;
}

/** Every k-th point and the last, so that many drops do not draw a caterpillar. */
function thin(points: readonly TracePoint[], most: number): readonly TracePoint[] {
  if (points.length <= most) return points;
  const every = Math.ceil(points.length / most);
  return points.filter((_, i) => i % every === 0 || i === points.length - 1);
}

function niceCeiling(v: number): number {
  const magnitude = 10 ** Math.floor(Math.log10(v));
  for (const factor of [1, 2, 3, 4, 5, 6, 8, 10])
    if (v <= factor * magnitude + 1e-9) return factor * magnitude;
  return 10 * magnitude;
}

/** The figure as a sentence. */
function say(series: readonly TraceSeries[]): string {
  return series
    .map((one) => {
      const first = one.points[0]!;
      const end = one.points[one.points.length - 1]!;
      const name = one.name.charAt(0).toUpperCase() + one.name.slice(1);
      if (one.points.length === 1) return `${name} starts at pH ${first.pH.toFixed(2)}.`;
      return `${name} goes from pH ${first.pH.toFixed(2)} to ${end.pH.toFixed(2)} with ${end.x_mL.toFixed(2)} mL added.`;
    })
    .join(' ');
}
