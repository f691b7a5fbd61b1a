import { QueryTypes } from 'sequelize';
import { sequelize } from '../database/index.ts';
import { hashSecret } from '../sign-in/secrets.ts';

export interface Count {
  /** Points used in the window, these included. */
  readonly points: number;
  /** Seconds until the window ends. */
  readonly seconds: number;
}

/** Keys hold addresses and accounts: stored as hashes. */
const stored = (key: string) => `${key.split(':')[0]}:${hashSecret(key).slice(0, 40)}`;

/**
 * Counts points in a window that starts with the first of them. In the database, so that all nodes share it and a
 * restart forgets nothing. One statement, so that requests at once count each.
 */
export async function count(key: string, points: number, window_s: number): Promise<Count> {
  const now = Date.now();
  await sequelize.query(
    `INSERT INTO rate_limits (\`key\`, points, expire) VALUES (:key, :points, :end)
     ON DUPLICATE KEY UPDATE points = IF(expire <= :now, :points, points + :points), expire = IF(expire <= :now, :end, expire)`,
    { replacements: { key: stored(key), points, end: now + window_s * 1000, now }, type: QueryTypes.INSERT },
  );
  return peek(key);
}

export async function peek(key: string): Promise<Count> {
  const now = Date.now();
  const [row] = await sequelize.query<{ points: number; expire: number }>(
    'SELECT points, expire FROM rate_limits WHERE `key` = ? AND expire > ?',
    { replacements: [stored(key), now], type: QueryTypes.SELECT },
  );
  return row
    ? { points: row.points, seconds: Math.ceil((Number(row.expire) - now) / 1000) }
    : { points: 0, seconds: 0 };
}

export async function forget(key: string): Promise<void> {
  await sequelize.query('DELETE FROM rate_limits WHERE `key` = ?', {
    replacements: [stored(key)],
    type: QueryTypes.DELETE,
  });
}

export async function deleteExpiredCounts(): Promise<void> {
  await sequelize.query('DELETE FROM rate_limits WHERE expire <= ?', {
    replacements: [Date.now()],
    type: QueryTypes.DELETE,
  });
}
