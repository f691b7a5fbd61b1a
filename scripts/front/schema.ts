// Does the database answer, and with the schema of this build? Over a connection of its own, so that a busy pool
// cannot hide an outage and an outage cannot fill the pool.
import { createConnection } from 'mariadb';
import type { AskReadiness } from './health.ts';
import type { DatabaseSettings } from './settings.ts';

/** umzug's table of the migrations that ran. */
const TABLE = 'migrations';

/** @param expected names of all migrations of this build */
export function createReadiness(database: DatabaseSettings, expected: readonly string[]): AskReadiness {
  return async () => {
    const connection = await createConnection({ ...database, connectTimeout: 1000, socketTimeout: 2000 });
    try {
      const rows = await connection.query<{ name: string }[]>(`SELECT name FROM ${TABLE}`);
      const done = new Set(rows.map(({ name }) => name));
      if (expected.some((name) => !done.has(name))) return { ready: false, database: 'schema-behind' };
      // A newer build has migrated already: its migrations keep the older code working until it is replaced.
      return { ready: true, database: done.size > expected.length ? 'schema-ahead' : 'ok' };
    } catch (error) {
      const noTable = (error as { code?: string }).code === 'ER_NO_SUCH_TABLE';
      return { ready: false, database: noTable ? 'schema-behind' : 'unreachable' };
    } finally {
      connection.destroy();
    }
  };
}
