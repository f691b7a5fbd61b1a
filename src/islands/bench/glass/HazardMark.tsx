/**
 * Hazard diamonds as they stand on a bottle on the screen: neutral ink, our own simplified drawings. Which bottle carries
 * which is data of the concentration; printed labels use the official pictograms.
 */
const DRAWINGS: Record<string, { readonly words: string; readonly d: string }> = {
  GHS02: {
    words: 'flammable',
    d: 'M 12 6.5 C 14.5 9 15.8 11 15.3 13.4 C 15 15 13.7 16 12 16 C 10.2 16 8.8 14.9 8.7 13.1 C 8.6 11.8 9.4 10.8 10.2 9.9 C 10.5 11 11 11.4 11.5 11.5 C 11.2 9.8 11.4 8 12 6.5 Z M 8.5 17.5 H 15.5',
  },
  GHS03: {
    words: 'oxidising',
    d: 'M 12 10.5 A 3 3 0 1 1 11.99 10.5 M 12 8.8 C 11 7.8 12.6 7 12 5.6 M 8.5 17.8 H 15.5',
  },
  GHS05: {
    words: 'corrosive',
    d: 'M 7.6 8 L 13 9.8 M 12.2 10.8 C 13 12.2 13.2 12.9 12.2 13.6 C 11.2 12.9 11.4 12.2 12.2 10.8 Z M 7.5 16.4 H 10 Q 10.8 16.4 11.1 15.8 Q 12 14.8 13 15.8 Q 13.4 16.4 14.2 16.4 H 16.5',
  },
  GHS06: {
    words: 'toxic',
    d: 'M 12 6.8 C 14 6.8 15 8.2 15 9.6 C 15 10.8 14.2 11.3 14 12.4 H 10 C 9.8 11.3 9 10.8 9 9.6 C 9 8.2 10 6.8 12 6.8 Z M 8.2 13.8 L 15.8 17 M 15.8 13.8 L 8.2 17',
  },
  GHS07: { words: 'harmful or irritant', d: 'M 12 7 L 12 13.2 M 12 16 L 12 16.6' },
  GHS08: {
    words: 'harms health over time',
    d: 'M 12 6.4 A 1.7 1.7 0 1 1 11.99 6.4 M 8.4 17.4 C 8.4 12.4 10 10.8 12 10.8 C 14 10.8 15.6 12.4 15.6 17.4 M 12 12.2 L 12 15.4 M 10.5 13.8 L 13.5 13.8',
  },
  GHS09: {
    words: 'harms the environment',
    d: 'M 7 16.8 H 17 M 10 16.8 V 8 M 10 11 L 7.8 9.2 M 10 9.6 L 12 8 M 12 14.2 C 13.2 12.8 15.2 12.8 16.4 14.2 C 15.2 15.6 13.2 15.6 12 14.2 Z',
  },
};

export function hazardWords(code: string): string {
  return DRAWINGS[code]?.words ?? code;
}

export function HazardMark({ code }: { code: string }) {
  const drawing = DRAWINGS[code];
  if (!drawing) return null;
  return (
    <svg className="hazard" viewBox="0 0 24 24" aria-hidden="true">
      <path className="hazard-edge" d="M 12 1.2 L 22.8 12 L 12 22.8 L 1.2 12 Z" />
      <path className={code === 'GHS07' ? 'hazard-glyph hazard-bold' : 'hazard-glyph'} d={drawing.d} />
    </svg>
  );
}
