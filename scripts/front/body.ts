import type { IncomingMessage } from 'node:http';

const KIB = 1024;

/** Largest body by route, first match counts. Everything else: 64 KiB, which any form of ours fits. */
const CAPS: readonly (readonly [RegExp, number])[] = [
  [/^\/api\/runs\/[^/]+\/moves$/, 512 * KIB],
  [/^\/api\/takeover$/, 2 * KIB * KIB],
  [/^\/desk(\/|$)/, 8 * KIB * KIB],
  [/^\/api\/webhooks\//, 1024 * KIB],
];

/** How long a body may take to arrive, ms. */
const PATIENCE = 15_000;

export function bodyCap(pathname: string): number {
  return CAPS.find(([pattern]) => pattern.test(pathname))?.[1] ?? 64 * KIB;
}

export class BodyError extends Error {
  constructor(
    readonly status: 400 | 408 | 413,
    message: string,
  ) {
    super(message);
  }
}

/**
 * Reads a request's body up to the cap, so that nothing behind the front ever sees more. A stated length that is too
 * large is refused before a byte is read; a body without a length (or with a lie) is cut off at the cap.
 */
export function readBody(request: IncomingMessage, cap: number): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const stated = request.headers['content-length'];
    if (stated !== undefined && Number(stated) > cap) {
      reject(new BodyError(413, `The body may have ${cap} bytes at most.`));
      return;
    }
    const chunks: Buffer[] = [];
    let size = 0;
    const timer = setTimeout(() => finish(new BodyError(408, 'The body took too long to arrive.')), PATIENCE);
    const onData = (chunk: Buffer) => {
      size += chunk.length;
      if (size > cap) finish(new BodyError(413, `The body may have ${cap} bytes at most.`));
      else chunks.push(chunk);
    };
    const onEnd = () => finish();
    const onError = () => finish(new BodyError(400, 'The body broke off.'));
    function finish(error?: BodyError) {
      clearTimeout(timer);
      request.off('data', onData).off('end', onEnd).off('error', onError).off('aborted', onError);
      // What is left of a refused body is thrown away unread by closing the connection after the answer.
      if (error) {
        request.pause();
        reject(error);
      } else resolve(Buffer.concat(chunks));
    }
    request.on('data', onData).on('end', onEnd).on('error', onError).on('aborted', onError);
  });
}

/** Hands a body that was read to Astro's Node adapter, which takes any async iterable without keys of its own. */
export function giveBody(request: IncomingMessage & { body?: unknown }, body: Buffer): void {
  request.body = {
    async *[Symbol.asyncIterator]() {
      if (body.length > 0) yield body;
    },
  };
}
