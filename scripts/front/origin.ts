// Cross-site request forgery: a request that may change something comes from a page of our own, whatever its
// content type. Browsers send Origin with each of them, so a request without one is not a browser's.
import type { IncomingMessage } from 'node:http';
import type { Refusal } from './refusal.ts';

const SAFE = new Set(['GET', 'HEAD']);
const KNOWN = new Set([...SAFE, 'POST', 'PUT', 'PATCH', 'DELETE']);

export const isSafe = (method: string | undefined): boolean => SAFE.has(method ?? '');

/** A page is got, or a form is posted to it; endpoints decide for themselves what they take. */
const OF_PAGES = new Set([...SAFE, 'POST']);

export function refuseMethod(method: string | undefined, endpoint: boolean): Refusal | undefined {
  const taken = endpoint ? KNOWN : OF_PAGES;
  if (taken.has(method ?? '')) return undefined;
  const headers = { Allow: [...taken].join(', ') };
  return { status: 405, code: 'method-not-allowed', title: 'This address takes no such request.', headers };
}

export function refuseForeign(request: IncomingMessage, ownOrigin: string): Refusal | undefined {
  if (isSafe(request.method)) return undefined;
  const { origin } = request.headers;
  const site = request.headers['sec-fetch-site'];
  const foreign: Refusal = {
    status: 403,
    code: 'foreign-origin',
    title:
      'This request did not come from a page of Dropwise, so it was not carried out. Open the page again and retry.',
  };
  if (origin !== ownOrigin) return foreign;
  if (site !== undefined && site !== 'same-origin') return foreign;
  return undefined;
}
