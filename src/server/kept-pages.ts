import { createHash } from 'node:crypto';
import { promisify } from 'node:util';
import { brotliCompress, brotliDecompress, constants } from 'node:zlib';

/**
 * Pages kept in a node's memory under everything that they were made from: whose, which revision, what was done. Whoever opens the
 * same page in the same state, a class at its first minute or somebody who comes back, is not waited for. What changes, changes the
 * key; nothing has to be taken out.
 */
const kept = new Map<string, { readonly body: Buffer; readonly headers: [string, string][] }>();
const MOST = 500;
/** A page beyond that is not worth its place. */
const MOST_BYTES = 400_000;

const compress = promisify(brotliCompress);
const decompress = promisify(brotliDecompress);

/** Does this Accept-Encoding take Brotli? A weight of zero is a refusal. */
const takesBrotli = (accepted: string | null): boolean =>
  (accepted ?? '').split(',').some((one) => /^\s*br\s*(;\s*q=(?!0(\.0*)?\s*$)[\d.]+\s*)?$/i.test(one));

/** One name for all that a page was made from. */
export const pageKey = (parts: unknown): string =>
  createHash('sha256').update(JSON.stringify(parts)).digest('base64');

/** The kept page, compressed where the reader takes that; undefined where it has to be made. */
export async function keptPage(key: string, acceptEncoding: string | null): Promise<Response | undefined> {
  const page = kept.get(key);
  if (!page) return undefined;
  // The newest stay: a map keeps its order.
  kept.delete(key);
  kept.set(key, page);
  const headers = new Headers(page.headers);
  if (takesBrotli(acceptEncoding)) {
    headers.set('Content-Encoding', 'br');
    return new Response(new Uint8Array(page.body), { headers });
  }
  return new Response(new Uint8Array(await decompress(page.body)), { headers });
}

/** Keeps a page that was made. Cookies are the request's own and never kept. */
export async function keepPage(key: string, response: Response): Promise<void> {
  if (response.status !== 200 || kept.has(key)) return;
  const html = Buffer.from(await response.clone().arrayBuffer());
  if (html.byteLength > MOST_BYTES) return;
  const headers = [...response.headers].filter(
    ([name]) => name !== 'set-cookie' && name !== 'content-length',
  );
  const params = {
    [constants.BROTLI_PARAM_QUALITY]: 5,
    [constants.BROTLI_PARAM_SIZE_HINT]: html.byteLength,
  };
  const body = await compress(html, { params });
  if (kept.size >= MOST) kept.delete(kept.keys().next().value!);
  kept.set(key, { body, headers });
}
