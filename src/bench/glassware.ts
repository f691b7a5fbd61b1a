/**
 * Glassware: capacity, shape, graduations and tolerance.
 *
 * Tolerances, in mL: cylinders ASTM E1272-02(2012) Table 1; 50 mL burette ISO 385 as printed by a glass vendor, and ASTM
 * E287 (from memory: the same); pipettes class A from Fifield's table (5 to 50 mL), class B twice class A (ASTM E287/E288
 * scope); volumetric flasks ISO 1042 (from memory). Beakers, flasks and tubes carry approximate marks, ±5 % of the reading
 * (common practice, from memory). Shapes are of usual low-form ware, rounded so that marks fall where they are read.
 */

export type GlassFamily =
  'beaker' | 'conical' | 'test-tube' | 'cylinder' | 'volumetric' | 'burette' | 'pipette' | 'waste';

/** One stretch of a round glass from the bottom up: straight or conical walls. Centimetres, inner. */
export interface Stretch {
  readonly height_cm: number;
  readonly from_cm: number;
  readonly to_cm: number;
}

export interface Glass {
  readonly id: GlassId;
  readonly family: GlassFamily;
  readonly name: string;
  /** The number on the glass, mL. */
  readonly nominal_mL: number;
  /** Where pouring stops, mL. */
  readonly capacity_mL: number;
  /** Inner stretches from the bottom up, holding `capacity_mL` and a little more (headroom to the rim). */
  readonly profile: readonly Stretch[];
  readonly headroom_cm: number;
  /** Marks, mL: every `step` from `first` to `last`, a number at every `numbered`. */
  readonly marks: {
    readonly first_mL: number;
    readonly last_mL: number;
    readonly step_mL: number;
    readonly numbered_mL: number;
  } | null;
  /** A burette's scale counts down: its zero is at the top. */
  readonly scaleFromTop: boolean;
  /** How finely a level is read, mL (half a division; burettes to 0.05). */
  readonly readTo_mL: number;
  readonly tolerance_mL: { readonly A: number; readonly B: number } | null;
  /** Where no fixed tolerance holds: this share of the volume read. */
  readonly tolerance_share: number | null;
  /** Poured into by hand without a funnel, a little goes beside. */
  readonly narrow: boolean;
  readonly canSwirl: boolean;
  readonly canStopper: boolean;
}

const area = (d: number) => (Math.PI * d * d) / 4;
/** Height of a straight cylinder of this inner width that holds so much. */
const tall = (volume_mL: number, d: number) => volume_mL / area(d);

const straight = (volume_mL: number, d: number): Stretch[] => [
  { height_cm: tall(volume_mL, d), from_cm: d, to_cm: d },
];

type Row = Omit<
  Glass,
  | 'id'
  | 'nominal_mL'
  | 'narrow'
  | 'canSwirl'
  | 'canStopper'
  | 'scaleFromTop'
  | 'tolerance_share'
  | 'tolerance_mL'
> &
  Partial<
    Pick<
      Glass,
      | 'narrow'
      | 'canSwirl'
      | 'canStopper'
      | 'scaleFromTop'
      | 'tolerance_mL'
      | 'tolerance_share'
      | 'nominal_mL'
    >
  >;

const beaker = (nominal: number, width: number, step: number, numbered: number): Row => ({
  family: 'beaker',
  name: `${nominal} mL beaker`,
  nominal_mL: nominal,
  capacity_mL: nominal,
  profile: straight(nominal, width),
  headroom_cm: 1.1,
  marks: { first_mL: step, last_mL: nominal, step_mL: step, numbered_mL: numbered },
  readTo_mL: step / 2,
  tolerance_share: 0.05,
  canSwirl: true,
});

/** A cone that ends in a neck: the height of the cone follows from its volume. */
const conical = (nominal: number, base: number, neck: number, step: number, numbered: number): Row => {
  const cone = (12 * nominal * 1.05) / (Math.PI * (base * base + base * neck + neck * neck));
  return {
    family: 'conical',
    name: `${nominal} mL conical flask`,
    nominal_mL: nominal,
    capacity_mL: nominal,
    profile: [{ height_cm: cone, from_cm: base, to_cm: neck }],
    headroom_cm: 2.4,
    marks: { first_mL: step, last_mL: nominal * 0.8, step_mL: step, numbered_mL: numbered },
    readTo_mL: step / 2,
    tolerance_share: 0.05,
    canSwirl: true,
    canStopper: true,
  };
};

const cylinder = (nominal: number, width: number, step: number, numbered: number, a: number): Row => ({
  family: 'cylinder',
  name: `${nominal} mL measuring cylinder`,
  nominal_mL: nominal,
  capacity_mL: nominal * 1.08,
  profile: straight(nominal * 1.08, width),
  headroom_cm: 1.6,
  marks: { first_mL: step, last_mL: nominal, step_mL: step, numbered_mL: numbered },
  readTo_mL: step / 2,
  tolerance_mL: { A: a, B: 2 * a },
});

/** A round belly stands for the bulb; the neck above the mark is narrow, so a millilitre too much is seen. */
const volumetric = (nominal: number, belly: number, neck: number, a: number): Row => {
  const below = nominal * 0.97;
  const spare = nominal * 0.05;
  return {
    family: 'volumetric',
    name: `${nominal} mL volumetric flask`,
    nominal_mL: nominal,
    capacity_mL: nominal + spare,
    profile: [
      {
        height_cm: (12 * below) / (Math.PI * (belly * belly + belly * neck + neck * neck)),
        from_cm: belly,
        to_cm: neck,
      },
      { height_cm: tall(nominal - below + spare, neck), from_cm: neck, to_cm: neck },
    ],
    headroom_cm: 1.5,
    marks: { first_mL: nominal, last_mL: nominal, step_mL: nominal, numbered_mL: nominal },
    readTo_mL: 0.05,
    tolerance_mL: { A: a, B: 2 * a },
    narrow: true,
    canSwirl: true,
    canStopper: true,
  };
};

const pipette = (nominal: number, a: number): Row => ({
  family: 'pipette',
  name: `${nominal} mL pipette`,
  nominal_mL: nominal,
  capacity_mL: nominal,
  profile: straight(nominal, 1.2),
  headroom_cm: 3,
  marks: { first_mL: nominal, last_mL: nominal, step_mL: nominal, numbered_mL: nominal },
  readTo_mL: nominal,
  tolerance_mL: { A: a, B: 2 * a },
  narrow: true,
});

const rows = {
  'beaker-50': beaker(50, 3.8, 5, 10),
  'beaker-100': beaker(100, 5.0, 10, 20),
  'beaker-250': beaker(250, 6.6, 25, 50),
  'beaker-400': beaker(400, 7.6, 25, 100),
  'conical-100': conical(100, 6.0, 2.0, 20, 20),
  'conical-250': conical(250, 8.0, 3.0, 25, 50),
  'test-tube': {
    family: 'test-tube',
    name: 'test tube',
    nominal_mL: 20,
    capacity_mL: 20,
    profile: straight(20, 1.6),
    headroom_cm: 2,
    marks: null,
    readTo_mL: 0.5,
    tolerance_share: 0.05,
    narrow: true,
    canSwirl: true,
    canStopper: true,
  },
  'cylinder-10': cylinder(10, 1.2, 0.2, 1, 0.1),
  'cylinder-25': cylinder(25, 1.8, 0.5, 5, 0.17),
  'cylinder-50': cylinder(50, 2.3, 1, 10, 0.25),
  'cylinder-100': cylinder(100, 2.8, 1, 10, 0.5),
  'volumetric-50': volumetric(50, 4.9, 1.0, 0.06),
  'volumetric-100': volumetric(100, 6.2, 1.2, 0.1),
  'volumetric-250': volumetric(250, 8.4, 1.5, 0.15),
  'burette-50': {
    family: 'burette',
    name: '50 mL burette',
    nominal_mL: 50,
    capacity_mL: 52,
    profile: straight(52, 1.1),
    headroom_cm: 2,
    marks: { first_mL: 0, last_mL: 50, step_mL: 0.1, numbered_mL: 1 },
    scaleFromTop: true,
    readTo_mL: 0.05,
    tolerance_mL: { A: 0.05, B: 0.1 },
  },
  'pipette-5': pipette(5, 0.01),
  'pipette-10': pipette(10, 0.02),
  'pipette-25': pipette(25, 0.03),
  'pipette-50': pipette(50, 0.05),
  waste: {
    family: 'waste',
    name: 'waste bottle',
    nominal_mL: 2000,
    capacity_mL: 2000,
    profile: straight(2000, 12),
    headroom_cm: 2,
    marks: null,
    readTo_mL: 50,
    tolerance_share: 0.05,
  },
} satisfies Record<string, Row>;

export type GlassId = keyof typeof rows;

export const glassware: Readonly<Record<GlassId, Glass>> = Object.fromEntries(
  Object.entries(rows).map(([id, row]: [string, Row]) => [
    id,
    {
      narrow: false,
      canSwirl: false,
      canStopper: false,
      scaleFromTop: false,
      tolerance_mL: null,
      tolerance_share: null,
      nominal_mL: row.capacity_mL,
      ...row,
      id: id as GlassId,
    },
  ]),
) as Record<GlassId, Glass>;

/**
 * Height of a liquid above the inner bottom.
 * @param glass which glass
 * @param volume_mL 0 to its capacity; more is drawn as if the topmost stretch went on
 * @returns centimetres
 */
export function levelOf(glass: Glass, volume_mL: number): number {
  let left = Math.max(0, volume_mL);
  let height = 0;
  const last = glass.profile.length - 1;
  for (const [i, s] of glass.profile.entries()) {
    const whole = (Math.PI * s.height_cm * (s.from_cm ** 2 + s.from_cm * s.to_cm + s.to_cm ** 2)) / 12;
    if (left > whole && i < last) {
      left -= whole;
      height += s.height_cm;
      continue;
    }
    return height + heightIn(s, left);
  }
  return height;
}

/** Height in one stretch: straight by division, conical by the cubic of its cone, which has a closed form. */
function heightIn(s: Stretch, volume_mL: number): number {
  const slope = (s.to_cm - s.from_cm) / s.height_cm;
  if (Math.abs(slope) < 1e-9) return volume_mL / area(s.from_cm);
  const cubed = s.from_cm ** 3 + (12 * slope * volume_mL) / Math.PI;
  return (Math.cbrt(Math.max(0, cubed)) - s.from_cm) / slope;
}

/** Inner width at a height above the bottom, cm. */
export function widthAt(glass: Glass, height_cm: number): number {
  let below = 0;
  let width = 0;
  for (const s of glass.profile) {
    if (height_cm <= below + s.height_cm)
      return s.from_cm + ((s.to_cm - s.from_cm) * (height_cm - below)) / s.height_cm;
    below += s.height_cm;
    width = s.to_cm;
  }
  return width;
}

/**
 * How far light goes through the liquid when the glass is seen from the side: the inner width at half the liquid's height.
 * @returns centimetres, more than 0 also for an empty glass
 */
export function pathOf(glass: Glass, volume_mL: number): number {
  return widthAt(glass, levelOf(glass, volume_mL) / 2);
}

/** Whole height of the inner wall with its rim, cm. */
export const heightOf = (glass: Glass): number =>
  glass.profile.reduce((sum, s) => sum + s.height_cm, glass.headroom_cm);

/** All marks of a glass, mL, from the bottom up (burette: as volumes run out, 0 at the top). */
export function marksOf(glass: Glass): readonly { readonly mL: number; readonly numbered: boolean }[] {
  if (!glass.marks) return [];
  const { first_mL, last_mL, step_mL, numbered_mL } = glass.marks;
  const n = Math.round((last_mL - first_mL) / step_mL);
  return Array.from({ length: n + 1 }, (_, i) => {
    const mL = Math.round((first_mL + i * step_mL) * 1000) / 1000;
    return { mL, numbered: Math.abs(mL / numbered_mL - Math.round(mL / numbered_mL)) < 1e-9 };
  });
}

/** What a burette reads: from the zero mark downwards, mL; negative while filled above zero. */
export const buretteReading = (glass: Glass, volume_mL: number): number => glass.nominal_mL - volume_mL;

/**
 * How much a volume measured with this glass may be off.
 * @param grade tolerance class
 * @returns mL, one-sided
 */
export function toleranceOf(glass: Glass, grade: 'A' | 'B', volume_mL: number): number {
  return glass.tolerance_mL ? glass.tolerance_mL[grade] : (glass.tolerance_share ?? 0) * volume_mL;
}

/**
 * Where a burette's meniscus stands, as a look at its marks tells it: no number between the marks is given.
 * @param volume_mL what the burette holds
 */
export function meniscusOf(glass: Glass, volume_mL: number): string {
  const step = glass.marks?.step_mL ?? 0.1;
  const place = Math.round((buretteReading(glass, volume_mL) / step) * 100) / 100;
  const upper = Math.floor(place);
  const mark = (k: number) => `${(k * step).toFixed(1)} mL mark`;
  const below = place - upper;
  if (place < 0) return 'above the 0.0 mL mark';
  if (below < 0.1) return `at the ${mark(upper)}`;
  if (below < 0.4) return `just below the ${mark(upper)}`;
  if (below <= 0.6) return `half way between the ${mark(upper)} and the ${mark(upper + 1)}`;
  return below > 0.9 ? `at the ${mark(upper + 1)}` : `just above the ${mark(upper + 1)}`;
}
