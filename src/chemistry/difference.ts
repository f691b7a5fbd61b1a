/** How different two colours look: CIE L*a*b* for the white of the pictures (D65), and CIEDE2000. */

/** L*, a*, b* (0 to 100; about -128 to 128). */
export type Lab = readonly [number, number, number];

/** White of sRGB: D65 with x 0.3127, y 0.3290, Y = 1 (IEC 61966-2-1). */
const WHITE = [0.3127 / 0.329, 1, 0.3583 / 0.329] as const;
const EPSILON = 216 / 24389;
const KAPPA = 24389 / 27;

/**
 * CIE 1976 L*a*b* of XYZ with Y of white 1 (CIE 15:2018, section 8.2.1).
 * @param xyz 0 to about 1.1
 */
export function labOf(xyz: readonly [number, number, number]): Lab {
  const [fx, fy, fz] = xyz.map((value, i) => {
    const t = value / WHITE[i]!;
    return t > EPSILON ? Math.cbrt(t) : (KAPPA * t + 16) / 116;
  }) as [number, number, number];
  return [116 * fy - 16, 500 * (fx - fy), 200 * (fy - fz)];
}

const RADIANS = Math.PI / 180;
const seventh = (value: number): number => Math.sqrt(value ** 7 / (value ** 7 + 25 ** 7));
/** Hue angle in degrees, 0 to 360; 0 for grey. */
const hueOf = (a: number, b: number): number =>
  a === 0 && b === 0 ? 0 : (Math.atan2(b, a) / RADIANS + 360) % 360;

/**
 * CIEDE2000 with kL = kC = kH = 1: about 1 is just seen side by side, 2.3 in passing.
 * Sharma G., Wu W., Dalal E.N., Color Res. Appl. 30 (2005) 21, equations 2 to 22.
 */
export function ciede2000([L1, a1, b1]: Lab, [L2, a2, b2]: Lab): number {
  const G = 0.5 * (1 - seventh((Math.hypot(a1, b1) + Math.hypot(a2, b2)) / 2));
  const C1 = Math.hypot((1 + G) * a1, b1);
  const C2 = Math.hypot((1 + G) * a2, b2);
  const h1 = hueOf((1 + G) * a1, b1);
  const h2 = hueOf((1 + G) * a2, b2);
  const grey = C1 * C2 === 0;

  let dh = grey ? 0 : h2 - h1;
  if (dh > 180) dh -= 360;
  else if (dh < -180) dh += 360;
  const dL = L2 - L1;
  const dC = C2 - C1;
  const dH = 2 * Math.sqrt(C1 * C2) * Math.sin((dh / 2) * RADIANS);

  const L = (L1 + L2) / 2;
  const C = (C1 + C2) / 2;
  let h = h1 + h2;
  if (!grey) {
    if (Math.abs(h1 - h2) > 180) h += h < 360 ? 360 : -360;
    h /= 2;
  }
  const T =
    1 -
    0.17 * Math.cos((h - 30) * RADIANS) +
    0.24 * Math.cos(2 * h * RADIANS) +
    0.32 * Math.cos((3 * h + 6) * RADIANS) -
    0.2 * Math.cos((4 * h - 63) * RADIANS);
  const SL = 1 + (0.015 * (L - 50) ** 2) / Math.sqrt(20 + (L - 50) ** 2);
  const SC = 1 + 0.045 * C;
  const SH = 1 + 0.015 * C * T;
  const turn = 30 * Math.exp(-(((h - 275) / 25) ** 2));
  const RT = -2 * seventh(C) * Math.sin(2 * turn * RADIANS);
  return Math.sqrt((dL / SL) ** 2 + (dC / SC) ** 2 + (dH / SH) ** 2 + RT * (dC / SC) * (dH / SH));
}
