import mariadb from 'mariadb';
import { Sequelize } from 'sequelize';
import { config } from '../config/index.ts';

/** The one pool of this process. READ COMMITTED and utf8mb4; times in UTC with milliseconds. */
export const sequelize = new Sequelize(config.DATABASE_NAME, config.DATABASE_USER, config.DATABASE_PASSWORD, {
  dialect: 'mariadb',
  dialectModule: mariadb,
  host: config.DATABASE_HOST,
  port: config.DATABASE_PORT,
  timezone: '+00:00',
  isolationLevel: 'READ COMMITTED',
  logging: false,
  pool: { max: config.DATABASE_POOL, min: 0, idle: 10_000, acquire: 10_000 },
  dialectOptions: {
    connectTimeout: 3000,
    socketTimeout: 30_000,
    bigIntAsNumber: true,
    insertIdAsNumber: true,
  },
  define: { charset: 'utf8mb4', collate: 'utf8mb4_uca1400_as_ci', underscored: true },
});

// Sequelize 6 deletes `meta` from a result, which the connector defines as fixed: hand it a copy that lets it.
type Query = (...parameters: unknown[]) => Promise<unknown>;
sequelize.addHook('afterConnect', (connection: unknown) => {
  const live = connection as { query: Query };
  const query = live.query.bind(live);
  live.query = async (...parameters) => {
    const result = await query(...parameters);
    if (!Array.isArray(result) || !('meta' in result)) return result;
    return Object.assign(result.slice(), { meta: result.meta });
  };
});
