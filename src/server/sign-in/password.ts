import { hash, verify } from '@node-rs/argon2';
import { dictionary } from '@zxcvbn-ts/language-common';
import { config } from '../config/index.ts';

/** Passwords are taken exactly as typed: no trimming, folding or normalising, and nothing is cut off. */
const options = {
  // argon2id: the package declares its enum in a way that isolated modules cannot import.
  algorithm: 2,
  memoryCost: config.ARGON2_MEMORY_KIB,
  timeCost: config.ARGON2_PASSES,
  parallelism: 1,
};

export const SHORTEST = 8;
export const LONGEST = 256;

const common = new Set<string>(dictionary['passwords-common'] as readonly string[]);

/** Why a password can't be taken, as a sentence that says what to do; null where it can. */
export function passwordFault(password: string, about: readonly (string | null)[] = []): string | null {
  const length = [...password].length;
  if (length < SHORTEST) return `Use at least ${SHORTEST} characters; fifteen or more are better.`;
  if (length > LONGEST) return `Use at most ${LONGEST} characters.`;
  const folded = password.toLowerCase();
  if (common.has(folded))
    return 'This password is on the lists that attackers try first. Choose another one.';
  if (new Set(folded).size < 4) return 'This password repeats itself too much. Choose another one.';
  for (const own of about) {
    const word = own?.toLowerCase().split('@')[0] ?? '';
    if (word.length >= 4 && folded.replace(word, '').length < 4)
      return 'This password is nearly your name or e-mail address. Choose another one.';
  }
  return null;
}

export const hashPassword = (password: string): Promise<string> => hash(password, options);

let dummy: Promise<string> | undefined;

/**
 * Checks a password. Without a stored one (nobody has that address) the same work is done, so that the time of the
 * answer does not tell who has an account.
 */
export async function checkPassword(stored: string | null | undefined, password: string): Promise<boolean> {
  dummy ??= hashPassword('nobody signs in with this');
  const right = await verify(stored ?? (await dummy), password);
  return right && Boolean(stored);
}
