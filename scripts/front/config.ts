import { z } from 'zod';

/** What the front itself needs; the application behind it validates the rest of the environment. */
const schema = z.object({
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4321),
  PUBLIC_URL: z.string().url().optional(),
  /** How many proxies stand before this process; their X-Forwarded-* headers are believed, everyone else's are not. */
  TRUSTED_PROXIES: z.coerce.number().int().min(0).max(5).default(0),
  NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
  LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
  DATABASE_HOST: z.string().default('127.0.0.1'),
  DATABASE_PORT: z.coerce.number().int().default(3306),
  DATABASE_USER: z.string().default('dropwise'),
  DATABASE_PASSWORD: z.string().default(''),
  DATABASE_NAME: z.string().default('dropwise'),
  /** How long requests in flight may take after SIGTERM, seconds. */
  DRAIN_SECONDS: z.coerce.number().min(0).max(120).default(20),
});

export type FrontConfig = ReturnType<typeof readFrontConfig>;

/** @throws Error that lists every wrong variable. */
export function readFrontConfig(environment: NodeJS.ProcessEnv = process.env) {
  const read = schema.safeParse(environment);
  if (!read.success)
    throw new Error(
      `The environment is not right:\n${read.error.issues.map((i) => `  ${i.path.join('.')}: ${i.message}`).join('\n')}`,
    );
  const env = read.data;
  const publicUrl = new URL(env.PUBLIC_URL ?? `http://127.0.0.1:${env.PORT}`);
  const https = publicUrl.protocol === 'https:';
  if (env.NODE_ENV === 'production' && !https)
    throw new Error('PUBLIC_URL has to be an https address in production.');
  return { ...env, publicUrl, https };
}
