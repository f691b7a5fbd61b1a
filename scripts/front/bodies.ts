// Bodies are read here, up to what their route needs, before the framework sees the request: what it says of its own
// length is not believed, and a slow or endless one is given up.
import type { IncomingMessage } from 'node:http';
import type { Refusal } from './refusal.ts';

const KB = 1024;

/** The largest body of each route, first match. */
const CAPS: [RegExp, number][] = [
  [/^\/api\/runs\/[^/]+\/moves$/, 256 * KB],
  [/^\/api\/takeover$/, 1024 * KB],
  // A lesson of the greatest length, in characters of three bytes, as a form sends them.
  [/^\/desk$/, 1024 * KB],
];
const USUAL_CAP = 64 * KB;

export const capOf = (path: string): number => CAPS.find(([pattern]) => pattern.test(path))?.[1] ?? USUAL_CAP;

/** How long a refused body is still read and thrown away, so that the client gets to read its answer. */
const DISCARD_MS = 1000;

const readable = (bytes: number): string => `${Math.round(bytes / KB)} kB`;

export interface BodyLimits {
  cap: number;
  patience_ms: number;
}

/** Reads a whole body, or answers why it is refused. */
export function readBody(
  request: IncomingMessage,
  { cap, patience_ms }: BodyLimits,
): Promise<Buffer | Refusal> {
  return new Promise((resolve) => {
    const chunks: Buffer[] = [];
    let size = 0;
    let refusal: Refusal | undefined;
    const finish = (answer: Buffer | Refusal) => {
      clearTimeout(timer);
      request.off('data', take);
      request.resume();
      resolve(answer);
    };
    const refuse = (reason: Refusal) => {
      refusal = { ...reason, headers: { Connection: 'close' } };
      chunks.length = 0;
      clearTimeout(timer);
      timer = setTimeout(() => finish(refusal!), DISCARD_MS);
    };
    const tooLarge: Refusal = {
      status: 413,
      code: 'body-too-large',
      title: `This is more than the ${readable(cap)} that can be sent here at once.`,
    };
    const take = (chunk: Buffer) => {
      if (refusal) return;
      size += chunk.length;
      if (size > cap) refuse(tooLarge);
      else chunks.push(chunk);
    };
    let timer = setTimeout(
      () =>
        finish({
          status: 408,
          code: 'body-too-slow',
          title: 'The request took too long to arrive.',
          headers: { Connection: 'close' },
        }),
      patience_ms,
    );
    if (Number(request.headers['content-length'] ?? 0) > cap) refuse(tooLarge);
    request.on('data', take);
    request.once('end', () => finish(refusal ?? Buffer.concat(chunks)));
    request.once('error', () =>
      finish(refusal ?? { status: 400, code: 'body-broken', title: 'The request broke off before its end.' }),
    );
  });
}

/**
 * Hands a body that was read to the framework, which takes an async iterable of chunks from `request.body`. It must
 * have no enumerable member: those would be sent on as JSON.
 */
export function handOver(request: IncomingMessage, body: Buffer): void {
  Object.assign(request, {
    body: {
      async *[Symbol.asyncIterator]() {
        if (body.length > 0) yield body;
      },
    },
  });
}
