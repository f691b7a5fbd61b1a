import type { Transaction } from 'sequelize';
import { sequelize } from './connection.ts';

/** Deadlock, lock wait timeout, record changed since last read: nothing was done, and doing it again is right. */
const AGAIN = new Set([1213, 1205, 1020]);
const TRIES = 6;

/** True where the whole transaction may be run again. */
export function mayRunAgain(error: unknown): boolean {
  const parent = (error as { parent?: { errno?: number } } | null)?.parent;
  return parent?.errno !== undefined && AGAIN.has(parent.errno);
}

/**
 * Runs the work in a transaction and runs all of it again where the database asks for that. The work must have no effect
 * outside the database: it may run several times.
 */
export async function withTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let tries = 1; ; tries++) {
    try {
      return await sequelize.transaction(work);
    } catch (error) {
      if (tries >= TRIES || !mayRunAgain(error)) throw error;
      const longest = 10 * 2 ** tries;
      await new Promise((resolve) => setTimeout(resolve, longest / 2 + Math.random() * longest));
    }
  }
}
