// Problem Details for HTTP APIs (RFC 9457): how every endpoint that an island fetches says what went wrong.
import type { APIContext, APIRoute } from 'astro';
import { ZodError, type ZodType, type ZodTypeDef } from 'zod';

/** Words for the machine are in `code`; `title` and `detail` are sentences for the person. */
export interface Problem {
  status: number;
  /** Stable, kebab-case: what a client's code may rely on. */
  code: string;
  title: string;
  detail?: string;
  /** Further members, e.g. `fields`, or what the server holds instead. */
  extensions?: Record<string, unknown>;
  headers?: Record<string, string>;
}

/** Throw it anywhere below `endpoint()`: the answer is its problem. */
export class ProblemError extends Error {
  override name = 'ProblemError';
  constructor(readonly problem: Problem) {
    super(problem.title);
  }
}

/** Problem types are named by a URI; a relative one is resolved by the client against the site's address. */
export const problemType = (code: string): string => `/problems/${code}`;

export function problemResponse(problem: Problem, requestId?: string): Response {
  const { status, code, title, detail, extensions, headers } = problem;
  const body = { ...extensions, type: problemType(code), title, status, code, detail, requestId };
  return new Response(JSON.stringify(body), {
    status,
    headers: {
      'Cache-Control': 'no-store',
      ...headers,
      'Content-Type': 'application/problem+json; charset=utf-8',
    },
  });
}

/** Where an input was refused: `fields` maps a dotted path to its first message. */
export function invalidInput(error: ZodError): Problem {
  const fields: Record<string, string> = {};
  for (const { path, message } of error.issues) fields[path.join('.')] ??= message;
  return {
    status: 400,
    code: 'invalid-input',
    title: 'Something in this request is not as expected.',
    extensions: { fields },
  };
}

/**
 * Reads a JSON body and checks its shape.
 * @throws ProblemError 415 when the type is not JSON, 400 when it does not parse or fit
 */
export async function readJson<T>(request: Request, schema: ZodType<T, ZodTypeDef, unknown>): Promise<T> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/json\s*(;|$)/i.test(type))
    throw new ProblemError({ status: 415, code: 'json-expected', title: 'This address takes JSON only.' });
  let value: unknown;
  try {
    value = JSON.parse(await request.text());
  } catch {
    throw new ProblemError({ status: 400, code: 'json-broken', title: 'The request’s JSON cannot be read.' });
  }
  const parsed = schema.safeParse(value);
  if (!parsed.success) throw new ProblemError(invalidInput(parsed.error));
  return parsed.data;
}

/** Answers with JSON that nobody may store. */
export function json(value: unknown, status = 200): Response {
  return new Response(JSON.stringify(value), {
    status,
    headers: { 'Cache-Control': 'no-store', 'Content-Type': 'application/json; charset=utf-8' },
  });
}

/** Wraps an endpoint, so that whatever it throws becomes Problem Details, and the unexpected is logged. */
export function endpoint(handle: (context: APIContext) => Promise<Response> | Response): APIRoute {
  return async (context) => {
    const { requestId } = context.locals as { requestId?: string };
    try {
      return await handle(context);
    } catch (error) {
      if (error instanceof ProblemError) return problemResponse(error.problem, requestId);
      if (error instanceof ZodError) return problemResponse(invalidInput(error), requestId);
      // The front turns console output into structured log lines.
      // eslint-disable-next-line no-console
      console.error(`${context.routePattern} failed (request ${requestId})`, error);
      const title =
        'Something went wrong on our side. Nothing that was accepted is lost; try again in a moment.';
      return problemResponse({ status: 500, code: 'internal-error', title }, requestId);
    }
  };
}
