import type { IncomingMessage } from 'node:http';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

export const isSafe = (method: string | undefined): boolean => SAFE.has(method ?? 'GET');

/**
 * Every request that may change something has to come from our own pages, whatever its content type. Browsers send
 * Origin on every unsafe request and Sec-Fetch-Site beside it. Requests of servers (Stripe's webhooks) send neither; they
 * are let through on the paths that check a signature instead.
 * @returns why the request is refused, or null.
 */
export function checkOrigin(request: IncomingMessage, pathname: string, ownOrigin: string): string | null {
  if (isSafe(request.method)) return null;
  const site = request.headers['sec-fetch-site'];
  const origin = request.headers.origin;
  if (pathname.startsWith('/api/webhooks/') && origin === undefined && site === undefined) return null;
  if (site !== undefined && site !== 'same-origin') return 'it came from another site';
  if (origin === undefined) return 'it does not say where it came from';
  if (origin !== ownOrigin) return 'it came from another site';
  return null;
}
