import type { APIContext } from 'astro';
import { describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { endpoint, ProblemError, readJson } from '../../../src/server/problem.ts';

const context = { locals: { requestId: 'r-1' }, routePattern: '/api/x' } as unknown as APIContext;
const post = (body: string, type = 'application/json') =>
  new Request('http://127.0.0.1/api/x', { method: 'POST', body, headers: { 'content-type': type } });

describe('problem details', () => {
  it('carry type, title, status, code, the request and further members, which cannot hide them', async () => {
    const answer = await endpoint(() => {
      throw new ProblemError({
        status: 409,
        code: 'run-moved-on',
        title: 'This run has moved on.',
        extensions: { count: 3, status: 200 },
      });
    })(context);
    expect(answer.status).toBe(409);
    expect(answer.headers.get('content-type')).toBe('application/problem+json; charset=utf-8');
    expect(await answer.json()).toEqual({
      type: '/problems/run-moved-on',
      title: 'This run has moved on.',
      status: 409,
      code: 'run-moved-on',
      requestId: 'r-1',
      count: 3,
    });
  });

  it('say nothing of an unexpected error, which is logged', async () => {
    const logged = vi.spyOn(console, 'error').mockImplementation(() => {});
    const answer = await endpoint(() => {
      throw new Error('password=hunter2 at db.ts:3');
    })(context);
    expect(answer.status).toBe(500);
    expect(await answer.text()).not.toMatch(/hunter2|db\.ts/);
    expect(logged).toHaveBeenCalledOnce();
    logged.mockRestore();
  });
});

describe('a JSON body', () => {
  const schema = z.object({ count: z.number().int() }).strict();

  it('is refused with 415, 400 or the fields that do not fit', async () => {
    await expect(readJson(post('{}', 'text/plain'), schema)).rejects.toMatchObject({
      problem: { status: 415 },
    });
    await expect(readJson(post('{'), schema)).rejects.toMatchObject({ problem: { code: 'json-broken' } });
    await expect(readJson(post('{"count":1.5}'), schema)).rejects.toMatchObject({
      problem: { status: 400, extensions: { fields: { count: expect.any(String) } } },
    });
  });

  it('cannot reach an object’s prototype', async () => {
    const open = z.object({ count: z.number() });
    expect(await readJson(post('{"count":1,"__proto__":{"polluted":1}}'), open)).toEqual({ count: 1 });
    expect(({} as { polluted?: number }).polluted).toBeUndefined();
  });
});
