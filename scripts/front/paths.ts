/**
 * Only canonical paths reach the router: what a guard sees must be what is served. Astro 5 maps several spellings of a
 * path to one route, so every other spelling is refused here.
 */
export type PathVerdict = { ok: true; pathname: string } | { ok: false; reason: string };

/** @param target the request target as it came over the wire (origin form). */
export function checkPath(target: string | undefined): PathVerdict {
  if (!target || !target.startsWith('/')) return { ok: false, reason: 'the request target is not a path' };
  if (target.length > 4096) return { ok: false, reason: 'the address is too long' };
  const cut = target.search(/[?#]/);
  const raw = cut === -1 ? target : target.slice(0, cut);
  if (target.includes('#')) return { ok: false, reason: 'a fragment was sent' };
  // eslint-disable-next-line no-control-regex -- control characters are what is looked for
  if (/[\u0000-\u0020\u007f-\uffff\\]/.test(raw))
    return { ok: false, reason: 'a character that has to be encoded' };
  if (raw.includes('//')) return { ok: false, reason: 'an empty path segment' };
  if (/(^|\/)\.{1,2}(\/|$)/.test(raw)) return { ok: false, reason: 'a dot segment' };
  if (/%(?![0-9a-fA-F]{2})/.test(raw)) return { ok: false, reason: 'a broken percent-encoding' };
  // Encoded: unreserved characters (so letters hide behind %61), dots, slashes, backslashes, NUL, the percent sign itself.
  for (const [, hex] of raw.matchAll(/%([0-9a-fA-F]{2})/g)) {
    const code = Number.parseInt(hex!, 16);
    const char = String.fromCharCode(code);
    if (/[A-Za-z0-9\-._~/\\%]/.test(char) || code < 0x20 || code === 0x7f)
      return { ok: false, reason: 'a character that must not be encoded' };
  }
  if (raw.length > 1 && raw.endsWith('/')) return { ok: false, reason: 'a slash at the end' };
  return { ok: true, pathname: raw };
}
