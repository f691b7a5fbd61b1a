import { glassware, heightOf, levelOf, marksOf, type Glass, type GlassId } from '../../../bench/glassware';
import { WALL_MM, type EtchedText, type GlassShape, type Lip, type Mark, type ProfilePoint } from './shape';

/** Tall slender ware is cut short in the drawing: its heights are squeezed, so its marks still read true. */
const TALLEST_MM = 104;
/** Etched lines and numbers keep this distance, so that they can be read at the scene's scale. */
const MARK_APART_MM = 1.3;
const NUMBER_APART_MM = 5.6;

const cache = new Map<GlassId, GlassShape>();

/** The drawing of a kind of glass; the same object for the same glass. */
export function shapeOf(id: GlassId): GlassShape {
  let shape = cache.get(id);
  if (!shape) {
    shape = draw(glassware[id]);
    cache.set(id, shape);
  }
  return shape;
}

function draw(glass: Glass): GlassShape {
  const whole = heightOf(glass) * 10;
  const squeezed =
    glass.family === 'cylinder' ||
    glass.family === 'burette' ||
    glass.family === 'pipette' ||
    glass.family === 'waste';
  const squash = squeezed ? Math.min(1, TALLEST_MM / whole) : 1;
  const profile: ProfilePoint[] = [];
  let h = 0;
  for (const stretch of glass.profile) {
    if (profile.length === 0) profile.push({ h: 0, r: stretch.from_cm * 5 });
    h += stretch.height_cm * 10 * squash;
    profile.push({ h, r: stretch.to_cm * 5 });
  }
  profile.push({ h: h + glass.headroom_cm * 10 * squash, r: profile[profile.length - 1]!.r });
  const slender = glass.family === 'cylinder' || glass.family === 'burette' || glass.family === 'pipette';
  const { marks, texts } = glass.family === 'volumetric' ? oneMark(glass) : scale(glass, squash, slender);
  return {
    profile,
    lip: lipOf(glass),
    rounding: glass.family === 'test-tube' ? profile[0]!.r : slender ? 1.5 : 5,
    ...(glass.family === 'cylinder' ? { foot: { r: profile[0]!.r + 9, height: 5 } } : {}),
    ...(glass.family === 'burette' ? { jet: true } : {}),
    squash,
    marks,
    texts,
  };
}

function lipOf(glass: Glass): Lip {
  if (glass.family === 'beaker' || glass.family === 'cylinder') return 'spout';
  if (glass.family === 'conical' || glass.family === 'volumetric') return 'ring';
  return glass.family === 'test-tube' ? 'flare' : 'plain';
}

/** Where a volume stands in the drawing, mm. A burette's numbers count what has run out. */
function heightOfMark(glass: Glass, mL: number, squash: number): number {
  return levelOf(glass, glass.scaleFromTop ? glass.nominal_mL - mL : mL) * 10 * squash;
}

function scale(glass: Glass, squash: number, slender: boolean): { marks: Mark[]; texts: EtchedText[] } {
  const all = marksOf(glass).map((mark) => ({ ...mark, h: heightOfMark(glass, mark.mL, squash) }));
  if (all.length === 0 || !glass.marks) return { marks: [], texts: [] };
  const apart = (step_mL: number): number => {
    const top = glass.scaleFromTop ? 0 : glass.marks!.last_mL;
    return Math.abs(
      heightOfMark(glass, top, squash) -
        heightOfMark(glass, top + (glass.scaleFromTop ? step_mL : -step_mL), squash),
    );
  };
  const step = widen(glass.marks.step_mL, apart, MARK_APART_MM);
  const numbered = widen(Math.max(step, glass.marks.numbered_mL), apart, NUMBER_APART_MM);
  const on = (mL: number, every: number): boolean => Math.abs(mL / every - Math.round(mL / every)) < 1e-6;
  const last = all[glass.scaleFromTop ? 0 : all.length - 1]!;
  const marks: Mark[] = [];
  const texts: EtchedText[] = [];
  for (const mark of all) {
    if (!on(mark.mL, step)) continue;
    const long = on(mark.mL, numbered);
    const r = radius(glass, mark.h / squash);
    if (slender) {
      marks.push({ h: mark.h, from: r - (long ? r * 1.1 : r * 0.6), to: r });
      if (long) texts.push({ h: mark.h, x: r + WALL_MM + 1.6, text: String(mark.mL), outside: true });
      continue;
    }
    // Marks run from the middle to the right and stay inside a wall that leans in.
    const reach = glass.family === 'conical' ? Math.min(9, r * 0.3) : Math.min(12, r * 0.5);
    const named = mark === last;
    marks.push({ h: mark.h, from: long || named ? 1 : 1 + reach * 0.36, to: 1 + reach });
    if (long && !named) texts.push({ h: mark.h, x: 1 + reach + 2, text: String(mark.mL), outside: false });
  }
  if (!slender) {
    const r = radius(glass, last.h);
    texts.push({ h: last.h + 3.6, x: r > 20 ? 1 : -r * 0.8, text: `${glass.nominal_mL} mL`, outside: false });
  }
  return { marks, texts };
}

/** The step, or the nearest multiple of it, at which neighbours stand far enough apart. */
function widen(step_mL: number, apart: (step_mL: number) => number, least_mm: number): number {
  for (const factor of [1, 2, 5, 10, 20, 50, 100, 200]) {
    if (apart(step_mL * factor) >= least_mm) return step_mL * factor;
  }
  return step_mL * 500;
}

function radius(glass: Glass, h_mm: number): number {
  let below = 0;
  for (const stretch of glass.profile) {
    const height = stretch.height_cm * 10;
    if (h_mm <= below + height) {
      return (stretch.from_cm + ((stretch.to_cm - stretch.from_cm) * (h_mm - below)) / height) * 5;
    }
    below += height;
  }
  return glass.profile[glass.profile.length - 1]!.to_cm * 5;
}

/** A volumetric flask has a single ring round its neck. */
function oneMark(glass: Glass): { marks: Mark[]; texts: EtchedText[] } {
  const h = levelOf(glass, glass.nominal_mL) * 10;
  const r = radius(glass, h);
  return {
    marks: [{ h, from: -r, to: r }],
    texts: [{ h: h * 0.3, x: -9, text: `${glass.nominal_mL} mL`, outside: false }],
  };
}
