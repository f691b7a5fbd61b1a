// Starts one private MariaDB for all server tests, on memory where the machine has /dev/shm.
import { existsSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { startMariadb } from '../../../scripts/mariadb.mjs';

export interface TestDatabase {
  host: string;
  port: number;
  user: string;
  password: string;
}

declare module 'vitest' {
  export interface ProvidedContext {
    database: TestDatabase;
  }
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const folder = await mkdtemp(join(existsSync('/dev/shm') ? '/dev/shm' : tmpdir(), 'dropwise-test-'));
  const account = { user: 'dropwise', password: 'only-for-tests' };
  const server = await startMariadb({ folder, database: 'dropwise_test', durable: false, ...account });
  project.provide('database', { host: '127.0.0.1', port: server.port, ...account });
  return async () => {
    await server.stop();
    await rm(folder, { recursive: true });
  };
}
