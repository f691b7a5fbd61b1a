/** Shapes that every other room stands on. Amounts in mol, volumes in whole nanolitres, temperatures in °C. */

/** Which set of constants and activity coefficients a number was computed with. */
export type Model = 'textbook' | 'real';

/**
 * Amounts of components in mol, by component id: an acid family by its catalogue id ('ethanoic', 'phosphoric',
 * 'ammonium'), a strong ion by formula ('Na+', 'Cl-', 'SO4-2' is not one: 'sulfuric' is a family), an indicator by
 * its id ('bromocresol-green'). How far a family is protonated is never stored: the charge balance decides it.
 */
export type Amounts = Readonly<Record<string, number>>;

/** A liquid. Immutable; made by `createSolution`, `mix`, `take`. */
export interface Solution {
  /** Whole nanolitres, 0 or more. */
  readonly volume_nL: number;
  /** 0 to 60 °C. */
  readonly temperature_C: number;
  readonly amounts: Amounts;
  /** Set where the liquid stands in equilibrium with a gas; the carbonic family's amount then follows from it. */
  readonly gas?: { readonly co2_atm: number };
}

/** One dissolved species at equilibrium. */
export interface Species {
  /** Formula with charge, as it is shown: 'CH3COO-', 'H3O+', 'HIn-'. */
  readonly name: string;
  /** Component id that it belongs to, or 'water' for H3O+ and OH-. */
  readonly component: string;
  readonly charge: number;
  readonly amount_mol: number;
}

/** The answer of `solve`. */
export interface Equilibrium {
  readonly model: Model;
  /** -log10 of the activity of H+ (textbook: of its concentration). */
  readonly pH: number;
  /** mol/L. */
  readonly ionicStrength: number;
  readonly species: readonly Species[];
  /** Plain sentences, e.g. where a constant is used outside its fitted range. Empty when all is inside. */
  readonly warnings: readonly string[];
}

/** The answer of `colour`. */
export interface Colour {
  /** CIE 1931 2°, D65, white = (0.9505, 1, 1.0891). */
  readonly xyz: readonly [number, number, number];
  /** 0 to 255, gamut-mapped sRGB. */
  readonly srgb: readonly [number, number, number];
  readonly hex: string;
  /** The colour in words: 'blue-green', 'pale yellow', 'colourless'. */
  readonly words: string;
}
