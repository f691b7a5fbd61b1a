// Gives each test file an empty database of its own and the environment that src/server/config reads.
import { createHash } from 'node:crypto';
import mariadb from 'mariadb';
import { expect, inject } from 'vitest';

const { host, port, user, password } = inject('database');
const file = expect.getState().testPath ?? String(process.pid);
const name = `dropwise_test_${createHash('sha256').update(file).digest('hex').slice(0, 12)}`;

const connection = await mariadb.createConnection({ host, port, user, password });
await connection.query(`DROP DATABASE IF EXISTS \`${name}\``);
await connection.query(`CREATE DATABASE \`${name}\``);
await connection.end();

Object.assign(process.env, {
  NODE_ENV: 'test',
  PUBLIC_URL: 'http://127.0.0.1:4321',
  DATABASE_HOST: host,
  DATABASE_PORT: String(port),
  DATABASE_USER: user,
  DATABASE_PASSWORD: password,
  DATABASE_NAME: name,
  SMTP_URL: 'smtp://127.0.0.1:1',
  COOKIE_SECRET: 'only for tests, only for tests, only for tests',
  ARGON2_MEMORY_KIB: '256',
  ARGON2_PASSES: '1',
});
