import { count, forget, peek } from '../rate-limit/index.ts';

/**
 * Sign-in limits that suit a school: a whole class signs in within a minute from one address and mistypes as it goes.
 * Failures are counted for each account. An address is slowed after very many tries, never shut out.
 */
const ACCOUNT_WINDOW_S = 15 * 60;
const FREE_FAILURES = 10;
const ADDRESS_WINDOW_S = 60 * 60;
const FREE_TRIES = 1500;
const SLOWEST_MS = 2000;

const accountKey = (account: string) => `account:${account.toLowerCase()}`;

export type Throttle = { allowed: true; wait_ms: number } | { allowed: false; retryAfter_s: number };

/**
 * Called before a password is checked.
 * @param known this browser has signed in to this account before: its owner is never kept out by others' failures.
 */
export async function beforeTry(account: string, address: string, known: boolean): Promise<Throttle> {
  const tries = await count(`address:${address}`, 1, ADDRESS_WINDOW_S);
  const wait_ms = Math.min(SLOWEST_MS, Math.max(0, tries.points - FREE_TRIES) * 10);
  if (known) return { allowed: true, wait_ms };
  const failures = await peek(accountKey(account));
  if (failures.points < FREE_FAILURES) return { allowed: true, wait_ms };
  // From here one try every few seconds: 2, 4, 8 ... 60. The owner waits a minute at the most.
  const pause = Math.min(60, 2 ** (failures.points - FREE_FAILURES + 1));
  const slot = await count(`pause:${account.toLowerCase()}`, 1, pause);
  return slot.points === 1
    ? { allowed: true, wait_ms }
    : { allowed: false, retryAfter_s: Math.max(1, slot.seconds) };
}

export const afterFailure = (account: string) => count(accountKey(account), 1, ACCOUNT_WINDOW_S);

export async function afterSuccess(account: string): Promise<void> {
  await forget(accountKey(account));
  await forget(`pause:${account.toLowerCase()}`);
}

/** Limits on what sends mail or makes accounts, by address and by recipient. */
export async function mayAsk(
  what: 'sign-up' | 'reset' | 'verify' | 'export',
  who: string,
  limit: number,
  window_s: number,
): Promise<boolean> {
  return (await count(`${what}:${who.toLowerCase()}`, 1, window_s)).points <= limit;
}
