/**
 * XYZ (D65, white 0.9505 1 1.0891) to sRGB. Colours outside are brought in by CSS Color 4's mapping: chroma is reduced in
 * OKLCH until clipping changes the colour by less than the just noticeable difference (0.02 in OKLab).
 */
export type Triple = [number, number, number];

const JND = 0.02;

/** IEC 61966-2-1 / CSS Color 4 matrix, linear light. */
export function linearFromXyz(x: number, y: number, z: number): Triple {
  return [
    3.2409699419045226 * x - 1.537383177570094 * y - 0.4986107602930034 * z,
    -0.9692436362808796 * x + 1.8759675015077202 * y + 0.04155505740717559 * z,
    0.05563007969699366 * x - 0.20397695888897652 * y + 1.0569715142428786 * z,
  ];
}

/** The inverse of `linearFromXyz`: CSS Color 4 matrix. */
export function xyzFromLinear([r, g, b]: Triple): Triple {
  return [
    0.4123907992659595 * r + 0.35758433938387796 * g + 0.1804807884018343 * b,
    0.21263900587151036 * r + 0.7151686787677559 * g + 0.07219231536073371 * b,
    0.01933081871559185 * r + 0.11919477979462599 * g + 0.9505321522496606 * b,
  ];
}

/** Björn Ottosson, A perceptual color space for image processing (2020): linear sRGB to OKLab. */
export function oklabFromLinear([r, g, b]: Triple): Triple {
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b);
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b);
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b);
  return [
    0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s,
  ];
}

function linearFromOklab(lightness: number, a: number, b: number): Triple {
  const l = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const m = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const s = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
  return [
    4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s,
    -1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s,
    -0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s,
  ];
}

const clip = (rgb: Triple): Triple => rgb.map((v) => Math.min(1, Math.max(0, v))) as Triple;
const inside = (rgb: Triple): boolean => rgb.every((v) => v >= -1e-6 && v <= 1 + 1e-6);

function distance(a: Triple, b: Triple): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
}

/** Brings linear sRGB into 0 to 1, keeping lightness and hue. */
export function mapToGamut(rgb: Triple): Triple {
  if (inside(rgb)) return clip(rgb);
  const [L, a, b] = oklabFromLinear(rgb);
  if (L >= 1) return [1, 1, 1];
  if (L <= 0) return [0, 0, 0];
  const chroma = Math.hypot(a, b);
  const at = (c: number): Triple => linearFromOklab(L, (a / chroma) * c, (b / chroma) * c);
  const error = (candidate: Triple, c: number) =>
    distance(oklabFromLinear(clip(candidate)), [L, (a / chroma) * c, (b / chroma) * c]);
  if (error(rgb, chroma) < JND) return clip(rgb);
  let low = 0;
  let high = chroma;
  let lowInside = true;
  while (high - low > 1e-4) {
    const c = (low + high) / 2;
    const candidate = at(c);
    if (lowInside && inside(candidate)) {
      low = c;
      continue;
    }
    const e = error(candidate, c);
    if (e < JND) {
      if (JND - e < 1e-4) return clip(candidate);
      lowInside = false;
      low = c;
    } else high = c;
  }
  return clip(at(low));
}

/** sRGB transfer function, 0 to 255. */
export const encode = (linear: number): number =>
  255 * (linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055);
