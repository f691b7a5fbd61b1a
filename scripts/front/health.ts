// /livez: the process answers. /readyz: it may be sent requests, since the database answers and has the schema that
// this build expects.
import type { ServerResponse } from 'node:http';

export interface Readiness {
  ready: boolean;
  /** What an operator reads; no host name, no version, nothing of use to others. */
  database: 'ok' | 'unreachable' | 'schema-behind' | 'schema-ahead';
}

export type AskReadiness = () => Promise<Readiness>;

/** A check that hangs is a check that failed. */
const PATIENCE_MS = 2000;

function send(response: ServerResponse, status: number, body: unknown): void {
  response.setHeader('Cache-Control', 'no-store');
  response.setHeader('Content-Type', 'application/json; charset=utf-8');
  response.writeHead(status);
  response.end(JSON.stringify(body));
}

/** Answers a health request, or returns false where it is none. */
export async function answerHealth(
  path: string,
  response: ServerResponse,
  state: { draining: boolean; ask: AskReadiness; instance: string },
): Promise<boolean> {
  if (path === '/livez') {
    send(response, 200, { live: true, instance: state.instance });
    return true;
  }
  if (path !== '/readyz') return false;
  if (state.draining) {
    send(response, 503, { ready: false, draining: true });
    return true;
  }
  let timer: NodeJS.Timeout | undefined;
  const tooLate = new Promise<Readiness>((resolve) => {
    timer = setTimeout(() => resolve({ ready: false, database: 'unreachable' }), PATIENCE_MS);
  });
  const answer = await Promise.race([
    state.ask().catch((): Readiness => ({ ready: false, database: 'unreachable' })),
    tooLate,
  ]);
  clearTimeout(timer);
  send(response, answer.ready ? 200 : 503, answer);
  return true;
}
