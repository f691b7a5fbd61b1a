// The web process: the front before Astro's handler. Built into dist/front.mjs, beside what Astro builds.
import { pathToFileURL } from 'node:url';
import { join, resolve } from 'node:path';
import { migrations } from '../../src/server/database/migrations/index.ts';
import { captureConsole, createLog } from './log.ts';
import { createReadiness } from './schema.ts';
import { createFront, type Handler } from './server.ts';
import { readSettings } from './settings.ts';

const dist = resolve(import.meta.dirname);
const settings = readSettings(process.env);
const log = createLog(settings.logLevel);
captureConsole(log);

const { handler } = (await import(pathToFileURL(join(dist, 'server/entry.mjs')).href)) as {
  handler: Handler;
};

const { server, drain } = createFront({
  settings,
  handler,
  client: join(dist, 'client'),
  askReadiness: createReadiness(
    settings.database,
    migrations.map(({ name }) => name),
  ),
  log,
  instance: process.env.DROPWISE_INSTANCE,
});

server.once('error', (error: NodeJS.ErrnoException) => {
  const taken = error.code === 'EADDRINUSE';
  log.fatal(
    { err: error },
    taken ? `port ${settings.port} is taken: set PORT to another one` : 'cannot listen',
  );
  process.exit(1);
});
server.listen(settings.port, settings.host, () => log.info({ address: server.address() }, 'listening'));

async function stop(signal: string): Promise<void> {
  log.info({ signal }, 'draining');
  await drain();
  log.info('stopped');
  process.exit(0);
}
process.once('SIGTERM', () => void stop('SIGTERM'));
process.once('SIGINT', () => void stop('SIGINT'));
// One request's mistake must not end everybody else's; the framework answers that request itself.
process.on('unhandledRejection', (error) => log.error({ err: error }, 'unhandled rejection'));
