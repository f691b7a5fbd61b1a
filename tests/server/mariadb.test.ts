import mariadb, { type Connection } from 'mariadb';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

let connection: Connection;

beforeAll(async () => {
  connection = await mariadb.createConnection({
    host: process.env.DATABASE_HOST!,
    port: Number(process.env.DATABASE_PORT),
    user: process.env.DATABASE_USER!,
    password: process.env.DATABASE_PASSWORD!,
    database: process.env.DATABASE_NAME!,
  });
});

afterAll(() => connection.end());

async function setting(name: string): Promise<unknown> {
  const [row] = await connection.query<{ value: unknown }[]>(`SELECT @@global.${name} AS value`);
  return row?.value;
}

describe('the private database', () => {
  it('stores every character and tells accents and emoji apart', async () => {
    expect(await setting('character_set_server')).toBe('utf8mb4');
    await connection.query('CREATE TABLE names (name VARCHAR(20) UNIQUE)');
    await connection.query("INSERT INTO names VALUES ('😀'), ('😁'), ('dúp'), ('dup'), ('ß'), ('ss')");
    await expect(connection.query("INSERT INTO names VALUES ('DUP')")).rejects.toThrow(/Duplicate/);
    const names = await connection.query<{ name: string }[]>('SELECT name FROM names');
    expect(names.map(({ name }) => name).sort()).toEqual(['dup', 'dúp', 'ss', 'ß', '😀', '😁'].sort());
  });

  it('ends a whole transaction at a lock timeout and reads only what is committed', async () => {
    expect(Number(await setting('innodb_rollback_on_timeout'))).toBe(1);
    expect(await setting('tx_isolation')).toBe('READ-COMMITTED');
    expect(Number(await setting('innodb_lock_wait_timeout'))).toBe(5);
  });

  it('keeps UTC and refuses what does not fit', async () => {
    expect(await setting('time_zone')).toBe('+00:00');
    await connection.query('CREATE TABLE short (name VARCHAR(3))');
    await expect(connection.query("INSERT INTO short VALUES ('four')")).rejects.toThrow(/too long/i);
  });

  it('lets nobody in without a password', async () => {
    const { DATABASE_HOST: host, DATABASE_PORT: port } = process.env;
    for (const user of ['root', 'dropwise', ''])
      await expect(
        mariadb.createConnection({
          host: host!,
          port: Number(port),
          user,
          password: '',
          connectTimeout: 2000,
        }),
      ).rejects.toThrow(/denied/i);
  });
});
