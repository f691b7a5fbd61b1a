/** What a course and its reader switch: how numbers and units are written. Values never change with it. */
export interface Conventions {
  readonly decimal: '.' | ',';
  readonly concentration: 'mol/L' | 'mol dm⁻³' | 'M';
  readonly volume: 'mL' | 'cm³';
  /** The rule for the digits of a pH: two decimals always, or as many as its concentration has significant figures. */
  readonly pH: 'two decimals' | 'significant figures';
}

export const USUAL: Conventions = {
  decimal: '.',
  concentration: 'mol/L',
  volume: 'mL',
  pH: 'two decimals',
};

/** Every way that can be chosen, the usual one first. */
export const CONVENTIONS: { readonly [K in keyof Conventions]: readonly Conventions[K][] } = {
  decimal: ['.', ','],
  concentration: ['mol/L', 'mol dm⁻³', 'M'],
  volume: ['mL', 'cm³'],
  pH: ['two decimals', 'significant figures'],
};

/** What readers of a language are used to: its decimal sign, and the rest as usual. */
export function usualIn(lang: string): Conventions {
  const sign = new Intl.NumberFormat(lang).formatToParts(1.5).find(({ type }) => type === 'decimal')?.value;
  return { ...USUAL, decimal: sign === ',' ? ',' : '.' };
}

/** Conventions as they were stored; what is missing or unknown is as in `usual`. */
export function conventionsFrom(
  stored: Readonly<Record<string, unknown>> | null | undefined,
  usual: Conventions = USUAL,
): Conventions {
  const pick = <K extends keyof Conventions>(name: K): Conventions[K] =>
    CONVENTIONS[name].find((one) => one === stored?.[name]) ?? usual[name];
  return {
    decimal: pick('decimal'),
    concentration: pick('concentration'),
    volume: pick('volume'),
    pH: pick('pH'),
  };
}

/** The name of a unit of amount per volume, whatever its prefix. */
export const concentrationName = (prefix: string, { concentration }: Conventions): string =>
  concentration === 'M' ? `${prefix}M` : prefix + concentration;

/**
 * A sentence in a reader's conventions: decimal signs, and units that stand in it. For plain text; numbers that stand
 * there already in these conventions stay.
 */
export function wordsIn(text: string, conventions: Conventions): string {
  let words = text;
  if (conventions.decimal === ',') words = words.replace(/(\d)\.(?=\d)/g, '$1,');
  if (conventions.concentration !== 'mol/L')
    words = words.replace(/([mµ]?)mol\/L/g, (_, prefix: string) => concentrationName(prefix, conventions));
  if (conventions.volume === 'cm³')
    words = words
      .replace(/\bmL\b/g, 'cm³')
      .replace(/\bg\/L\b/g, 'g dm⁻³')
      .replace(/(\d[\s\u00a0])L\b/g, '$1dm³');
  return words;
}

/** The same for HTML: what stands between its tags, but code and the sources of formulas. */
export function htmlIn(html: string, conventions: Conventions): string {
  if (wordsIn('1.5 mol/L, 1 mL', conventions) === '1.5 mol/L, 1 mL') return html;
  let closed: string | null = null;
  return html.replace(/<(\/?)([a-z][a-z0-9]*)[^>]*>|[^<]+/gi, (part, slash?: string, tag?: string) => {
    if (tag === undefined) return closed ? part : wordsIn(part, conventions);
    if (closed && slash && tag === closed) closed = null;
    else if (!closed && !slash && (tag === 'code' || tag === 'annotation')) closed = tag;
    return part;
  });
}
