// The framework shows its error pages to everybody. A program that asked an endpoint gets Problem Details instead.
import type { ServerResponse } from 'node:http';
import { problem } from './pages.ts';

const TITLES: Record<number, { code: string; title: string }> = {
  404: { code: 'not-found', title: 'There is nothing at this address.' },
  405: { code: 'method-not-allowed', title: 'This address takes no such request.' },
};
const OTHERWISE = {
  code: 'internal-error',
  title: 'Something went wrong on our side. Nothing that was accepted is lost; try again in a moment.',
};

export const isEndpoint = (path: string): boolean => path.startsWith('/api/');

/** To be called from `beforeHead`: replaces an HTML error, or one without any body, by Problem Details. */
export function answerWithProblem(response: ServerResponse, requestId: string): void {
  const type = String(response.getHeader('Content-Type') ?? '');
  if (response.statusCode < 400 || /^application\/(problem\+)?json/.test(type)) return;
  const { code, title } = TITLES[response.statusCode] ?? OTHERWISE;
  const body = problem({ status: response.statusCode, code, title }, requestId);
  const end = response.end.bind(response);
  response.removeHeader('Content-Encoding');
  response.setHeader('Content-Type', 'application/problem+json; charset=utf-8');
  response.setHeader('Content-Length', Buffer.byteLength(body));
  response.write = () => true;
  response.end = (() => end(response.req.method === 'HEAD' ? undefined : body)) as typeof response.end;
}
