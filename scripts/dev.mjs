// `npm run dev`: Astro's development server on the demo's own database and fakes, which `npm start` has running.
import { spawn } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { programOf, ROOT } from './checks.mjs';

const file = join(resolve(ROOT, process.env.DATA_FOLDER ?? '.data'), 'demo.json');
if (!existsSync(file)) {
  console.error(
    'Run `npm start` first: it makes the database that the development server uses, and keeps it running.',
  );
  process.exit(1);
}
const demo = JSON.parse(readFileSync(file, 'utf8'));
const port = process.env.PORT ?? '4330';
const child = spawn(process.execPath, [programOf('astro'), 'dev', '--port', port], {
  cwd: ROOT,
  stdio: 'inherit',
  env: {
    ...process.env,
    DEMO: 'true',
    PUBLIC_URL: `http://127.0.0.1:${port}`,
    DATABASE_HOST: '127.0.0.1',
    DATABASE_PORT: String(demo.databasePort),
    DATABASE_PASSWORD: demo.databasePassword,
    COOKIE_SECRET: demo.secret,
    SMTP_URL: `smtp://127.0.0.1:${demo.smtpPort}`,
  },
});
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM']))
  process.on(signal, () => child.kill(signal));
child.once('exit', (code) => (process.exitCode = code ?? 0));
