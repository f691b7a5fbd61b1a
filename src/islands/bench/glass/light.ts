/** Colour arithmetic for drawing only; which colour a liquid has comes from the engine. */
const toLinear = (channel: number): number => {
  const c = channel / 255;
  return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
};
const fromLinear = (c: number): number =>
  Math.round(255 * (c <= 0.0031308 ? 12.92 * c : 1.055 * c ** (1 / 2.4) - 0.055));

type Rgb = readonly [number, number, number];

/** WCAG relative luminance, 0 to 1. */
export function luminance([r, g, b]: Rgb): number {
  return 0.2126 * toLinear(r) + 0.7152 * toLinear(g) + 0.0722 * toLinear(b);
}

/** Etched marks over a liquid are white below this luminance, so that they keep at least 3:1. */
export const ETCH_TURNS_WHITE = 0.3;

/** The colour of a liquid's surface line: the liquid's, times 0.64 in linear light. */
export function surfaceOf([r, g, b]: Rgb): string {
  const line = [r, g, b].map((c) => fromLinear(toLinear(c) * 0.64));
  return `rgb(${line.join(' ')})`;
}

export interface Paint {
  readonly fill: string;
  readonly surface: string;
  /** Etched marks over it are drawn white. */
  readonly dark: boolean;
}

/** Any colourless liquid, and glass of which the bench hides the colour. */
const WATER: Paint = { fill: '#eaeaea', surface: '#9a9da1', dark: false };

const cache = new Map<string, Paint>();

function channels(hex: string): Rgb {
  const value = Number.parseInt(hex.slice(1), 16);
  return [(value >> 16) & 255, (value >> 8) & 255, value & 255];
}

/** Fill, surface line and whether etched marks turn white, for a computed colour. Colourless liquid has its own grey. */
export function paint(colour: { readonly hex: string; readonly words: string } | null | undefined): Paint {
  if (!colour || colour.words === 'colourless') return WATER;
  let made = cache.get(colour.hex);
  if (!made) {
    const rgb = channels(colour.hex);
    made = { fill: colour.hex, surface: surfaceOf(rgb), dark: luminance(rgb) < ETCH_TURNS_WHITE };
    if (cache.size > 400) cache.clear();
    cache.set(colour.hex, made);
  }
  return made;
}
