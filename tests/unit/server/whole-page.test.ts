import { expect, test } from 'vitest';
import { wholePage } from '../../../src/server/whole-page.ts';

const page = (chunks: readonly (string | Error)[], type = 'text/html; charset=utf-8') => {
  const left = [...chunks];
  return new Response(
    new ReadableStream({
      pull(controller) {
        const next = left.shift();
        if (next === undefined) controller.close();
        else if (next instanceof Error) controller.error(next);
        else controller.enqueue(new TextEncoder().encode(next));
      },
    }),
    { status: 201, headers: { 'Content-Type': type, 'X-Kept': 'yes' } },
  );
};
const never = () => expect.unreachable();

test('a page arrives whole, with its status and headers', async () => {
  const whole = await wholePage(page(['<p>pH ', '4.76</p>']), never);
  expect([whole.status, whole.headers.get('x-kept')]).toEqual([201, 'yes']);
  expect(await whole.text()).toBe('<p>pH 4.76</p>');
});

test('a page that fails half way is an error, not half a page', async () => {
  const faults: unknown[] = [];
  const whole = await wholePage(page(['<p>pH ', new Error('no such vessel')]), (error) => faults.push(error));
  expect([whole.status, whole.body]).toEqual([500, null]);
  expect(faults).toEqual([new Error('no such vessel')]);
});

test('what is not a page streams on', async () => {
  const response = page(['event: tally\n\n'], 'text/event-stream');
  expect(await wholePage(response, never)).toBe(response);
});
