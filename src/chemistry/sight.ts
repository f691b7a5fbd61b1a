/** What a colour looks like to eyes that lack one kind of cone, and whether two colours can be told apart. */
import { ciede2000, labOf } from './difference.ts';
import { linearFromXyz, mapToGamut, xyzFromLinear, type Triple } from './gamut.ts';
import type { Colour } from './types.ts';

/** Kinds of sight: all three cones; without long-, middle- or short-wave cones. */
export const SIGHTS = ['typical', 'protan', 'deutan', 'tritan'] as const;
export type Sight = (typeof SIGHTS)[number];

type Matrix = readonly [Triple, Triple, Triple];

/**
 * Machado G.M., Oliveira M.M., Fernandes L.A.F., IEEE Trans. Vis. Comput. Graph. 15 (2009) 1291: severity 1.0. For light, not for
 * the numbers of a picture file: they are applied to linear sRGB.
 */
export const MACHADO: Readonly<Record<Exclude<Sight, 'typical'>, Matrix>> = {
  protan: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deutan: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritan: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

/** Linear sRGB as it is for a kind of sight, within what a screen can show. */
export function seenBy(linear: Triple, sight: Sight): Triple {
  if (sight === 'typical') return linear;
  return MACHADO[sight].map((row) =>
    Math.min(1, Math.max(0, row[0] * linear[0] + row[1] * linear[1] + row[2] * linear[2])),
  ) as Triple;
}

/** The difference between two colours as a screen shows them, for one kind of sight, in CIEDE2000. */
export function differenceFor(one: Colour, other: Colour, sight: Sight): number {
  const [a, b] = [one, other].map(({ xyz }) =>
    labOf(xyzFromLinear(seenBy(mapToGamut(linearFromXyz(...xyz)), sight))),
  ) as [ReturnType<typeof labOf>, ReturnType<typeof labOf>];
  return ciede2000(a, b);
}

/** From this difference on, two liquids in two glasses are told apart without being held side by side. */
export const TOLD_APART = 15;

export interface Differing {
  /** CIEDE2000 for each kind of sight. */
  readonly by: Readonly<Record<Sight, number>>;
  /** The kinds of sight that do not tell them apart. */
  readonly alikeFor: readonly Sight[];
  /** True where every kind of sight tells them apart. */
  readonly everyone: boolean;
}

/**
 * Whether two colours can be told apart, for each kind of sight.
 * @param threshold CIEDE2000 from which on they can (default 15)
 */
export function differ(one: Colour, other: Colour, threshold: number = TOLD_APART): Differing {
  const by = Object.fromEntries(SIGHTS.map((sight) => [sight, differenceFor(one, other, sight)])) as Record<
    Sight,
    number
  >;
  const alikeFor = SIGHTS.filter((sight) => by[sight] < threshold);
  return { by, alikeFor, everyone: alikeFor.length === 0 };
}
