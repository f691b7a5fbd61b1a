import { createHmac } from 'node:crypto';
import type { AstroCookies } from 'astro';
import { config } from '../config/index.ts';
import { sameSecret } from './secrets.ts';

/**
 * A browser that has signed in to an account keeps a signed note of it, so that others' wrong guesses never keep the
 * owner out. The note says nothing but 'has known this account', and opens nothing.
 */
const NAME = config.https ? '__Host-dropwise-known' : 'dropwise-known';
const YEAR_S = 365 * 86_400;
const MOST = 5;

const sign = (account: string) =>
  createHmac('sha256', config.COOKIE_SECRET)
    .update(`known:${account.toLowerCase()}`)
    .digest('base64url')
    .slice(0, 32);

const notes = (cookies: AstroCookies): string[] =>
  (cookies.get(NAME)?.value ?? '').split('.').filter(Boolean).slice(0, MOST);

export const isKnownDevice = (cookies: AstroCookies, account: string): boolean =>
  notes(cookies).some((note) => sameSecret(note, sign(account)));

export function rememberDevice(cookies: AstroCookies, account: string): void {
  const note = sign(account);
  const kept = [note, ...notes(cookies).filter((other) => other !== note)].slice(0, MOST);
  cookies.set(NAME, kept.join('.'), {
    httpOnly: true,
    secure: config.https,
    sameSite: 'lax',
    path: '/',
    maxAge: YEAR_S,
  });
}
