import { memo, useId } from 'react';
import type { Paint } from './light';
import { HazardMark } from './HazardMark';

export interface BottleLook {
  readonly name: string;
  /** '0.10 mol/L', '0.1 %', or '' for plain water. */
  readonly strength: string;
  /** Hazard codes that this concentration carries; most dilute bottles carry none. */
  readonly hazards: readonly string[];
  readonly kind: 'reagent' | 'indicator' | 'wash';
}

interface Props {
  look: BottleLook;
  liquid: Paint;
  /** Share of its first volume that is still in it, 0 to 1. */
  level: number;
  /** Degrees it is tipped to the left. */
  tip?: number;
  capped?: boolean;
}

/** Lip of the open bottle in the drawing, px: the pour turns about it. */
export const BOTTLE = { width: 124, height: 156, lipX: 36, lipY: 26 } as const;

const BODY =
  'M 38 28 L 38 33 C 38 46 4 44 4 64 L 4 140 Q 4 154 18 154 L 106 154 Q 120 154 120 140 L 120 64 C 120 44 86 46 86 33 L 86 28';
const INSIDE =
  'M 42 28 L 42 34 C 42 49 8 48 8 66 L 8 139 Q 8 150 19 150 L 105 150 Q 116 150 116 139 L 116 66 C 116 48 82 49 82 34 L 82 28 Z';

/** A stoppered reagent bottle with its paper label. */
export const Bottle = memo(function Bottle({ look, liquid, level, tip = 0, capped = true }: Props) {
  if (look.kind === 'wash') return <WashBottle look={look} liquid={liquid} level={level} tip={tip} />;
  return (
    <span className="bottle" style={tip === 0 ? undefined : { transform: `rotate(${-tip}deg)` }}>
      <svg viewBox={`0 0 ${BOTTLE.width} ${BOTTLE.height}`} width="100%" height="100%" aria-hidden="true">
        <path className="bottle-air" d={INSIDE} />
        <Liquid
          inside={INSIDE}
          liquid={liquid}
          level={level}
          tip={tip}
          floor={150}
          full={108}
          middle={[62, 90]}
        />
        <path className="bottle-ring" d={BODY} />
        <path className="bottle-inner-line" d={INSIDE} />
        <path className="bottle-line" d={BODY} />
        {capped ? (
          <g className="bottle-cap">
            <rect x="34" y="2" width="56" height="26" rx="4.5" />
            <path d="M 42 7 V 23 M 49 7 V 23 M 56 7 V 23 M 63 7 V 23 M 70 7 V 23 M 77 7 V 23 M 84 7 V 23" />
          </g>
        ) : (
          <rect className="bottle-lip" x="35" y="24" width="54" height="6" rx="3" />
        )}
      </svg>
      <Label look={look} />
    </span>
  );
});

function WashBottle({
  look,
  liquid,
  level,
  tip,
}: Required<Pick<Props, 'look' | 'liquid' | 'level' | 'tip'>>) {
  const body =
    'M 44 50 L 44 55 C 44 68 14 66 14 86 L 14 141 Q 14 154 27 154 L 97 154 Q 110 154 110 141 L 110 86 C 110 66 80 68 80 55 L 80 50';
  const inside =
    'M 48 50 L 48 56 C 48 71 18 70 18 87 L 18 140 Q 18 150 28 150 L 96 150 Q 106 150 106 140 L 106 87 C 106 70 76 71 76 56 L 76 50 Z';
  return (
    <span className="bottle" style={tip === 0 ? undefined : { transform: `rotate(${-tip * 0.35}deg)` }}>
      <svg viewBox={`0 0 ${BOTTLE.width} ${BOTTLE.height}`} width="100%" height="100%" aria-hidden="true">
        <path className="bottle-air" d={inside} />
        <Liquid
          inside={inside}
          liquid={liquid}
          level={level}
          tip={tip * 0.35}
          floor={150}
          full={86}
          middle={[62, 104]}
        />
        <path className="bottle-dip" d="M 62 38 V 142" />
        <path className="bottle-ring" d={body} />
        <path className="bottle-inner-line" d={inside} />
        <path className="bottle-line" d={body} />
        <path className="bottle-nozzle" d="M 62 36 V 26 C 62 12 52 7 42 9 L 8 24" />
        <path className="bottle-nozzle-inside" d="M 62 36 V 26 C 62 12 52 7 42 9 L 8 24" />
        <g className="bottle-cap">
          <rect x="42" y="34" width="40" height="17" rx="4" />
        </g>
      </svg>
      <Label look={look} />
    </span>
  );
}

/** The liquid keeps its surface level while the bottle is tipped. */
function Liquid(props: {
  inside: string;
  liquid: Paint;
  level: number;
  tip: number;
  floor: number;
  full: number;
  middle: readonly [number, number];
}) {
  const clip = useId();
  const { inside, liquid, tip, floor, full, middle } = props;
  const level = Math.min(1, Math.max(0, props.level));
  if (level <= 0) return null;
  const upright = floor - full * level;
  // Lying over, the same liquid spreads along the bottle's side: its surface comes nearer the middle.
  const lean = Math.min(1, tip / 60);
  const surface = upright + (middle[1] + (0.5 - level) * 90 - upright) * lean;
  return (
    <>
      <clipPath id={clip}>
        <path d={inside} />
      </clipPath>
      <g clipPath={`url(#${clip})`}>
        <g transform={`rotate(${tip} ${middle[0]} ${middle[1]})`}>
          <rect x="-140" y={surface} width="400" height="300" fill={liquid.fill} />
          <path className="bottle-surface" d={`M -140 ${surface} H 260`} stroke={liquid.surface} />
        </g>
      </g>
    </>
  );
}

function Label({ look }: { look: BottleLook }) {
  return (
    <span className="bottle-label" aria-hidden="true">
      <span className="bottle-name">{look.name}</span>
      <span className="bottle-foot">
        <span className="bottle-strength">{look.strength}</span>
        {look.hazards.slice(0, 2).map((hazard) => (
          <HazardMark key={hazard} code={hazard} />
        ))}
      </span>
    </span>
  );
}
