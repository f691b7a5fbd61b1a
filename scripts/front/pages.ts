// What the front itself answers: Problem Details where a program asked, a small page in the product's look where a
// person did. It stands alone, since it also speaks when nothing behind the front does.
import { createHash } from 'node:crypto';
import type { ServerResponse } from 'node:http';
import type { Refusal } from './refusal.ts';

const STYLE = `
  :root { color-scheme: light }
  body { margin: 0; min-height: 100vh; display: grid; place-items: center; background: #fff; color: #1b2430;
    font: 1.125rem/1.6 Nunito, system-ui, sans-serif }
  main { max-width: 34rem; padding: 2rem }
  h1 { font-size: 1.5rem; line-height: 1.3; margin: 0 0 1rem }
  a { color: #1f4bb8 }
  small { color: #4d5866 }
`;
const STYLE_HASH = `'sha256-${createHash('sha256').update(STYLE).digest('base64')}'`;

const escaped = (text: string): string =>
  text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);

export function page({ title }: Refusal, requestId: string): string {
  return `<!doctype html>
<html lang="en-GB">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escaped(title)} · Dropwise</title><style>${STYLE}</style></head>
<body><main><h1>${escaped(title)}</h1>
<p><a href="/">Back to Dropwise</a></p>
<p><small>If you write to us about this, quote request ${escaped(requestId)}.</small></p>
</main></body></html>
`;
}

export function problem({ status, code, title }: Refusal, requestId: string): string {
  return JSON.stringify({ type: `/problems/${code}`, title, status, code, requestId });
}

/** Did a person's browser ask for a page, rather than a program for data? */
export const wantsPage = (accept: string | undefined): boolean => (accept ?? '').includes('text/html');

export function refuse(response: ServerResponse, refusal: Refusal, requestId: string, accept?: string): void {
  const asPage = wantsPage(accept);
  const body = asPage ? page(refusal, requestId) : problem(refusal, requestId);
  for (const [name, value] of Object.entries(refusal.headers ?? {})) response.setHeader(name, value);
  response.setHeader('Cache-Control', 'no-store');
  response.setHeader(
    'Content-Type',
    asPage ? 'text/html; charset=utf-8' : 'application/problem+json; charset=utf-8',
  );
  if (asPage) response.setHeader('Content-Security-Policy', `style-src ${STYLE_HASH}`);
  response.setHeader('Content-Length', Buffer.byteLength(body));
  response.writeHead(refusal.status);
  response.end(response.req.method === 'HEAD' ? undefined : body);
}
