import { linearFromXyz, oklabFromLinear } from './gamut.ts';

/**
 * Hues in words by OKLCH angle. The angles are mean hues of the vivid, brilliant and strong centroids of the ISCC-NBS
 * method (Kelly K.L., Judd D.B., NBS Special Publication 440, 1976); the words are plain ones.
 */
const HUES: readonly (readonly [number, string])[] = [
  [2, 'pink-red'],
  [19, 'red'],
  [38, 'orange-red'],
  [57, 'orange'],
  [76, 'orange-yellow'],
  [92, 'yellow'],
  [107, 'yellow'],
  [123, 'yellow-green'],
  [145, 'green'],
  [164, 'green'],
  [186, 'blue-green'],
  [219, 'blue'],
  [236, 'blue'],
  [278, 'violet-blue'],
  [295, 'violet'],
  [319, 'purple'],
  [338, 'magenta'],
];

/** OKLCH chroma below which a solution in a white-lit glass is told apart from water by nobody (dE2000 about 2.3). */
const COLOURLESS = 0.012;

/** The words for a transmitted colour: a hue, and how pale or deep it is. */
export function wordsFor(x: number, y: number, z: number): string {
  const [L, a, b] = oklabFromLinear(linearFromXyz(x, y, z));
  const chroma = Math.hypot(a, b);
  if (chroma < COLOURLESS) return L > 0.93 ? 'colourless' : L > 0.6 ? 'grey' : 'dark grey';
  const angle = ((Math.atan2(b, a) * 180) / Math.PI + 360) % 360;
  let hue = 'red';
  let nearest = Infinity;
  for (const [at, word] of HUES) {
    const d = Math.abs(((angle - at + 540) % 360) - 180);
    if (d < nearest) [nearest, hue] = [d, word];
  }
  if (chroma < 0.03)
    return L > 0.9 ? `very pale ${hue}` : `${hue === 'yellow' || hue === 'orange' ? 'brownish' : hue}-grey`;
  if ((hue === 'red' || hue === 'pink-red' || hue === 'magenta') && L > 0.72)
    return chroma < 0.1 ? 'pale pink' : 'pink';
  if ((hue === 'orange' || hue === 'orange-yellow') && L < 0.6) return 'brown';
  if (hue === 'yellow' && L < 0.6) return 'olive';
  if (chroma < 0.05) return L > 0.75 ? `very pale ${hue}` : `${hue} grey`;
  if (chroma < 0.085 && L > 0.75) return `pale ${hue}`;
  if (L < 0.42) return `deep ${hue}`;
  return hue;
}
