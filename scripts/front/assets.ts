// The built client: hashed files for a year, the rest for an hour; compressed once, when it was built.
import type { IncomingMessage, ServerResponse } from 'node:http';
import sirv from 'sirv';

const YEAR_S = 31_536_000;
const HOUR_S = 3600;

export function createAssets(
  folder: string,
): (request: IncomingMessage, response: ServerResponse) => boolean {
  const serve = sirv(folder, {
    brotli: true,
    gzip: true,
    etag: true,
    extensions: [],
    setHeaders(response, pathname) {
      const lasting = pathname.startsWith('/_astro/');
      response.setHeader(
        'Cache-Control',
        lasting ? `public, max-age=${YEAR_S}, immutable` : `public, max-age=${HOUR_S}`,
      );
    },
  });
  return (request, response) => {
    // Parts of a file are of no use here, and a range that ends before it starts is one more thing to get wrong.
    delete request.headers.range;
    let found = true;
    serve(request, response, () => {
      found = false;
    });
    return found;
  };
}
