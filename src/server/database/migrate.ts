import { QueryTypes, type QueryInterface } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { sequelize } from './connection.ts';
import { migrations } from './migrations/index.ts';

export interface Migration {
  readonly name: string;
  up(schema: QueryInterface): Promise<void>;
  down(schema: QueryInterface): Promise<void>;
}

/** The version that this code expects: the name of its last migration. */
export const schemaVersion = migrations.at(-1)!.name;

export function migrator(list: readonly Migration[] = migrations) {
  return new Umzug({
    migrations: list.map((migration) => ({
      name: migration.name,
      up: () => migration.up(sequelize.getQueryInterface()),
      down: () => migration.down(sequelize.getQueryInterface()),
    })),
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });
}

/** Brings the schema up to date; two processes that start together take turns. */
export async function migrate(): Promise<string[]> {
  const connection = await sequelize.transaction();
  try {
    const [lock] = await sequelize.query<{ got: number }>("SELECT GET_LOCK('dropwise-migrate', 60) AS got", {
      type: QueryTypes.SELECT,
      transaction: connection,
    });
    if (lock?.got !== 1) throw new Error('Another process has been migrating the database for a minute.');
    const done = await migrator().up();
    return done.map((one) => one.name);
  } finally {
    await sequelize.query("SELECT RELEASE_LOCK('dropwise-migrate')", {
      type: QueryTypes.SELECT,
      transaction: connection,
    });
    await connection.rollback();
  }
}
