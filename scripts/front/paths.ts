// One address has one spelling. The framework behind the front decodes and normalises paths in its own way; a guard
// and a router that read the same path differently are a way around the guard, so other spellings never get there.
import type { Refusal } from './refusal.ts';

const LONGEST_TARGET = 4096;

/** Routes of the framework that Dropwise does not use: an unbounded body, and a decoder of foreign images. */
const CLOSED = ['/_server-islands', '/_image', '/_astro-dev', '/@fs', '/@id', '/@vite'];

/** Visible ASCII without what a path must encode or must not contain: quotes, <>, \, ^, `, {|}, #. */
const ALLOWED = /^[A-Za-z0-9\-._~!$&'()*+,;=:@%/]*$/;

/** Encoded characters that have a plain spelling, or that change what the path means once decoded. */
function needlesslyEncoded(hex: string): boolean {
  const character = String.fromCharCode(parseInt(hex, 16));
  return /[A-Za-z0-9\-._~/\\%\u0000-\u001f\u007f]/.test(character); // eslint-disable-line no-control-regex
}

const refuse = (status: number, code: string, title: string): Refusal => ({ status, code, title });
const NOT_CANONICAL = refuse(400, 'path-not-canonical', 'This address is not spelt the way it should be.');
const NOT_FOUND = refuse(404, 'not-found', 'There is nothing at this address.');

/**
 * Judges a request's target.
 * @param target the request line's own text, e.g. `/lessons?page=2`
 * @returns `path`; or where GET is to be sent instead; or why the request is refused
 */
export function readTarget(
  target: string,
): { path: string; query: string } | { moved: string } | { refusal: Refusal } {
  if (target.length > LONGEST_TARGET)
    return { refusal: refuse(414, 'address-too-long', 'This address is too long.') };
  const mark = target.indexOf('?');
  const path = mark < 0 ? target : target.slice(0, mark);
  const query = mark < 0 ? '' : target.slice(mark);
  if (!path.startsWith('/') || !ALLOWED.test(path)) return { refusal: NOT_CANONICAL };
  if (/[^\u0021-\u007e]/.test(query)) return { refusal: NOT_CANONICAL };
  if (path.includes('//')) return { refusal: NOT_CANONICAL };
  if (path.split('/').some((segment) => segment === '.' || segment === '..'))
    return { refusal: NOT_CANONICAL };
  for (const [, hex] of path.matchAll(/%(.{0,2})/g))
    if (!/^[0-9A-Fa-f]{2}$/.test(hex!) || needlesslyEncoded(hex!)) return { refusal: NOT_CANONICAL };
  try {
    decodeURIComponent(path);
  } catch {
    return { refusal: NOT_CANONICAL };
  }
  if (CLOSED.some((closed) => path === closed || path.startsWith(`${closed}/`)))
    return { refusal: NOT_FOUND };
  if (path !== '/' && path.endsWith('/')) return { moved: path.slice(0, -1) + query };
  return { path, query };
}
