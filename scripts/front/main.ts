import { randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import compression from 'compression';
import sirv from 'sirv';
import { BodyError, bodyCap, giveBody, readBody } from './body';
import { readFrontConfig } from './config';
import { readiness } from './health';
import { securityHeaders, STRICT_POLICY } from './headers';
import { hostPolicy } from './hosts';
import { createLog } from './log';
import { checkOrigin, isSafe } from './origin';
import { checkPath } from './paths';
import { refuse } from './refuse';

/**
 * The HTTP front: the one place that every request passes before Astro sees it. Canonical paths only, known hosts, own
 * origins for unsafe requests, capped bodies, security headers on every response, compression, static files, health,
 * logs, and an end that loses nothing in flight.
 */
const METHODS = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE']);
const FORWARDED = [
  'x-forwarded-for',
  'x-forwarded-host',
  'x-forwarded-proto',
  'x-forwarded-port',
  'forwarded',
  'x-real-ip',
];
// Astro's routes that this product does not use, closed because known faults of theirs stay open in this version.
const CLOSED = /^\/(_server-islands|_image)(\/|$)/;

const config = readFrontConfig();
const log = createLog(config.LOG_LEVEL);
const hosts = hostPolicy(config);
const root = path.resolve(process.env.DROPWISE_DIST ?? 'dist');
const { handler } = (await import(pathToFileURL(path.join(root, 'server', 'entry.mjs')).href)) as {
  handler: (
    request: IncomingMessage,
    response: ServerResponse,
    next: undefined,
    locals: object,
  ) => Promise<void>;
};
const expectedSchema = process.env.DROPWISE_SCHEMA ?? null;
const serveStatic = sirv(path.join(root, 'client'), {
  dev: false,
  etag: true,
  brotli: true,
  gzip: true,
  setHeaders(response, pathname) {
    response.setHeader('Content-Security-Policy', STRICT_POLICY);
    response.setHeader(
      'Cache-Control',
      pathname.startsWith('/_astro/') ? 'public, max-age=31536000, immutable' : 'public, max-age=3600',
    );
    const type = response.getHeader('Content-Type');
    if (
      typeof type === 'string' &&
      /^(text\/|application\/(javascript|json|manifest))/.test(type) &&
      !type.includes('charset')
    )
      response.setHeader('Content-Type', `${type}; charset=utf-8`);
  },
});
const compress = compression({ threshold: 1024 });
const fixedHeaders = securityHeaders(config.https);
let draining = false;
let inFlight = 0;

async function answer(request: IncomingMessage, response: ServerResponse, requestId: string): Promise<void> {
  const say = (status: number, detail: string) => refuse(request, response, status, detail, requestId);
  if (!METHODS.has(request.method ?? '')) return say(405, 'This method is not used here.');
  const verdict = checkPath(request.url);
  if (!verdict.ok) return say(400, 'The address is not written in its plain form.');
  const { pathname } = verdict;
  if (pathname === '/livez') return plain(response, 200, 'alive');
  if (pathname === '/readyz') {
    if (draining) return plain(response, 503, 'stopping');
    const state = await readiness(config, expectedSchema);
    return plain(
      response,
      state.ready ? 200 : 503,
      state.ready ? `ready, schema ${state.schema}` : `not ready: ${state.reason}`,
    );
  }
  const host = request.headers.host;
  if (!hosts.allowed(host)) return say(421, 'This address is not served here.');
  if (CLOSED.test(pathname)) return say(404, 'There is nothing at this address.');
  const wrong = checkOrigin(request, pathname, hosts.originOf(host!));
  if (wrong) {
    log.warn({ requestId, pathname, reason: wrong }, 'origin refused');
    return say(403, `This request was refused because ${wrong}. Load the page again and try once more.`);
  }
  const client = clientAddress(request);
  for (const name of FORWARDED) delete request.headers[name];
  // What Astro reads as the client's address and protocol comes from here alone.
  request.headers['x-forwarded-for'] = client;
  if (config.https) request.headers['x-forwarded-proto'] = 'https';
  if (!isSafe(request.method)) {
    try {
      giveBody(request, await readBody(request, bodyCap(pathname)));
    } catch (error) {
      if (error instanceof BodyError) return say(error.status, error.message);
      throw error;
    }
  }
  await new Promise<void>((resolve, reject) => {
    response.once('close', resolve);
    const toAstro = () => {
      guardHeaders(response);
      handler(request, response, undefined, { requestId, clientAddress: client }).then(undefined, reject);
    };
    const compressed = () => {
      compress(request as never, response as never, toAstro);
    };
    if (isSafe(request.method)) serveStatic(request, response, compressed);
    else compressed();
  });
}

/** Adds what Astro leaves out to the headers of a rendered answer, just before they are sent. */
function guardHeaders(response: ServerResponse): void {
  const writeHead = response.writeHead.bind(response) as (...parameters: unknown[]) => ServerResponse;
  response.writeHead = ((status: number, ...rest: unknown[]) => {
    const given = rest.find((part) => typeof part === 'object' && part !== null) as
      Record<string, string | string[]> | undefined;
    const names = new Map(Object.entries(given ?? {}).map(([name, value]) => [name.toLowerCase(), value]));
    const type = names.get('content-type');
    if (typeof type === 'string' && type.startsWith('text/') && !type.includes('charset'))
      names.set('content-type', `${type}; charset=utf-8`);
    if (!names.has('content-security-policy')) names.set('content-security-policy', STRICT_POLICY);
    if (!names.has('cache-control')) names.set('cache-control', 'no-store');
    return writeHead(status, Object.fromEntries(names));
  }) as typeof response.writeHead;
}

function plain(response: ServerResponse, status: number, text: string): void {
  response.writeHead(status, {
    'Content-Type': 'text/plain; charset=utf-8',
    'Cache-Control': 'no-store',
    'Content-Security-Policy': STRICT_POLICY,
  });
  response.end(`${text}\n`);
}

function clientAddress(request: IncomingMessage): string {
  const direct = request.socket.remoteAddress ?? '';
  if (config.TRUSTED_PROXIES === 0) return direct;
  const chain = String(request.headers['x-forwarded-for'] ?? '')
    .split(',')
    .map((part) => part.trim())
    .filter(Boolean);
  return chain.at(-config.TRUSTED_PROXIES) ?? direct;
}

const server = createServer(
  { requestTimeout: 30_000, headersTimeout: 10_000, maxHeaderSize: 16 * 1024 },
  (request, response) => {
    const started = performance.now();
    const requestId = randomUUID();
    inFlight += 1;
    for (const [name, value] of Object.entries(fixedHeaders)) response.setHeader(name, value);
    response.setHeader('X-Request-Id', requestId);
    if (draining) response.setHeader('Connection', 'close');
    response.once('close', () => {
      inFlight -= 1;
      const pathname = (request.url ?? '').split('?')[0]!.slice(0, 200);
      const quiet = pathname.startsWith('/_astro/') || pathname === '/livez' || pathname === '/readyz';
      log[quiet ? 'debug' : 'info'](
        {
          requestId,
          method: request.method,
          pathname,
          status: response.statusCode,
          ms: Math.round(performance.now() - started),
        },
        'request',
      );
    });
    answer(request, response, requestId).catch((error: unknown) => {
      log.error({ requestId, err: error }, 'request failed');
      refuse(
        request,
        response,
        500,
        'Something went wrong on our side. Nothing that was saved is lost.',
        requestId,
      );
    });
  },
);
server.keepAliveTimeout = 10_000;

server.once('error', (error: NodeJS.ErrnoException) => {
  const sentence =
    error.code === 'EADDRINUSE' ? `Port ${config.PORT} is taken. Set PORT to another one.` : error.message;
  log.fatal({ err: error }, sentence);
  process.exit(1);
});
server.listen(config.PORT, config.HOST, () => {
  const address = server.address();
  log.info({ port: typeof address === 'object' ? address?.port : config.PORT }, 'listening');
});

/** Readiness goes first, then no new connections; what is in flight is finished, then the process ends. */
function drain(signal: string): void {
  if (draining) return;
  draining = true;
  log.info({ signal, inFlight }, 'draining');
  server.close(() => {
    log.info('stopped');
    process.exit(0);
  });
  const idle = setInterval(() => server.closeIdleConnections(), 100);
  setTimeout(() => {
    clearInterval(idle);
    log.warn({ inFlight }, 'stopped with requests in flight');
    process.exit(0);
  }, config.DRAIN_SECONDS * 1000).unref();
}
process.on('SIGTERM', () => drain('SIGTERM'));
process.on('SIGINT', () => drain('SIGINT'));
process.on('unhandledRejection', (error) => log.error({ err: error }, 'unhandled rejection'));
