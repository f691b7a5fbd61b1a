import { speciesBars } from '../../../bench/views/amounts';
import type { BenchState, Seen } from '../../../bench/types';
import { chemicalName, withChemicalNames } from './chemicalName';
import { useWidth } from './useWidth';

interface Props {
  state: BenchState;
  vessel: string;
  seen: Seen;
}

const LOWEST = 1e-6;
const ROW = 30;

const figures = (mmol: number): string =>
  mmol >= 0.001
    ? mmol.toPrecision(3)
    : mmol
        .toExponential(1)
        .replace('e-', ' × 10⁻')
        .replace(/⁻(\d+)$/, (_, n: string) => `⁻${[...n].map((d) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(d)]).join('')}`);

/** Every dissolved species on a scale of powers of ten, since they differ by millions. */
export default function SpeciesBars({ state, vessel, seen }: Props) {
  const [ref, width] = useWidth<HTMLDivElement>(500);
  const found = speciesBars(state, vessel, seen);
  const label =
    state.scene.vessels[vessel]?.label ??
    state.spec.vessels.find((one) => one.id === vessel)?.label ??
    vessel;
  const bars = (found?.bars ?? []).filter((bar) => bar.mmol >= LOWEST).slice(0, 10);
  const sentence = withChemicalNames(
    found?.sentence ?? '',
    (found?.bars ?? []).map((bar) => bar.name),
  );
  const most = Math.max(1, Math.ceil(Math.log10(bars[0]?.mmol ?? 1)));
  const low = Math.log10(LOWEST);
  const from = 96;
  const to = width - 78;
  const x = (mmol: number): number =>
    from + ((Math.log10(Math.max(LOWEST, mmol)) - low) / (most - low)) * (to - from);
  return (
    <section className="part">
      <h3>
        Species bars <span className="h3-note">in the {label.toLowerCase()}, mmol</span>
      </h3>
      <div ref={ref}>
        {bars.length === 0 ? (
          <p className="empty">
            It shows every dissolved species. The vessel is empty, or its amounts are hidden.
          </p>
        ) : (
          <svg
            className="figure"
            width={width}
            height={bars.length * ROW + 34}
            role="img"
            aria-label={sentence}
          >
            {Array.from({ length: most - low + 1 }, (_, i) => low + i)
              .filter((power) => power % 2 === 0)
              .map((power) => (
                <g key={power}>
                  <line
                    className="figure-grid"
                    x1={x(10 ** power)}
                    x2={x(10 ** power)}
                    y1={0}
                    y2={bars.length * ROW}
                  />
                  <text
                    className="figure-number"
                    x={x(10 ** power)}
                    y={bars.length * ROW + 20}
                    textAnchor="middle"
                  >
                    10
                    <tspan dy="-6" fontSize="10">
                      {String(power).replace('-', '\u2212')}
                    </tspan>
                  </text>
                </g>
              ))}
            {bars.map((bar, i) => (
              <g key={bar.name}>
                <text className="figure-words" x={from - 10} y={i * ROW + 19} textAnchor="end">
                  {chemicalName(bar.name)}
                </text>
                <rect
                  className="pair-acid"
                  x={from}
                  y={i * ROW + 5}
                  width={Math.max(2, x(bar.mmol) - from)}
                  height={ROW - 10}
                />
                <text className="figure-name" x={x(bar.mmol) + 8} y={i * ROW + 20}>
                  {figures(bar.mmol)}
                </text>
              </g>
            ))}
          </svg>
        )}
      </div>
      {found && <p className="says">{sentence} Each step of the scale is ten times as much.</p>}
    </section>
  );
}
