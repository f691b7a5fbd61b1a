import { z } from 'zod';

/**
 * The environment of the application, validated once. Every variable is described in .env.example; a wrong one stops the
 * start with a list of what to mend. Secrets come from here alone.
 */
const schema = z
  .object({
    NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
    /** The demo that `npm start` brings up: over plain http, with sign-ins that it prints. */
    DEMO: z.enum(['true', 'false']).default('false'),
    PUBLIC_URL: z.string().url().default('http://127.0.0.1:4321'),
    DATABASE_HOST: z.string().default('127.0.0.1'),
    DATABASE_PORT: z.coerce.number().int().min(1).max(65535).default(3306),
    DATABASE_NAME: z.string().min(1).default('dropwise'),
    DATABASE_USER: z.string().min(1).default('dropwise'),
    DATABASE_PASSWORD: z.string().default(''),
    DATABASE_POOL: z.coerce.number().int().min(1).max(100).default(10),
    SMTP_URL: z.string().url().default('smtp://127.0.0.1:1025'),
    MAIL_FROM: z.string().default('Dropwise <post@dropwise.invalid>'),
    /** Signs what a browser keeps. At least 32 characters; `openssl rand -base64 32` makes one. */
    COOKIE_SECRET: z.string().min(32, 'needs at least 32 random characters'),
    LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info'),
    /** argon2id: memory in KiB and passes. The defaults are OWASP ASVS 5.0 appendix C's second choice. */
    ARGON2_MEMORY_KIB: z.coerce.number().int().min(256).default(19456),
    ARGON2_PASSES: z.coerce.number().int().min(1).default(2),
    SESSION_IDLE_DAYS: z.coerce.number().min(0.01).default(14),
    SESSION_ABSOLUTE_DAYS: z.coerce.number().min(0.01).default(90),
  })
  .superRefine((env, context) => {
    if (env.NODE_ENV !== 'production' || env.DEMO === 'true') return;
    if (!env.PUBLIC_URL.startsWith('https://'))
      context.addIssue({
        code: 'custom',
        path: ['PUBLIC_URL'],
        message: 'has to be an https address in production',
      });
    if (!env.DATABASE_PASSWORD)
      context.addIssue({ code: 'custom', path: ['DATABASE_PASSWORD'], message: 'is needed in production' });
    if (env.ARGON2_MEMORY_KIB < 19456 || env.ARGON2_PASSES < 2)
      context.addIssue({
        code: 'custom',
        path: ['ARGON2_MEMORY_KIB'],
        message: 'is too weak for production',
      });
  });

export type Config = z.infer<typeof schema> & { readonly https: boolean; readonly production: boolean };

/** @throws Error with one line for each wrong variable; the values themselves are never printed. */
export function readConfig(environment: NodeJS.ProcessEnv): Config {
  const read = schema.safeParse(environment);
  if (!read.success) {
    const lines = read.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`These settings are not right (see .env.example):\n${lines.join('\n')}`);
  }
  return {
    ...read.data,
    https: read.data.PUBLIC_URL.startsWith('https://'),
    // NODE_ENV=production also makes libraries fast, which the demo wants too.
    production: read.data.NODE_ENV === 'production' && read.data.DEMO !== 'true',
  };
}

export const config: Config = readConfig(process.env);
