// The front door of the built product, as bytes on the wire and in a browser.
import { readdir } from 'node:fs/promises';
import { CONTENT_TYPES, EVERYWHERE, foreignSenders, OTHER_SPELLINGS } from '../front/lists.ts';
import { exchange, requestText, type Answer } from '../front/wire.ts';
import { PORT, SITE } from './site.ts';
import { expect, test } from './test.ts';

const send = (line: string, headers: Record<string, string | undefined> = {}, body = '') =>
  exchange(PORT, requestText(line, { Host: `127.0.0.1:${PORT}`, ...headers }, body));

function expectHeaders({ status, headers }: Answer, what: string) {
  for (const [name, value] of Object.entries(EVERYWHERE))
    expect(headers[name], `${what} (${status}): ${name}`).toMatch(value);
  if (/text|json|javascript/.test(headers['content-type'] ?? ''))
    expect(headers['content-type'], what).toMatch(/charset=utf-8/);
}

test('other spellings of a path reach nothing', async () => {
  for (const target of OTHER_SPELLINGS) {
    const answer = await send(`GET ${target}`);
    expect(answer.status, target).toBe(400);
    expectHeaders(answer, target);
  }
});

test('a write from a foreign page is refused, whatever its type, also on routes that do not exist', async () => {
  for (const path of ['/', '/api/runs', '/api/answers', '/_actions/signIn', '/nowhere'])
    for (const sender of foreignSenders(SITE))
      for (const type of CONTENT_TYPES) {
        const headers = { ...sender, 'Content-Type': type, 'Content-Length': '2' };
        const answer = await send(`POST ${path}`, headers, '{}');
        expect(answer.status, `${path} ${JSON.stringify(headers)}`).toBe(403);
      }
});

test('a body that is too large is refused on every kind of route', async () => {
  for (const path of ['/', '/api/runs', '/_actions/signIn', '/nowhere']) {
    const answer = await send(
      `POST ${path}`,
      { Origin: SITE, 'Content-Length': '90000000' },
      'x'.repeat(100_000),
    );
    expect(answer.status, path).toBe(413);
    expectHeaders(answer, path);
  }
});

test('routes of the framework that are not used stay closed', async () => {
  for (const path of ['/_server-islands/X', '/_image?href=%2F%2Fevil.example%2Fa.png', '/_image'])
    for (const method of ['GET', 'POST'])
      expect((await send(`${method} ${path}`, { Origin: SITE, 'Content-Length': '0' })).status, path).toBe(
        404,
      );
});

test('TRACE is refused', async () => {
  const answer = await send('TRACE /');
  expect(answer.status).toBe(405);
  expectHeaders(answer, 'TRACE');
});

test('neither the repository nor the configuration is served', async () => {
  for (const path of [
    '/.git/config',
    '/.env',
    '/package.json',
    '/server/entry.mjs',
    '/build.json',
    '/metrics',
    '/_astro',
  ])
    expect((await send(`GET ${path}`)).status, path).toBe(404);
});

test('every response has the security headers: page, error page, asset, not modified', async () => {
  const home = await send('GET /');
  expect(home.status).toBe(200);
  expectHeaders(home, 'home');
  expectHeaders(await send('GET /nowhere', { Accept: 'text/html' }), 'not found');
  expectHeaders(await send('GET /', { Host: 'evil.example' }), 'foreign host');
  const [name] = (await readdir('dist/client/_astro')).filter((file) => /\.(js|css)$/.test(file));
  const asset = `/_astro/${name}`;
  const first = await send(`GET ${asset}`, { 'Accept-Encoding': 'br' });
  expect(first.headers['cache-control']).toBe('public, max-age=31536000, immutable');
  expectHeaders(first, asset);
  const again = await send(`GET ${asset}`, { 'Accept-Encoding': 'br', 'If-None-Match': first.headers.etag });
  expect(again.status).toBe(304);
  expectHeaders(again, 'not modified');
});

test('an endpoint’s error is Problem Details', async () => {
  const answer = await send('GET /api/nowhere', { Accept: 'text/html' });
  expect(answer.headers['content-type']).toBe('application/problem+json; charset=utf-8');
  expect(JSON.parse(answer.body)).toMatchObject({
    status: answer.status,
    requestId: answer.headers['x-request-id'],
  });
});

test('an endpoint’s error reads the same whatever encodings are accepted', async ({ request }) => {
  for (const encodings of ['identity', 'gzip', 'br', 'gzip, deflate, br, zstd'])
    for (const path of ['/api/answers', '/api/runs', '/api/nowhere']) {
      const answer = await request.get(path, { headers: { 'Accept-Encoding': encodings } });
      expect(await answer.json(), `${path} ${encodings}`).toMatchObject({ status: answer.status() });
    }
});

test('pages are compressed and name their character set', async () => {
  const { headers } = await send('GET /', { 'Accept-Encoding': 'br' });
  expect(headers['content-encoding']).toBe('br');
  expect(headers['content-type']).toBe('text/html; charset=utf-8');
});

test('the process is alive and ready', async ({ request }) => {
  expect((await request.get('/livez')).status()).toBe(200);
  expect(await (await request.get('/readyz')).json()).toEqual({ ready: true, database: 'ok' });
});

test('the home page keeps to the content security policy', async ({ page }) => {
  // A violation is a console error, and any of those fails the test.
  await page.goto('/');
  await expect(page.locator('h1')).toBeVisible();
  await page.waitForLoadState('networkidle');
});
