// The HTTP front: everything that comes in passes here before the framework's handler sees it.
import compression from 'compression';
import { randomUUID } from 'node:crypto';
import {
  createServer,
  STATUS_CODES,
  type IncomingMessage,
  type Server,
  type ServerResponse,
} from 'node:http';
import type { Logger } from 'pino';
import { clientAddress, setForwardedHeaders } from './addresses.ts';
import { createAssets } from './assets.ts';
import { capOf, handOver, readBody } from './bodies.ts';
import { answerWithProblem, isEndpoint } from './endpoints.ts';
import { beforeHead, completeHeaders, securityHeaders } from './headers.ts';
import { answerHealth, type AskReadiness } from './health.ts';
import { originOf } from './hosts.ts';
import { isSafe, refuseForeign, refuseMethod } from './origin.ts';
import { refuse } from './pages.ts';
import { readTarget } from './paths.ts';
import type { Refusal } from './refusal.ts';
import type { FrontSettings } from './settings.ts';

/** The framework's handler in middleware mode. Without `next` it shows its own 404 page. */
export type Handler = (
  request: IncomingMessage,
  response: ServerResponse,
  next: undefined,
  locals: { requestId: string },
) => Promise<void> | void;

export interface FrontParts {
  settings: FrontSettings;
  handler: Handler;
  /** The folder of the built client. */
  client: string;
  askReadiness: AskReadiness;
  log: Logger;
  /** Tells one process of a site from another, also from one that was there before. */
  instance?: string;
  /** How long a request's body may take. */
  bodyPatience_ms?: number;
}

export interface Front {
  server: Server;
  /** Stops: readiness first, then new connections, then waits for what is in flight. */
  drain(): Promise<void>;
}

const HEADERS_MS = 10_000;
const REQUEST_MS = 60_000;
const BODY_MS = 30_000;
const IN_FLIGHT_MS = 20_000;

export function createFront(parts: FrontParts): Front {
  const { settings, handler, askReadiness, log, instance = randomUUID(), bodyPatience_ms = BODY_MS } = parts;
  const assets = createAssets(parts.client);
  // Brotli's fourth level costs a page a fraction of a millisecond, and is smaller than gzip's best.
  // An endpoint's error is written anew under its head, below the compressor: it must not have begun by then.
  const compress = compression({
    threshold: 1024,
    filter: (request, response) =>
      !(isEndpoint(request.url ?? '') && response.statusCode >= 400) && compression.filter(request, response),
  });
  const state = { draining: false, ask: askReadiness, instance };

  async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const began = process.hrtime.bigint();
    const requestId = randomUUID();
    const { method = 'GET', url = '/' } = request;
    const client = clientAddress(request, settings);
    const target = readTarget(url);
    const path = 'path' in target ? target.path : url.split('?', 1)[0]!;
    const carriesCookie = request.headers.cookie !== undefined;

    response.setHeader('X-Request-Id', requestId);
    beforeHead(response, () => {
      if (isEndpoint(path)) answerWithProblem(response, requestId);
      completeHeaders(response, settings, carriesCookie);
      if (state.draining) response.setHeader('Connection', 'close');
    });
    response.once('close', () => {
      const line = {
        requestId,
        method,
        path: path.slice(0, 512),
        status: response.statusCode,
        ms: Number(process.hrtime.bigint() - began) / 1e6,
        client,
        ...(!response.writableFinished && { broken: true }),
      };
      if (response.statusCode >= 500) log.error(line, 'request failed');
      else if (path === '/livez' || path === '/readyz') log.debug(line, 'request');
      else log.info(line, 'request');
    });
    const refuseWith = (refusal: Refusal) => {
      if (refusal.status === 403)
        log.warn({ requestId, code: refusal.code, origin: request.headers.origin }, 'refused');
      refuse(response, refusal, requestId, request.headers.accept);
    };

    const wrongMethod = refuseMethod(method, isEndpoint(path));
    if (wrongMethod) return refuseWith(wrongMethod);
    if ('refusal' in target) return refuseWith(target.refusal);
    if (await answerHealth(path, response, state)) return;

    const ownOrigin = originOf(request.headers.host, settings);
    if (!ownOrigin) return refuseWith(UNKNOWN_HOST);
    const foreign = refuseForeign(request, ownOrigin);
    if (foreign) return refuseWith(foreign);
    if ('moved' in target) {
      if (!isSafe(method)) return refuseWith(NOT_CANONICAL);
      response.setHeader('Location', target.moved);
      response.writeHead(308);
      return void response.end();
    }

    if (isSafe(method)) {
      if (assets(request, response)) return;
      handOver(request, Buffer.alloc(0));
    } else {
      const body = await readBody(request, { cap: capOf(path), patience_ms: bodyPatience_ms });
      if (!Buffer.isBuffer(body)) return refuseWith(body);
      handOver(request, body);
    }
    setForwardedHeaders(request, client, ownOrigin.startsWith('https:') ? 'https' : 'http');
    await new Promise<void>((resolve) => compress(request as never, response as never, () => resolve()));
    await handler(request, response, undefined, { requestId });
  }

  const server = createServer(
    {
      headersTimeout: HEADERS_MS,
      requestTimeout: REQUEST_MS,
      connectionsCheckingInterval: 1000,
      maxHeaderSize: 16_384,
    },
    (request, response) => {
      answer(request, response).catch((error: unknown) => {
        log.error({ err: error }, 'a request could not be answered');
        if (response.headersSent) response.destroy();
        else refuse(response, INTERNAL, String(response.getHeader('X-Request-Id')), request.headers.accept);
      });
    },
  );
  server.on('clientError', (error: NodeJS.ErrnoException, socket) => {
    if (!socket.writable || error.code === 'ECONNRESET') return void socket.destroy();
    socket.end(brokenRequest(error.code, settings));
  });

  return { server, drain: () => drain(server, state, settings) };
}

const UNKNOWN_HOST: Refusal = {
  status: 421,
  code: 'unknown-host',
  title: 'This site is not known under that name.',
};
const NOT_CANONICAL: Refusal = {
  status: 400,
  code: 'path-not-canonical',
  title: 'This address is not spelt the way it should be.',
};
const INTERNAL: Refusal = {
  status: 500,
  code: 'internal-error',
  title: 'Something went wrong on our side. Nothing that was accepted is lost; try again in a moment.',
};

/** What a request gets that the parser could not read: there is no response object then, so it is written by hand. */
function brokenRequest(code: string | undefined, settings: FrontSettings): string {
  const known: Record<string, number> = { HPE_HEADER_OVERFLOW: 431, ERR_HTTP_REQUEST_TIMEOUT: 408 };
  const status = known[code ?? ''] ?? 400;
  const headers = Object.entries({
    ...securityHeaders(settings),
    Connection: 'close',
    'Content-Length': '0',
    'Cache-Control': 'no-store',
  });
  return [
    `HTTP/1.1 ${status} ${STATUS_CODES[status]}`,
    ...headers.map(([name, value]) => `${name}: ${value}`),
    '',
    '',
  ].join('\r\n');
}

async function drain(
  server: Server,
  state: { draining: boolean },
  { drain_ms }: FrontSettings,
): Promise<void> {
  if (state.draining) return;
  state.draining = true;
  // While a balancer learns that we are not ready any more, and open connections carry their last request, all goes
  // on as before; each answer then closes its connection.
  await new Promise((resolve) => setTimeout(resolve, drain_ms));
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  const idle = setInterval(() => server.closeIdleConnections(), 100);
  const giveUp = setTimeout(() => server.closeAllConnections(), IN_FLIGHT_MS);
  await closed;
  clearInterval(idle);
  clearTimeout(giveUp);
}
