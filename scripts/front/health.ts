import { createConnection, type Connection } from 'mariadb';
import type { FrontConfig } from './config';

/** Asks the database for its schema version, over a connection of its own so that a busy pool cannot hide an outage. */
export async function readiness(
  config: FrontConfig,
  expected: string | null,
): Promise<{ ready: boolean; reason?: string; schema?: string }> {
  let connection: Connection | undefined;
  try {
    connection = await createConnection({
      host: config.DATABASE_HOST,
      port: config.DATABASE_PORT,
      user: config.DATABASE_USER,
      password: config.DATABASE_PASSWORD,
      database: config.DATABASE_NAME,
      connectTimeout: 2000,
      socketTimeout: 3000,
    });
    const rows: { name: string }[] = await connection.query(
      'SELECT name FROM migrations ORDER BY name DESC LIMIT 1',
    );
    const schema = rows[0]?.name;
    if (expected !== null && schema !== expected)
      return { ready: false, reason: 'the schema is at another version', schema: schema ?? 'none' };
    return { ready: true, schema: schema ?? 'none' };
  } catch {
    return { ready: false, reason: 'the database does not answer' };
  } finally {
    await connection?.end().catch(() => connection?.destroy());
  }
}
