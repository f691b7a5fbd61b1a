import { STATUS_CODES, type IncomingMessage, type ServerResponse } from 'node:http';
import { STRICT_POLICY } from './headers';

/** Answers a request that never reaches the application: Problem Details (RFC 9457) for programs, a plain page for people. */
export function refuse(
  request: IncomingMessage,
  response: ServerResponse,
  status: number,
  detail: string,
  requestId: string,
): void {
  if (response.headersSent) {
    response.destroy();
    return;
  }
  const title = STATUS_CODES[status] ?? 'Error';
  const people = (request.headers.accept ?? '').includes('text/html');
  const body = people
    ? `<!doctype html><html lang="en"><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${title} · Dropwise</title>` +
      `<main><h1>${title}</h1><p>${detail}</p><p>Request ${requestId}</p><p><a href="/">Go to the first page</a></p></main></html>`
    : JSON.stringify({ type: 'about:blank', title, status, detail, requestId });
  response.writeHead(status, {
    'Content-Type': people ? 'text/html; charset=utf-8' : 'application/problem+json; charset=utf-8',
    'Content-Length': Buffer.byteLength(body),
    'Cache-Control': 'no-store',
    'Content-Security-Policy': STRICT_POLICY,
    ...(status === 405 ? { Allow: 'GET, HEAD, POST, PUT, PATCH, DELETE' } : {}),
    // The rest of a refused body is not waited for.
    ...(request.complete ? {} : { Connection: 'close' }),
  });
  response.end(request.method === 'HEAD' ? undefined : body);
}
