import { randomUUID } from 'node:crypto';
import { Lucia, TimeSpan } from 'lucia';
import { Op } from 'sequelize';
import { config } from '../config/index.ts';
import { Session } from '../database/index.ts';
import { adapter } from './adapter.ts';

/** The only module that knows Lucia. Cookies: `__Host-` and Secure wherever PUBLIC_URL is https. */
interface PersonAttributes {
  publicId: string;
  displayName: string;
  email: string | null;
  emailVerifiedAt: Date | null;
  lang: string;
  conventions: Record<string, string> | null;
}

declare module 'lucia' {
  interface Register {
    Lucia: typeof lucia;
    UserId: number;
    DatabaseUserAttributes: PersonAttributes;
    DatabaseSessionAttributes: { publicId: string; createdAt: Date; endsAt: Date; device: string };
  }
}

/** The person of a request, as middleware hands it to pages. */
export interface SignedIn extends PersonAttributes {
  readonly id: number;
}

export const COOKIE = config.https ? '__Host-dropwise' : 'dropwise';

const lucia = new Lucia(adapter, {
  sessionExpiresIn: new TimeSpan(config.SESSION_IDLE_DAYS, 'd'),
  sessionCookie: {
    name: COOKIE,
    expires: true,
    attributes: { secure: config.https, sameSite: 'lax', path: '/' },
  },
  getSessionAttributes: (attributes) => attributes,
  getUserAttributes: (attributes) => attributes,
});

const DAY = 86_400_000;

export interface CookieToSet {
  readonly name: string;
  readonly value: string;
  readonly attributes: {
    httpOnly?: boolean;
    secure?: boolean;
    sameSite?: 'lax' | 'strict' | 'none';
    path?: string;
    maxAge?: number;
  };
}

/** Signs a person in on this browser; a session that it had before is ended, whoever's it was. */
export async function createSession(
  personId: number,
  device: string,
  previous?: string,
): Promise<CookieToSet> {
  if (previous) await lucia.invalidateSession(previous);
  const now = new Date();
  const session = await lucia.createSession(personId, {
    publicId: randomUUID(),
    createdAt: now,
    endsAt: new Date(now.getTime() + config.SESSION_ABSOLUTE_DAYS * DAY),
    device: device.slice(0, 200),
  });
  return lucia.createSessionCookie(session.id);
}

/** Who a cookie belongs to, and the cookie to send back where its time was extended. */
export async function readSession(
  token: string | undefined,
): Promise<{ person: SignedIn | null; sessionId: string | null; cookie: CookieToSet | null }> {
  if (!token || token.length > 100) return { person: null, sessionId: null, cookie: null };
  const { session, user } = await lucia.validateSession(token);
  if (!session) return { person: null, sessionId: null, cookie: lucia.createBlankSessionCookie() };
  return {
    person: { ...user, id: user.id },
    sessionId: session.publicId,
    cookie: session.fresh ? lucia.createSessionCookie(session.id) : null,
  };
}

export async function endSession(token: string | undefined): Promise<CookieToSet> {
  if (token) await lucia.invalidateSession(token);
  return lucia.createBlankSessionCookie();
}

/** A person's signed-in browsers, newest first; ids are public ones. */
export async function listSessions(personId: number) {
  const now = new Date();
  const rows = await Session.findAll({
    where: { personId, expiresAt: { [Op.gt]: now }, endsAt: { [Op.gt]: now } },
    order: [['createdAt', 'DESC']],
  });
  return rows.map((row) => ({
    id: row.publicId,
    device: row.device,
    since: row.createdAt,
    until: row.expiresAt,
  }));
}

/** Ends one of a person's own sessions by its public id, or all but one. */
export async function endSessions(
  personId: number,
  which: { only: string } | { except: string | null },
): Promise<number> {
  const publicId =
    'only' in which ? which.only : which.except === null ? undefined : { [Op.ne]: which.except };
  return Session.destroy({ where: { personId, ...(publicId === undefined ? {} : { publicId }) } });
}

export const deleteExpiredSessions = (): Promise<void> => lucia.deleteExpiredSessions();
