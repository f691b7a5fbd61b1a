import type { Move } from '../../../bench/types';
import type { Op } from './local';

export interface Outcome {
  readonly right: string;
  readonly sentence: string;
  readonly drops: readonly { readonly label: string; readonly drops: number | null }[];
}

export interface Problem {
  readonly status: number;
  readonly code: string;
  readonly title: string;
  readonly since?: readonly Op[];
  readonly count?: number;
}

/** An answer that says no. Anything that is not an answer (no connection, a server restarting) is `Unreachable`. */
export class Refused extends Error {
  constructor(readonly problem: Problem) {
    super(problem.title);
  }
}
export class Unreachable extends Error {}

async function ask<T>(path: string, init: RequestInit): Promise<T> {
  let response: Response;
  try {
    response = await fetch(path, { ...init, credentials: 'same-origin' });
  } catch {
    throw new Unreachable();
  }
  if (response.ok) return (await response.json()) as T;
  if (response.status >= 500 || response.status === 429 || response.status === 408) throw new Unreachable();
  const problem = (await response.json().catch(() => null)) as Problem | null;
  throw new Refused(problem ?? { status: response.status, code: 'unknown', title: 'The server said no.' });
}

export const post = <T>(path: string, body: unknown, keepalive = false) =>
  ask<T>(path, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(body),
    keepalive,
  });

export interface SavedAnswer {
  readonly count: number;
  readonly metAims: readonly string[];
  readonly refused?: { readonly opId: string; readonly code: string; readonly sentence: string };
}

export interface ProgressAnswer {
  readonly runs: readonly { runId: string; bench: string; seed: number; moves: readonly Move[] }[];
  readonly metAims: readonly string[];
}

export const openRun = (body: {
  runId: string;
  lesson: string;
  bench: string;
  seed: number;
  branchedFrom?: string;
}) => post<{ seed: number; count: number }>('/api/runs', body);

export const sendMoves = (runId: string, after: number, moves: readonly Op[], keepalive = false) =>
  post<SavedAnswer>(`/api/runs/${runId}/moves`, { after, moves }, keepalive);

export const sendPrediction = (body: {
  lesson: string;
  prediction: string;
  answer: string;
  confidence: number;
}) =>
  post<{ answer: string; confidence: number; observed: string | null; outcome?: Outcome }>(
    '/api/predictions',
    body,
  );

export const sendObservation = (body: { lesson: string; prediction: string; observed: string }) =>
  post<{ observed: string; outcome?: Outcome }>('/api/observations', body);

export const askOutcome = (body: { lesson: string; prediction: string; observed: string }) =>
  post<{ outcome: Outcome | null }>('/api/outcomes', body);

export const takeOver = (body: {
  lesson: string;
  runId: string;
  bench: string;
  seed: number;
  moves: readonly Op[];
  prediction?: { id: string; answer: string; confidence: number };
}) => post<SavedAnswer>('/api/takeover', body);

export const askProgress = (lesson: string) =>
  ask<ProgressAnswer>(`/api/lessons/${lesson}/progress`, { method: 'GET' });
