import { brotliDecompressSync } from 'node:zlib';
import { expect, test } from 'vitest';
import { keepPage, keptPage, pageKey } from '../../../src/server/kept-pages.ts';

const HTML = '<!doctype html><title>Meeting a buffer</title><p>Bromocresol green, pH 4.7 ± 0.1</p>';
const page = (body = HTML, status = 200) =>
  new Response(body, {
    status,
    headers: {
      'Content-Type': 'text/html; charset=utf-8',
      'Content-Security-Policy': "default-src 'self'",
      'Set-Cookie': 'dropwise=somebody; HttpOnly',
    },
  });

test('a kept page is the page that was made, compressed for whoever takes that', async () => {
  const key = pageKey(['kept']);
  expect(await keptPage(key, 'br')).toBeUndefined();
  await keepPage(key, page());

  const small = (await keptPage(key, 'gzip, deflate, br, zstd'))!;
  expect(small.headers.get('content-encoding')).toBe('br');
  expect(brotliDecompressSync(Buffer.from(await small.arrayBuffer())).toString()).toBe(HTML);

  for (const accepted of [null, 'gzip', 'identity', 'br;q=0', 'gzip, br; q=0.0']) {
    const plain = (await keptPage(key, accepted))!;
    expect(plain.headers.has('content-encoding'), String(accepted)).toBe(false);
    expect(await plain.text()).toBe(HTML);
    expect(plain.headers.get('content-security-policy')).toBe("default-src 'self'");
  }
  expect((await keptPage(key, 'br;q=0.5, gzip;q=0'))!.headers.get('content-encoding')).toBe('br');
});

test('nobody gets another one’s cookie with a kept page', async () => {
  const key = pageKey(['cookie']);
  await keepPage(key, page());
  expect((await keptPage(key, 'br'))!.headers.getSetCookie()).toEqual([]);
});

test('what is kept is still there to be sent', async () => {
  const made = page();
  await keepPage(pageKey(['sent']), made);
  expect(await made.text()).toBe(HTML);
});

test('an error and a page that is too large are not kept', async () => {
  const [error, large] = [pageKey(['error']), pageKey(['large'])];
  await keepPage(error, page(HTML, 500));
  await keepPage(large, page('x'.repeat(400_001)));
  expect(await keptPage(error, 'br')).toBeUndefined();
  expect(await keptPage(large, 'br')).toBeUndefined();
});

test('another person, revision or answer is another page', () => {
  const parts = [1, 3, ['one', 'Mira', null], { answers: [], done: [] }];
  const keys = [
    parts,
    [1, 4, ...parts.slice(2)],
    [1, 3, ['two', 'Mira', null], parts[3]],
    [...parts.slice(0, 3), { answers: [], done: ['which-turns-first'] }],
  ].map(pageKey);
  expect(new Set(keys).size).toBe(keys.length);
  expect(pageKey(structuredClone(parts))).toBe(keys[0]);
});

test('the page that nobody asked for longest gives its place up', async () => {
  const keys = Array.from({ length: 500 }, (_, i) => pageKey(['full', i]));
  for (const key of keys) await keepPage(key, page());
  await keptPage(keys[0]!, 'br');
  await keepPage(pageKey(['full', 'one more']), page());
  expect(await keptPage(keys[0]!, 'br')).toBeDefined();
  expect(await keptPage(keys[1]!, 'br')).toBeUndefined();
});
