import { solve } from './equilibrium.ts';
import { encode, linearFromXyz, mapToGamut } from './gamut.ts';
import { indicatorData } from './indicatorData';
import { WX, WY, WZ } from './observer.ts';
import { wordsFor } from './words.ts';
import type { Colour, Equilibrium, Model, Solution } from './types.ts';

const table = new Map<string, Float64Array>();
for (const [id, d] of Object.entries(indicatorData))
  for (const form of d.forms)
    table.set(
      `${id} ${form.name}`,
      Float64Array.from({ length: 41 }, (_, i) => {
        const nu = 1e7 / (380 + 10 * i);
        return form.bands.reduce(
          (sum, [nu0, eps, sigma]) => sum + eps * Math.exp(-(((nu - nu0) / sigma) ** 2) / 2),
          0,
        );
      }),
    );

const absorbance = new Float64Array(41);
/** Colour of light that passed a path through the solution: Beer-Lambert, D65, CIE 1931 2°, sRGB. */
export function colour(solution: Solution, path_cm: number, by: Model | Equilibrium): Colour {
  const equilibrium = typeof by === 'string' ? solve(solution, by) : by;
  absorbance.fill(0);
  const litres = solution.volume_nL * 1e-9;
  for (const species of equilibrium.species) {
    const eps = table.get(species.name);
    if (!eps) continue;
    const c = (species.amount_mol / litres) * path_cm;
    for (let i = 0; i < 41; i++) absorbance[i]! += c * eps[i]!;
  }
  let X = 0,
    Y = 0,
    Z = 0;
  for (let i = 0; i < 41; i++) {
    const t = 10 ** -absorbance[i]!;
    X += t * WX[i]!;
    Y += t * WY[i]!;
    Z += t * WZ[i]!;
  }
  const srgb = mapToGamut(linearFromXyz(X, Y, Z)).map((v) => Math.round(encode(v))) as [
    number,
    number,
    number,
  ];
  const hex = '#' + srgb.map((v) => v.toString(16).padStart(2, '0')).join('');
  return { xyz: [X, Y, Z], srgb, hex, words: wordsFor(X, Y, Z) };
}
