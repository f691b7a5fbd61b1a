/**
 * From a glass's inner profile (radius by height, mm) to the lines that are drawn, in mm with y downwards and the
 * inner floor's centre at (0, 0). Levels come from the same profile, so a volume stands where its mark is.
 */
export interface ProfilePoint {
  /** Height above the inner floor, mm. */
  readonly h: number;
  /** Inner radius there, mm. */
  readonly r: number;
}

export type Lip = 'spout' | 'flare' | 'ring' | 'plain';

/** An etched line across part of the glass. */
export interface Mark {
  readonly h: number;
  readonly from: number;
  readonly to: number;
}

/** An etched number, or the glass's own size; `x` is its left edge. */
export interface EtchedText {
  readonly h: number;
  readonly x: number;
  readonly text: string;
  readonly outside: boolean;
}

/** What the drawing needs to know of one kind of glass. */
export interface GlassShape {
  readonly profile: readonly ProfilePoint[];
  readonly lip: Lip;
  /** Rounding of the floor's edge, mm. */
  readonly rounding: number;
  readonly foot?: { readonly r: number; readonly height: number };
  /** A tap and a jet below the floor. */
  readonly jet?: boolean;
  /** How far heights are squeezed: 1 for true proportions. */
  readonly squash: number;
  readonly marks: readonly Mark[];
  readonly texts: readonly EtchedText[];
}

export const WALL_MM = 1.2;
export const FLOOR_MM = 1.2;

const n = (value: number): string => String(Math.round(value * 100) / 100);

/** Inner radius at a height, by straight lines between the profile's points. */
export function radiusAt(profile: readonly ProfilePoint[], h: number): number {
  const first = profile[0]!;
  if (h <= first.h) return first.r;
  for (let i = 1; i < profile.length; i += 1) {
    const below = profile[i - 1]!;
    const above = profile[i]!;
    if (h <= above.h) {
      const share = above.h === below.h ? 1 : (h - below.h) / (above.h - below.h);
      return below.r + share * (above.r - below.r);
    }
  }
  return profile[profile.length - 1]!.r;
}

/** How far the floor's edge is rounded, mm: none where the profile itself closes to a point. */
function corner(profile: readonly ProfilePoint[], rounding: number): number {
  const first = profile[0]!;
  return Math.min(rounding, first.r, (profile[1]?.h ?? 0) * 0.5);
}

/** A point of an outline; `bend` is the control point of the curve that arrives at it. */
interface Knot {
  readonly x: number;
  readonly y: number;
  readonly bend?: readonly [number, number];
}

/** One side of the glass from the middle of its floor to its top, `dx` outside the inner wall. */
function side(
  profile: readonly ProfilePoint[],
  dx: number,
  floor: number,
  rounding: number,
  sign: 1 | -1,
): Knot[] {
  const first = profile[0]!;
  const turn = corner(profile, rounding) + (first.r > 0.5 ? dx : 0);
  const knots: Knot[] = [{ x: 0, y: floor }];
  if (turn > 0.2) {
    knots.push({ x: sign * (first.r + dx - turn), y: floor });
    knots.push({
      x: sign * (radiusAt(profile, turn) + dx),
      y: floor - turn,
      bend: [sign * (first.r + dx), floor],
    });
  } else {
    knots.push({ x: sign * (first.r + dx), y: floor });
  }
  for (const point of profile) {
    if (point.h > turn) knots.push({ x: sign * (point.r + dx), y: -point.h });
  }
  return knots;
}

const lineTo = (to: Knot, bend?: readonly [number, number]): string =>
  bend === undefined ? `L ${n(to.x)} ${n(to.y)}` : `Q ${n(bend[0])} ${n(bend[1])} ${n(to.x)} ${n(to.y)}`;

/** Commands from the floor's middle up one side. */
const upwards = (knots: readonly Knot[]): string =>
  knots
    .slice(1)
    .map((knot) => lineTo(knot, knot.bend))
    .join(' ');

/** Commands from the top of a side down to the floor's middle. */
const downwards = (knots: readonly Knot[]): string =>
  knots
    .slice(0, -1)
    .map((knot, i) => lineTo(knot, knots[i + 1]!.bend))
    .reverse()
    .join(' ');

/** The closed space inside the glass, from floor to brim. */
export function innerPath(profile: readonly ProfilePoint[], rounding: number): string {
  const left = side(profile, 0, 0, rounding, -1);
  const right = side(profile, 0, 0, rounding, 1);
  const top = left[left.length - 1]!;
  return `M ${n(top.x)} ${n(top.y)} ${downwards(left)} ${upwards(right)} Z`;
}

export interface OutlinePaths {
  /** The glass's outer line, open at the top. */
  readonly outer: string;
  /** The thin line across the mouth. */
  readonly mouth: string;
  /** Leftmost and rightmost x, mm. */
  readonly left: number;
  readonly right: number;
  /** Highest y, mm (negative). */
  readonly top: number;
}

/** The outer line with its lip. The spout is on the left. */
export function outlinePaths(profile: readonly ProfilePoint[], lip: Lip, rounding: number): OutlinePaths {
  const brim = profile[profile.length - 1]!;
  const widest = Math.max(...profile.map((point) => point.r)) + WALL_MM;
  const height = brim.h;
  const out = brim.r + WALL_MM;
  const body = (reach: number): readonly ProfilePoint[] => {
    const cut = Math.max(height * 0.5, height - reach);
    return [...profile.filter((point) => point.h < cut), { h: cut, r: radiusAt(profile, cut) }];
  };
  if (lip === 'spout' || lip === 'flare') {
    const big = Math.min(1, brim.r / 20);
    const spout = lip === 'spout' ? 4.6 * Math.max(0.45, big) : 1.4;
    const spoutDrop = lip === 'spout' ? 11 * Math.max(0.5, big) : 2.4;
    const flare = lip === 'spout' ? 2 * Math.max(0.6, big) : 1.4;
    const flareDrop = lip === 'spout' ? 5.5 * Math.max(0.6, big) : 2.4;
    const right = side(body(flareDrop), WALL_MM, FLOOR_MM, rounding, 1);
    const left = side(body(spoutDrop), WALL_MM, FLOOR_MM, rounding, -1);
    const outer =
      `M ${n(-out - spout)} ${n(-height + 0.3)} ` +
      `C ${n(-out - spout * 0.35)} ${n(-height + spoutDrop * 0.16)} ${n(-out)} ${n(-height + spoutDrop * 0.45)} ` +
      `${n(left[left.length - 1]!.x)} ${n(left[left.length - 1]!.y)} ${downwards(left)} ${upwards(right)} ` +
      `C ${n(out)} ${n(-height + flareDrop * 0.35)} ${n(out + flare * 0.35)} ${n(-height + 0.2)} ${n(out + flare)} ${n(-height)}`;
    return {
      outer,
      mouth: `M ${n(-out - spout)} ${n(-height + 0.3)} L ${n(out + flare)} ${n(-height)}`,
      left: Math.min(-widest, -out - spout),
      right: Math.max(widest, out + flare),
      top: -height,
    };
  }
  const right = side(profile, WALL_MM, FLOOR_MM, rounding, 1);
  const left = side(profile, WALL_MM, FLOOR_MM, rounding, -1);
  const outer = `M ${n(-out)} ${n(-height)} ${downwards(left)} ${upwards(right)}`;
  return {
    outer,
    mouth: lip === 'plain' ? `M ${n(-out)} ${n(-height)} L ${n(out)} ${n(-height)}` : '',
    left: -widest - (lip === 'ring' ? 1.4 : 0),
    right: widest + (lip === 'ring' ? 1.4 : 0),
    top: -height - (lip === 'ring' ? 1.6 : 0),
  };
}

/** How high the liquid climbs the wall and over what width, mm. A narrow glass has a deeper, narrower curve. */
function meniscus(r: number): { rise: number; reach: number } {
  return { rise: Math.min(0.9, 0.35 + r * 0.03), reach: Math.min(r, 8) };
}

/**
 * The surface at height `h`: a closed region from the surface down (to be clipped by the inside), and the surface's
 * own line. `dip` lowers the middle while the liquid is stirred.
 */
export function surfacePaths(
  profile: readonly ProfilePoint[],
  h: number,
  dip = 0,
): { region: string; line: string } {
  const r = radiusAt(profile, h);
  const { rise, reach } = meniscus(r);
  const up = Math.min(rise, h);
  const y = -h;
  const line =
    dip > 0
      ? `M ${n(-r)} ${n(y - up)} Q ${n(-r * 0.5)} ${n(y + dip)} 0 ${n(y + dip)} Q ${n(r * 0.5)} ${n(y + dip)} ${n(r)} ${n(y - up)}`
      : `M ${n(-r)} ${n(y - up)} Q ${n(-r + reach * 0.35)} ${n(y)} ${n(-r + reach)} ${n(y)} L ${n(r - reach)} ${n(y)} Q ${n(r - reach * 0.35)} ${n(y)} ${n(r)} ${n(y - up)}`;
  const wide = Math.max(...profile.map((point) => point.r)) + 1;
  const region = `${line} L ${n(wide)} ${n(y - up)} L ${n(wide)} 2 L ${n(-wide)} 2 L ${n(-wide)} ${n(y - up)} Z`;
  return { region, line };
}
