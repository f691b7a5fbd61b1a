// The headers of every response: pages, errors, assets and 304 alike.
import type { ServerResponse } from 'node:http';
import type { FrontSettings } from './settings.ts';

/**
 * The content security policy. `script-src` and `style-src` of a page come from the framework, which knows the hashes
 * of the inline scripts that start its islands. Style attributes are allowed: SVG, framer-motion and KaTeX set them,
 * and they can neither run nor, with these sources, send anything.
 */
const DIRECTIVES: Record<string, string> = {
  'default-src': "'none'",
  'script-src': "'self'",
  'style-src': "'self'",
  'style-src-attr': "'unsafe-inline'",
  'img-src': "'self' data: blob:",
  'font-src': "'self'",
  'connect-src': "'self'",
  'manifest-src': "'self'",
  'worker-src': "'self'",
  'form-action': "'self'",
  'frame-ancestors': "'none'",
  'base-uri': "'none'",
  'object-src': "'none'",
};

/** Our policy with a page's own sources of scripts and styles; whatever else a page says is not taken over. */
export function policy(ofPage: string | undefined): string {
  const directives = { ...DIRECTIVES };
  for (const part of (ofPage ?? '').split(';')) {
    const [name = '', ...sources] = part.trim().split(/\s+/);
    if (name !== 'script-src' && name !== 'style-src') continue;
    directives[name] = ["'self'", ...sources.filter((source) => /^'sha(256|384|512)-/.test(source))].join(
      ' ',
    );
  }
  return Object.entries(directives)
    .map(([name, sources]) => `${name} ${sources}`)
    .join('; ');
}

const FIXED: Record<string, string> = {
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  // Not `no-referrer`: with it browsers send `Origin: null` when a form is posted.
  'Referrer-Policy': 'same-origin',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'Permissions-Policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=(), browsing-topics=()',
};

/** Types that are text although their name does not start so. */
const TEXT =
  /^(text\/[a-z-]+|application\/(javascript|json|problem\+json|manifest\+json|xml)|image\/svg\+xml)$/i;

export const securityHeaders = (settings: FrontSettings): Record<string, string> => ({
  ...FIXED,
  'Content-Security-Policy': policy(undefined),
  ...(settings.publicUrl.protocol === 'https:' && {
    'Strict-Transport-Security': 'max-age=63072000; includeSubDomains',
  }),
});

type HeaderArgument = Record<string, number | string | readonly string[]> | (string | string[])[];

/** Turns what was handed to `writeHead` into set headers, so that all of them can be read and completed. */
function setAll(response: ServerResponse, headers: HeaderArgument | undefined): void {
  if (!headers) return;
  if (!Array.isArray(headers)) {
    for (const [name, value] of Object.entries(headers)) response.setHeader(name, value);
    return;
  }
  for (let i = 0; i + 1 < headers.length; i += 2) response.appendHeader(String(headers[i]), headers[i + 1]!);
}

/** Calls `complete` once, just before the head of the response is written, with all its headers set. */
export function beforeHead(response: ServerResponse, complete: () => void): void {
  const writeHead = response.writeHead.bind(response) as (status: number, message?: string) => ServerResponse;
  let done = false;
  response.writeHead = (status: number, ...rest: unknown[]) => {
    if (done || response.headersSent) return writeHead(status);
    done = true;
    setAll(
      response,
      rest.find((argument) => typeof argument === 'object' && argument !== null) as HeaderArgument,
    );
    response.statusCode = status;
    complete();
    return writeHead(response.statusCode);
  };
}

/**
 * Sets what every response has.
 * @param carriesCookie the request may be a signed-in person's, whose pages nobody stores
 */
export function completeHeaders(
  response: ServerResponse,
  settings: FrontSettings,
  carriesCookie: boolean,
): void {
  const ofPage = response.getHeader('Content-Security-Policy');
  for (const [name, value] of Object.entries(securityHeaders(settings))) response.setHeader(name, value);
  if (typeof ofPage === 'string') response.setHeader('Content-Security-Policy', policy(ofPage));
  const type = response.getHeader('Content-Type');
  if (typeof type === 'string' && TEXT.test(type))
    response.setHeader('Content-Type', `${type}; charset=utf-8`);
  if (!response.hasHeader('Cache-Control'))
    response.setHeader(
      'Cache-Control',
      carriesCookie || response.statusCode >= 400 ? 'no-store' : 'private, no-cache',
    );
  response.removeHeader('X-Powered-By');
}
