import { mkdtemp, mkdir, rm, writeFile } from 'node:fs/promises';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Readiness } from '../../../scripts/front/health.ts';
import { createLog } from '../../../scripts/front/log.ts';
import { createFront, type Front, type Handler } from '../../../scripts/front/server.ts';
import { readSettings } from '../../../scripts/front/settings.ts';
import { CONTENT_TYPES, EVERYWHERE, foreignSenders, OTHER_SPELLINGS } from '../../front/lists.ts';
import { exchange, requestText } from '../../front/wire.ts';

const OWN = 'http://127.0.0.1:4321';
const environment = { PUBLIC_URL: OWN, DATABASE_PASSWORD: 'x', DRAIN_SECONDS: '0.1', DEMO: 'true' };
const settings = readSettings(environment);

let folder: string;
let lines: string[];
let seen: { url: string | undefined; headers: Record<string, unknown>; body: string }[] = [];
let readiness: Readiness = { ready: true, database: 'ok' };
const fronts: Front[] = [];

/** Stands where the framework does: notes what reaches it and answers in the framework's way. */
const handler: Handler = async (request, response) => {
  const chunks: Buffer[] = [];
  for await (const chunk of (request as unknown as { body: AsyncIterable<Buffer> }).body) chunks.push(chunk);
  seen.push({ url: request.url, headers: { ...request.headers }, body: Buffer.concat(chunks).toString() });
  const path = request.url?.split('?')[0];
  if (path === '/throws') throw new Error('password=hunter2');
  if (path === '/slow') await new Promise((done) => setTimeout(done, 400));
  const status = path === '/api/broken' ? 500 : path === '/api/nothing' ? 404 : 200;
  response.writeHead(status, {
    'content-type': 'text/html',
    'content-security-policy':
      "script-src 'self' 'sha256-abc=' https://evil.example; style-src 'self'; img-src *",
  });
  response.end(`<h1>${'page '.repeat(400)}</h1>`);
};

async function listen(changes: Partial<Parameters<typeof createFront>[0]> = {}): Promise<number> {
  const log = createLog('info', { write: (line: string) => void lines.push(line) });
  const front = createFront({
    settings,
    handler,
    client: folder,
    askReadiness: async () => readiness,
    log,
    bodyPatience_ms: 300,
    ...changes,
  });
  fronts.push(front);
  await new Promise<void>((done) => front.server.listen(0, '127.0.0.1', done));
  return (front.server.address() as AddressInfo).port;
}

let port: number;
beforeAll(async () => {
  lines = [];
  folder = await mkdtemp(join(tmpdir(), 'front-'));
  await mkdir(join(folder, '_astro'));
  await writeFile(join(folder, '_astro/bench.abc.js'), 'export const x = 1;');
  await writeFile(join(folder, '_astro/bench.abc.js.br'), 'compressed');
  await writeFile(join(folder, 'robots.txt'), 'User-agent: *');
  port = await listen();
});
afterAll(async () => {
  await Promise.all(fronts.map((front) => front.drain()));
  await rm(folder, { recursive: true });
});

const get = (path: string, headers = {}) => exchange(port, requestText(`GET ${path}`, headers));
const post = (path: string, headers: Record<string, string | undefined>, body: string) =>
  exchange(
    port,
    requestText(`POST ${path}`, { Origin: OWN, 'Content-Length': String(body.length), ...headers }, body),
  );

describe('paths', () => {
  it.each(OTHER_SPELLINGS)('refuses %j before anything behind it sees it', async (target) => {
    seen = [];
    const { status } = await get(target);
    expect(status).toBe(400);
    expect(seen).toEqual([]);
  });

  it('lets canonical ones through as they stand, with encoded text and queries', async () => {
    for (const target of [
      '/',
      '/lessons/bufferl%C3%B6sung',
      '/a-b_c.d~e?next=%2Flessons%2F..&q=a+b',
      '/@me/x;y=1',
    ]) {
      seen = [];
      expect((await get(target)).status).toBe(200);
      expect(seen[0]?.url).toBe(target);
    }
  });

  it('sends a slash at the end where the page is, and never to another site', async () => {
    const moved = await get('/lessons/?page=2');
    expect([moved.status, moved.headers.location]).toEqual([308, '/lessons?page=2']);
    expect((await post('/lessons/', {}, 'a=1')).status).toBe(400);
    expect((await get('//evil.example/')).headers.location).toBeUndefined();
  });

  it.each(['/_server-islands/X', '/_image?href=/x', '/_image'])('keeps %s closed', async (path) => {
    seen = [];
    expect((await get(path)).status).toBe(404);
    expect((await post(path, {}, 'x'.repeat(100))).status).toBe(404);
    expect(seen).toEqual([]);
  });

  it('refuses an endless one', async () => {
    expect((await get(`/${'a'.repeat(5000)}`)).status).toBe(414);
    expect((await get(`/${'a'.repeat(20_000)}`)).status).toBe(431);
  });
});

describe('methods', () => {
  it.each(['TRACE', 'OPTIONS', 'PROPFIND', 'PURGE'])(
    'refuses %s and names those it takes',
    async (method) => {
      const answer = await exchange(port, requestText(`${method} /`));
      expect(answer.status).toBe(405);
      expect(answer.headers.allow).toContain('POST');
    },
  );
});

describe('origins', () => {
  const senders = foreignSenders(OWN).flatMap((sender) =>
    CONTENT_TYPES.map((type) => ({ ...sender, 'Content-Type': type })),
  );
  it.each(senders)('refuses a write from %j', async (headers) => {
    seen = [];
    for (const method of ['POST', 'PUT', 'PATCH', 'DELETE']) {
      const text = requestText(`${method} /api/runs`, { 'Content-Length': '3', ...headers }, 'a=1');
      expect((await exchange(port, text)).status).toBe(403);
    }
    expect(seen).toEqual([]);
  });

  it('lets our own pages write, with and without Sec-Fetch-Site', async () => {
    expect((await post('/x', {}, 'a=1')).status).toBe(200);
    expect((await post('/x', { 'Sec-Fetch-Site': 'same-origin' }, 'a=1')).status).toBe(200);
  });
});

describe('hosts', () => {
  it.each([
    'evil.example',
    '127.0.0.1.evil.example',
    '127.0.0.1:1',
    'evil.example:4321',
    '127.0.0.1:4321@evil',
    '',
  ])('does not know itself as %j', async (host) => expect((await get('/', { Host: host })).status).toBe(421));

  it('answers the demo under the machine’s own names, and an Origin must match the name used', async () => {
    expect((await get('/', { Host: 'localhost:4321' })).status).toBe(200);
    expect((await post('/x', { Host: 'localhost:4321', Origin: 'http://localhost:4321' }, '')).status).toBe(
      200,
    );
    expect((await post('/x', { Host: 'localhost:4321' }, '')).status).toBe(403);
  });

  it('has one name outside the demo', async () => {
    const other = await listen({ settings: readSettings({ ...environment, DEMO: 'false' }) });
    expect((await exchange(other, requestText('GET /', { Host: 'localhost:4321' }))).status).toBe(421);
    expect((await exchange(other, requestText('GET /'))).status).toBe(200);
  });
});

describe('bodies', () => {
  const large = 'x'.repeat(70_000);

  it('are handed on unchanged', async () => {
    seen = [];
    await post('/x', { 'Content-Type': 'application/json' }, '{"a":1}');
    expect(seen[0]?.body).toBe('{"a":1}');
  });

  it('are capped when they say so, when they lie and when they say nothing', async () => {
    seen = [];
    expect((await post('/x', {}, large)).status).toBe(413);
    expect((await post('/x', { 'Content-Length': '99999999999' }, 'x')).status).toBe(413);
    const chunk = `${(10_000).toString(16)}\r\n${'x'.repeat(10_000)}\r\n`;
    const chunked = requestText('POST /x', { Origin: OWN, 'Transfer-Encoding': 'chunked' });
    expect((await exchange(port, [chunked, ...Array<string>(9).fill(chunk), '0\r\n\r\n'])).status).toBe(413);
    expect(seen).toEqual([]);
  });

  it('may be larger where a route needs it', async () => {
    expect((await post('/api/runs/1/moves', {}, large)).status).toBe(200);
  });

  it('are given up when they do not arrive', async () => {
    expect((await post('/x', { 'Content-Length': '20' }, 'half')).status).toBe(408);
  });

  it('with two lengths are not guessed at', async () => {
    const both = requestText(
      'POST /x',
      { Origin: OWN, 'Content-Length': '3', 'Transfer-Encoding': 'chunked' },
      'a=1',
    );
    expect((await exchange(port, both)).status).toBe(400);
  });

  it('leave memory flat however much is sent', async () => {
    const megabyte = `${(1 << 20).toString(16)}\r\n${'x'.repeat(1 << 20)}\r\n`;
    const head = requestText('POST /x', { Origin: OWN, 'Transfer-Encoding': 'chunked' });
    const before = process.memoryUsage().rss;
    const flood = [head, ...Array<string>(60).fill(megabyte), '0\r\n\r\n'];
    expect((await exchange(port, flood)).status).toBe(413);
    // The sender's own 60 MB stand in this process too; 2 GB is what it took without a cap.
    expect(process.memoryUsage().rss - before).toBeLessThan(250 * 2 ** 20);
  });
});

describe('every response', () => {
  const requests: [string, () => ReturnType<typeof get>][] = [
    ['a page', () => get('/')],
    ['an asset', () => get('/_astro/bench.abc.js')],
    ['a text file', () => get('/robots.txt')],
    ['a refused path', () => get('//x', { Accept: 'text/html' })],
    ['a refused host', () => get('/', { Host: 'evil.example' })],
    ['a refused method', () => exchange(port, requestText('TRACE /'))],
    ['a refused origin', () => post('/x', { Origin: 'null' }, '')],
    ['a refused body', () => post('/x', {}, 'x'.repeat(70_000))],
    ['a move', () => get('/lessons/')],
    ['an error behind the front', () => get('/throws')],
    ['an endpoint’s error', () => get('/api/broken')],
    ['liveness', () => get('/livez')],
    ['readiness', () => get('/readyz')],
    ['an unreadable request', () => exchange(port, 'NONSENSE\r\n\r\n')],
    [
      'not modified',
      async () => get('/robots.txt', { 'If-None-Match': (await get('/robots.txt')).headers.etag }),
    ],
  ];
  it.each(requests)('has the security headers: %s', async (_name, send) => {
    const { headers, status } = await send();
    for (const [name, value] of Object.entries(EVERYWHERE))
      expect(headers[name], `${status} ${name}`).toMatch(value);
    if (headers['content-type']?.match(/text|json|javascript/))
      expect(headers['content-type']).toMatch(/charset=utf-8/);
    expect(headers['x-powered-by']).toBeUndefined();
  });

  it('takes from a page’s policy its hashes alone', async () => {
    const policy = (await get('/')).headers['content-security-policy'];
    expect(policy).toContain("script-src 'self' 'sha256-abc='");
    expect(policy).not.toMatch(/evil|img-src \*/);
  });

  it('asks for TLS from then on where the site has it', async () => {
    const https = await listen({
      settings: readSettings({ ...environment, DEMO: 'false', PUBLIC_URL: 'https://dropwise.example.org' }),
    });
    const answer = await exchange(https, requestText('GET /', { Host: 'dropwise.example.org' }));
    expect(answer.headers['strict-transport-security']).toMatch(/max-age=\d{8,}; includeSubDomains/);
    expect(seen.at(-1)?.headers['x-forwarded-proto']).toBe('https');
  });

  it('is not stored where the request may be a signed-in person’s', async () => {
    expect((await get('/', { Cookie: 'a=b' })).headers['cache-control']).toBe('no-store');
  });
});

describe('what is sent', () => {
  it('is compressed: pages as they are made, assets as they were built', async () => {
    const socketAnswer = await fetch(`http://127.0.0.1:${port}/livez`);
    expect(socketAnswer.status).toBe(200);
    const page = await get('/', { 'Accept-Encoding': 'br' });
    expect(page.headers['content-encoding']).toBe('br');
    expect(page.headers.vary).toMatch(/Accept-Encoding/i);
    const asset = await get('/_astro/bench.abc.js', { 'Accept-Encoding': 'gzip, br' });
    expect([asset.headers['content-encoding'], asset.body]).toEqual(['br', 'compressed']);
    expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable');
  });

  it('is Problem Details for whoever asks an endpoint', async () => {
    for (const [path, status] of [
      ['/api/broken', 500],
      ['/api/nothing', 404],
    ] as const) {
      const answer = await get(path, { Accept: 'text/html' });
      expect([answer.status, answer.headers['content-type']]).toEqual([
        status,
        'application/problem+json; charset=utf-8',
      ]);
      expect(JSON.parse(answer.body)).toMatchObject({ status, requestId: answer.headers['x-request-id'] });
    }
  });

  it('tells nothing of an error but the request’s number', async () => {
    const answer = await get('/throws', { Accept: 'text/html' });
    expect(answer.status).toBe(500);
    expect(answer.body).toContain(answer.headers['x-request-id']);
    expect(answer.body).not.toMatch(/hunter2|\.ts:|\n\s+at /);
  });

  it('survives ranges that make no sense', async () => {
    for (const Range of ['bytes=5-2', 'bytes=abc', 'bytes=-1', 'bytes=0-0,2-3', 'bytes=99-'])
      expect((await get('/robots.txt', { Range })).status).toBe(200);
  });
});

describe('who asks', () => {
  const claim = {
    'X-Forwarded-For': '6.6.6.6',
    'X-Forwarded-Host': 'evil.example',
    'X-Forwarded-Proto': 'https',
    Forwarded: 'for=6.6.6.6',
    'X-Real-IP': '6.6.6.6',
  };

  it('is the connection’s address, whatever a client says', async () => {
    seen = [];
    await get('/', claim);
    expect(seen[0]?.headers['x-forwarded-for']).toBe('127.0.0.1');
    expect(seen[0]?.headers['x-forwarded-proto']).toBe('http');
    for (const name of ['x-forwarded-host', 'forwarded', 'x-real-ip'])
      expect(seen[0]?.headers[name]).toBeUndefined();
  });

  it('is what a trusted proxy says, and nothing that was said to the proxy', async () => {
    const behind = await listen({
      settings: readSettings({ ...environment, TRUSTED_PROXIES: '127.0.0.1, 10.0.0.0/8' }),
    });
    await exchange(behind, requestText('GET /', { 'X-Forwarded-For': '6.6.6.6, 203.0.113.9, 10.1.2.3' }));
    expect(seen.at(-1)?.headers['x-forwarded-for']).toBe('203.0.113.9');
  });
});

describe('the log', () => {
  it('has one JSON line for a request, without query, secrets or forged lines', async () => {
    lines.length = 0;
    await get('/reset?token=planted-secret', {
      Cookie: 'session=planted-secret',
    });
    await new Promise((done) => setTimeout(done, 20));
    expect(lines).toHaveLength(1);
    expect(JSON.parse(lines[0]!)).toMatchObject({
      method: 'GET',
      path: '/reset',
      status: 200,
      client: '127.0.0.1',
    });
    expect(lines.join()).not.toContain('planted-secret');
  });

  it('hides values that are secret by their name and keeps a line one line', () => {
    const written: string[] = [];
    const log = createLog('info', { write: (line: string) => void written.push(line) });
    log.info(
      { password: 'p1', form: { token: 'p2' }, headers: { cookie: 'p3' } },
      'name\r\n{"level":"forged"}',
    );
    expect(written).toHaveLength(1);
    expect(written[0]!.trimEnd()).not.toMatch(/p1|p2|p3|[\r\n]/);
  });
});

describe('health', () => {
  it('is alive without the database, and ready with it', async () => {
    readiness = { ready: false, database: 'unreachable' };
    expect((await get('/livez')).status).toBe(200);
    expect((await get('/readyz')).status).toBe(503);
    readiness = { ready: true, database: 'ok' };
    expect((await get('/readyz', { Host: '10.0.0.1' })).status).toBe(200);
  });

  it('does not hang with the database', async () => {
    const hung = await listen({ askReadiness: () => new Promise(() => {}) });
    expect((await exchange(hung, requestText('GET /readyz'))).status).toBe(503);
  });
});

describe('the end', () => {
  it('comes after what is in flight, and tells balancers first', async () => {
    const ending = await listen();
    const slow = exchange(ending, requestText('GET /slow', { Connection: 'keep-alive' }));
    await new Promise((done) => setTimeout(done, 50));
    const drained = fronts.at(-1)!.drain();
    expect((await exchange(ending, requestText('GET /readyz'))).status).toBe(503);
    const answer = await slow;
    expect([answer.status, answer.headers.connection]).toEqual([200, 'close']);
    await drained;
    await expect(exchange(ending, requestText('GET /'))).rejects.toThrow();
  });
});

describe('settings', () => {
  it('name every fault at once', () => {
    expect(() => readSettings({ PORT: 'x', LOG_LEVEL: 'loud' })).toThrow(
      /PORT[^]*PUBLIC_URL[^]*DATABASE_PASSWORD[^]*LOG_LEVEL/,
    );
    expect(() => readSettings({ ...environment, TRUSTED_PROXIES: 'proxy' })).toThrow(/TRUSTED_PROXIES/);
  });

  it('refuse plain http and the demo in production', () => {
    const production = { ...environment, NODE_ENV: 'production' };
    expect(() => readSettings({ ...production, DEMO: 'false' })).toThrow(/https/);
    expect(() => readSettings({ ...production, PUBLIC_URL: 'https://x.example' })).toThrow(/demo/);
    expect(readSettings(production).production).toBe(false);
  });
});
