import { memo, useId, useMemo, type CSSProperties, type ReactNode } from 'react';
import type { Paint } from './light';
import { Stand } from './Stand';
import { innerPath, outlinePaths, radiusAt, surfacePaths, FLOOR_MM, WALL_MM, type GlassShape } from './shape';

export interface GlassProps {
  shape: GlassShape;
  /** Height of the surface above the inner floor, mm; null when the glass is empty. */
  level_mm: number | null;
  liquid: Paint;
  /** The flat region of liquid that has not been stirred in, with the share of the depth that it reaches (0 to 1). */
  unmixed?: { paint: Paint; depth: number } | undefined;
  /** A dashed line at the height where the glass is full. */
  brim_mm?: number | undefined;
  stirring?: boolean;
  /** Drawn in the same millimetres, before and after the front wall. */
  inside?: ReactNode;
  over?: ReactNode;
}

const pc = (value: number): string => `${Math.round(value * 1000) / 10}%`;

/** One piece of glass with what is in it. Millimetres inside; the scene's scale is the CSS variable --s. */
export function Glass(props: GlassProps) {
  const { shape, level_mm, liquid, unmixed, brim_mm, stirring = false } = props;
  const clip = useId();
  const frame = useMemo(() => measure(shape), [shape]);
  const surface = level_mm === null ? null : surfacePaths(shape.profile, level_mm, stirring ? 1 : 0);
  const size: CSSProperties = {
    width: `calc(var(--s) * ${frame.width})`,
    height: `calc(var(--s) * ${frame.height})`,
  };
  return (
    <span className="glass" style={size} aria-hidden="true">
      <svg viewBox={`${frame.x} ${frame.y} ${frame.width} ${frame.height}`} width="100%" height="100%">
        <clipPath id={clip}>
          <path d={frame.inner} />
        </clipPath>
        <path className="glass-air" d={frame.inner} />
        <g clipPath={`url(#${clip})`}>
          {surface && (
            <>
              <path className="glass-liquid" d={surface.region} fill={liquid.fill} />
              {unmixed && <path d={plume(shape, level_mm!, unmixed.depth)} fill={unmixed.paint.fill} />}
              <path className="glass-surface" d={surface.line} stroke={liquid.surface} />
            </>
          )}
          {props.inside}
        </g>
        <Walls shape={shape} />
        {brim_mm !== undefined && (
          <path
            className="glass-brim"
            d={`M ${-radiusAt(shape.profile, brim_mm) - 4} ${-brim_mm} H ${radiusAt(shape.profile, brim_mm) + 4}`}
          />
        )}
        <Etching shape={shape} level_mm={level_mm} dark={liquid.dark} />
        {props.over}
      </svg>
      <Numbers shape={shape} level_mm={level_mm} dark={liquid.dark} frame={frame} />
    </span>
  );
}

/** Tap and jet of a burette, with the space under it down to the slab. */
const JET_MM = 24;

interface Frame {
  x: number;
  y: number;
  width: number;
  height: number;
  inner: string;
}

/** The drawing's box in mm: the glass's own reach plus its line. */
export function measure(shape: GlassShape): Frame {
  const paths = outlinePaths(shape.profile, shape.lip, shape.rounding);
  const foot = shape.foot ? shape.foot.r : 0;
  const left = Math.min(paths.left, -foot, shape.jet ? -26 : 0) - 0.4;
  const right =
    Math.max(paths.right, foot, ...shape.texts.filter((text) => text.outside).map((text) => text.x + 6)) +
    0.4;
  const y = paths.top - 0.5;
  const bottom = FLOOR_MM + 0.3 + (shape.foot ? shape.foot.height : shape.jet ? JET_MM : 0);
  return {
    x: left,
    y,
    width: right - left,
    height: bottom - y,
    inner: innerPath(shape.profile, shape.rounding),
  };
}

const Walls = memo(function Walls({ shape }: { shape: GlassShape }) {
  const paths = outlinePaths(shape.profile, shape.lip, shape.rounding);
  const brim = shape.profile[shape.profile.length - 1]!;
  const out = brim.r + WALL_MM;
  return (
    <>
      {shape.foot && (
        <path
          className="glass-line glass-foot"
          d={`M ${-shape.foot.r} ${FLOOR_MM + shape.foot.height} L ${-shape.foot.r} ${FLOOR_MM + shape.foot.height - 1.6} L ${-shape.profile[0]!.r - 1} ${FLOOR_MM} L ${shape.profile[0]!.r + 1} ${FLOOR_MM} L ${shape.foot.r} ${FLOOR_MM + shape.foot.height - 1.6} L ${shape.foot.r} ${FLOOR_MM + shape.foot.height} Z`}
        />
      )}
      {shape.jet && (
        <>
          <path
            className="glass-line glass-foot"
            d="M -1.8 1 V 4 H -1.2 V 12 L -0.6 17 H 0.6 L 1.2 12 V 4 H 1.8 V 1"
          />
          <rect className="glass-line glass-foot" x="-3" y="4" width="6" height="4.4" rx="1" />
          <path className="stand-clamp" d="M 3.5 6.2 H 8" />
          <Stand top_mm={-paths.top} r_mm={brim.r} floor_mm={JET_MM} />
        </>
      )}
      <path className="glass-inner-line" d={innerLine(shape)} />
      <path className="glass-line" d={paths.outer} />
      {shape.lip === 'ring' ? (
        <rect
          className="glass-line glass-foot"
          x={-out - 1.2}
          y={-brim.h - 1.2}
          width={2 * out + 2.4}
          height={2.6}
          rx={1.2}
        />
      ) : (
        <path className="glass-mouth" d={paths.mouth} />
      )}
    </>
  );
});

/** The thin line of the inner wall stops short of the brim, where the lip turns out. */
function innerLine(shape: GlassShape): string {
  const top = shape.profile[shape.profile.length - 1]!.h * 0.94;
  const cut = [
    ...shape.profile.filter((point) => point.h < top),
    { h: top, r: radiusAt(shape.profile, top) },
  ];
  return innerPath(cut, shape.rounding).replace(/ Z$/, '');
}

const Etching = memo(function Etching({
  shape,
  level_mm,
  dark,
}: {
  shape: GlassShape;
  level_mm: number | null;
  dark: boolean;
}) {
  return (
    <>
      {shape.marks.map((mark) => (
        <path
          key={mark.h}
          className={dark && level_mm !== null && mark.h < level_mm - 0.2 ? 'etch etch-white' : 'etch'}
          d={`M ${mark.from} ${-mark.h} H ${mark.to}`}
        />
      ))}
    </>
  );
});

const Numbers = memo(function Numbers(props: {
  shape: GlassShape;
  level_mm: number | null;
  dark: boolean;
  frame: Frame;
}) {
  const { shape, level_mm, dark, frame } = props;
  return (
    <>
      {shape.texts.map((text) => {
        const inside = !text.outside && dark && level_mm !== null && text.h < level_mm - 0.5;
        return (
          <span
            key={text.text}
            className={inside ? 'etch-text etch-text-white' : 'etch-text'}
            style={{
              left: pc((text.x - frame.x) / frame.width),
              top: pc((-text.h - frame.y) / frame.height),
            }}
          >
            {text.text}
          </span>
        );
      })}
    </>
  );
});

/** A flat region that hangs from the surface where something was poured in, left of the etched marks. */
function plume(shape: GlassShape, level: number, depth: number): string {
  const r = radiusAt(shape.profile, level);
  const bottom = -level + Math.max(1.5, level * Math.min(1, depth));
  const x = -r * 0.32;
  const wide = r * 0.5;
  return (
    `M ${x - wide} ${-level - 2} L ${x + wide} ${-level - 2} ` +
    `C ${x + wide * 1.1} ${(bottom - level) / 2} ${x + wide * 0.7} ${bottom} ${x} ${bottom} ` +
    `C ${x - wide * 0.7} ${bottom} ${x - wide * 1.1} ${(bottom - level) / 2} ${x - wide} ${-level - 2} Z`
  );
}
