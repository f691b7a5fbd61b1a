import { defineMiddleware } from 'astro:middleware';
import { hasRole, standingOf } from './server/access/memberships.ts';
import { ruleFor } from './server/access/rules.ts';
import { keepPage } from './server/kept-pages.ts';
import { log } from './server/log.ts';
import { problemResponse } from './server/problem.ts';
import { wholePage } from './server/whole-page.ts';
import { COOKIE, readSession } from './server/sign-in/sessions.ts';

const SECRET_FIELDS = new Set(['password', 'current', 'token']);

/** A form's fields are read from a copy: the action reads the request itself. */
async function typedInto(request: Request): Promise<Record<string, string>> {
  const isForm = /^(multipart\/form-data|application\/x-www-form-urlencoded)/i.test(
    request.headers.get('content-type') ?? '',
  );
  if (request.method !== 'POST' || !isForm) return {};
  const fields = await request
    .clone()
    .formData()
    .catch(() => new FormData());
  return Object.fromEntries(
    [...fields].filter((entry): entry is [string, string] => {
      const [name, value] = entry;
      return typeof value === 'string' && !SECRET_FIELDS.has(name);
    }),
  );
}

/**
 * Who is asking, and may they? Decided by the route's pattern, which Astro keeps canonical, and closed unless a rule
 * opens it. Signed-in answers are never stored by anyone.
 */
export const onRequest = defineMiddleware(async (context, next) => {
  const { locals, cookies, routePattern, url } = context;
  locals.requestId ??= 'none';
  locals.clientAddress = context.clientAddress;
  const { person, sessionId, cookie } = await readSession(cookies.get(COOKIE)?.value);
  if (cookie) cookies.set(cookie.name, cookie.value, cookie.attributes);
  locals.person = person;
  locals.sessionId = sessionId;
  locals.standing = person ? await standingOf(person.id) : null;

  const rule = ruleFor(routePattern);
  const isApi = routePattern.startsWith('/api/');
  const deny = (status: 401 | 403 | 404): Response | Promise<Response> => {
    log.warn(
      { requestId: locals.requestId, routePattern, person: person?.publicId ?? null, status },
      'access denied',
    );
    if (isApi) {
      const title = {
        401: 'Sign in first.',
        403: 'Your account may not do this.',
        404: 'There is nothing at this address.',
      }[status];
      const code = { 401: 'sign-in-first', 403: 'not-allowed', 404: 'not-found' }[status];
      return problemResponse({ status, code, title }, locals.requestId);
    }
    if (status === 401)
      return context.redirect(`/sign-in?next=${encodeURIComponent(url.pathname + url.search)}`, 303);
    return new Response(null, { status: 404 });
  };

  if (rule === undefined) return deny(404);
  if (rule === 'signed-out' && person) return context.redirect('/lessons', 303);
  if (rule !== 'public' && rule !== 'signed-out') {
    if (!person) return deny(401);
    if (typeof rule === 'object' && !(locals.standing && hasRole(locals.standing, rule.role)))
      return deny(403);
  }
  locals.typed = isApi ? {} : await typedInto(context.request);
  const response = await wholePage(await next(), (error) =>
    log.error({ requestId: locals.requestId, routePattern, err: error }, 'a page could not be made'),
  );
  if (person) response.headers.set('Cache-Control', 'no-store');
  // Nobody waits for a page to be put away.
  if (locals.pageKey && context.request.method === 'GET')
    keepPage(locals.pageKey, response).catch((error: unknown) =>
      log.error({ requestId: locals.requestId, err: error }, 'a page could not be kept'),
    );
  return response;
});
