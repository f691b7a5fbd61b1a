import { memo, useId } from 'react';
import { useWords } from '../../words';
import { useWidth } from './useWidth';

export interface PairLook {
  readonly vessel: string;
  /** 'CH₃COOH' and 'CH₃COO⁻', or HA and A⁻. */
  readonly acid: string;
  readonly base: string;
  readonly acid_mmol: number;
  readonly base_mmol: number;
  /** Acid's share of the pair when the vessel was set up, 0 to 1. */
  readonly startShare: number;
  readonly sentence: string;
}

const three = (mmol: number): string =>
  mmol >= 10 ? mmol.toFixed(1) : mmol >= 0.1 ? mmol.toFixed(2) : mmol.toFixed(3);
/** Acid's share of the pair at pKa + 1 and pKa - 1. */
const LEAST_ACID = 1 / 11;
const MOST_ACID = 10 / 11;

/** Weak acid and conjugate base in mmol as one stacked bar, with the room that is left on both sides. */
export const PairBar = memo(function PairBar({ pair }: { pair: PairLook | null }) {
  const words = useWords();
  const [ref, width] = useWidth<HTMLDivElement>(560);
  return (
    <section className="part">
      <h3>Pair bar {pair && <span className="h3-note">in the {pair.vessel.toLowerCase()}, mmol</span>}</h3>
      <div ref={ref}>
        {pair ? (
          <Bar pair={pair} width={width} />
        ) : (
          <p className="empty">No weak acid with its partner stands on this bench yet.</p>
        )}
      </div>
      {pair && <p className="says">{words(pair.sentence)}</p>}
    </section>
  );
});

function Bar({ pair, width }: { pair: PairLook; width: number }) {
  const say = useWords();
  const amount = (mmol: number) => say(three(mmol));
  const hatch = useId();
  const total = pair.acid_mmol + pair.base_mmol;
  const share = total === 0 ? 0.5 : pair.acid_mmol / total;
  const at = (s: number): number => 1 + s * (width - 2);
  const now = at(share);
  const least = at(LEAST_ACID);
  const most = at(MOST_ACID);
  const start = at(pair.startShare);
  // What strong base or acid turns over before one partner is ten times the other, that is, before the pH leaves pKa ± 1.
  const roomForBase = pair.acid_mmol - total * LEAST_ACID;
  const roomForAcid = pair.base_mmol - total * (1 - MOST_ACID);
  const acidText = `${pair.acid} ${amount(pair.acid_mmol)}`;
  const baseText = `${pair.base} ${amount(pair.base_mmol)}`;
  const acidRoom = now - 10 > acidText.length * 11;
  const baseWide = baseText.length * 11 + 12;
  const baseRoom = width - now - 10 > baseWide;
  const words = `${pair.acid} ${amount(pair.acid_mmol)} mmol and ${pair.base} ${amount(pair.base_mmol)} mmol. ${say(pair.sentence)}`;
  return (
    <svg className="figure" width={width} height={128} role="img" aria-label={words}>
      <defs>
        <pattern id={hatch} width="9" height="9" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <rect width="9" height="9" fill="#fff" />
          <line className="hatch-line" x1="1" x2="1" y1="0" y2="9" />
        </pattern>
      </defs>
      <text className="figure-words" x={clamp(least, 34, width - 34)} y={16} textAnchor="middle">
        10 : 1
      </text>
      <text className="figure-words" x={clamp(most, 34, width - 34)} y={16} textAnchor="middle">
        1 : 10
      </text>
      {Math.abs(now - least) > 66 && Math.abs(now - most) > 66 && (
        <text className="figure-name" x={now} y={16} textAnchor="middle">
          now
        </text>
      )}
      <rect
        className="pair-base"
        x={now}
        y={30}
        width={Math.max(0, width - 1 - now)}
        height={48}
        fill={`url(#${hatch})`}
      />
      <rect className="pair-acid" x={1} y={30} width={Math.max(0, now - 1)} height={48} />
      <rect className="pair-frame" x={1} y={30} width={width - 2} height={48} />
      {acidRoom && (
        <text
          className="pair-name pair-name-white"
          x={Math.min(now - 12, Math.max(16, least + 14))}
          y={60}
          textAnchor={least + 14 + acidText.length * 11 < now ? 'start' : 'end'}
        >
          {acidText}
        </text>
      )}
      {baseRoom && (
        <>
          <rect
            fill="#fff"
            x={Math.min(most - 8, width - 8) - baseWide}
            y={39}
            width={baseWide}
            height={30}
            rx={3}
          />
          <text className="pair-name" x={Math.min(most - 8, width - 8) - 8} y={60} textAnchor="end">
            {baseText}
          </text>
        </>
      )}
      <line className="pair-limit" x1={least} x2={least} y1={22} y2={100} />
      <line className="pair-limit" x1={most} x2={most} y1={22} y2={100} />
      {Math.abs(start - now) > 3 && (
        <line
          className={start < now ? 'pair-start pair-start-white' : 'pair-start'}
          x1={start}
          x2={start}
          y1={34}
          y2={74}
        />
      )}
      <line className="pair-now" x1={now} x2={now} y1={24} y2={84} />
      <Bracket from={least} to={now} text={`${amount(roomForBase)} base`} width={width} />
      <Bracket from={now} to={most} text={`${amount(roomForAcid)} acid`} width={width} />
    </svg>
  );
}

/** From the mark to where the pH leaves pKa ± 1, on the side where there is room. */
function Bracket({ from, to, text, width }: { from: number; to: number; text: string; width: number }) {
  if (to - from < 6) return null;
  return (
    <>
      <path className="pair-bracket" d={`M ${from + 2} 90 V 99 H ${to - 2} V 90`} />
      <text
        className="figure-name"
        x={clamp((from + to) / 2, text.length * 4, width - text.length * 4)}
        y={119}
        textAnchor="middle"
      >
        {text}
      </text>
    </>
  );
}

const clamp = (v: number, low: number, high: number): number => Math.min(high, Math.max(low, v));
