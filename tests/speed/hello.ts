/** A page that is always the same, behind the same front: how fast these bytes with these headers can go out at all. */
import { readFileSync } from 'node:fs';
import { pino } from 'pino';
import { createFront } from '../../scripts/front/server.ts';
import { readSettings } from '../../scripts/front/settings.ts';

const [file, port] = process.argv.slice(2);
const body = readFileSync(file!);
const settings = readSettings({
  ...process.env,
  DEMO: 'true',
  PORT: port,
  HOST: '127.0.0.1',
  PUBLIC_URL: `http://127.0.0.1:${port}`,
  // Asked by nothing here, and needed by the settings.
  DATABASE_PASSWORD: 'none',
});
const { server } = createFront({
  settings,
  handler: (_request, response) => {
    response.writeHead(200, { 'Content-Type': 'text/html; charset=utf-8', 'Cache-Control': 'no-store' });
    response.end(body);
  },
  client: 'dist/client',
  askReadiness: () => Promise.resolve({ ready: true, database: 'ok' }) as never,
  log: pino({ level: 'warn' }),
});
server.listen(settings.port, settings.host, () => process.stdout.write('listening\n'));
process.once('SIGTERM', () => process.exit(0));
