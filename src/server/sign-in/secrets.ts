import { createHash, randomBytes, timingSafeEqual } from 'node:crypto';

/** 256 random bits for a link, in characters that need no encoding. */
export const newSecret = (): string => randomBytes(32).toString('base64url');

/** What is stored of a secret. Secrets are long and random, so a plain hash is enough. */
export const hashSecret = (secret: string): string => createHash('sha256').update(secret).digest('hex');

/** Compares two strings without telling by its time where they differ. */
export function sameSecret(a: string, b: string): boolean {
  const left = Buffer.from(hashSecret(a));
  const right = Buffer.from(hashSecret(b));
  return timingSafeEqual(left, right);
}
