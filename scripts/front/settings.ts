// The front's own settings, from the environment, validated once at start.
import { isIP, BlockList } from 'node:net';
import { z } from 'zod';

const flag = z
  .enum(['true', 'false'])
  .default('false')
  .transform((word) => word === 'true');
const port = z.coerce.number().int().min(0).max(65_535);

const schema = z.object({
  NODE_ENV: z.enum(['production', 'development', 'test']).default('development'),
  HOST: z.string().optional(),
  PORT: port.default(4321),
  PUBLIC_URL: z.string().url(),
  TRUSTED_PROXIES: z.string().default(''),
  DRAIN_SECONDS: z.coerce.number().min(0).max(60).default(0.25),
  DATABASE_HOST: z.string().min(1).default('127.0.0.1'),
  DATABASE_PORT: port.default(3306),
  DATABASE_USER: z.string().min(1).default('dropwise'),
  DATABASE_PASSWORD: z.string().min(1),
  DATABASE_NAME: z.string().min(1).default('dropwise'),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
  DEMO: flag,
});

export interface DatabaseSettings {
  host: string;
  port: number;
  user: string;
  password: string;
  database: string;
}

export interface FrontSettings {
  production: boolean;
  /** Undefined: every address of this machine. */
  host: string | undefined;
  port: number;
  publicUrl: URL;
  /** Whose X-Forwarded-* headers are believed; nobody's where it is undefined. */
  trustedProxies: BlockList | undefined;
  drain_ms: number;
  logLevel: string;
  database: DatabaseSettings;
  /** The demo is also reached under this machine's own names and addresses. */
  demo: boolean;
}

/** Reads `10.0.0.0/8, 127.0.0.1` into a list that answers whether an address belongs to it. */
export function parseProxies(text: string): BlockList | undefined {
  const entries = text.split(',').map((entry) => entry.trim());
  const list = new BlockList();
  let count = 0;
  for (const entry of entries.filter(Boolean)) {
    const [address = '', bits] = entry.split('/');
    const family = isIP(address) === 6 ? 'ipv6' : 'ipv4';
    const longest = family === 'ipv6' ? 128 : 32;
    const prefix = bits === undefined ? longest : Number(bits);
    if (!isIP(address) || !Number.isInteger(prefix) || prefix < 0 || prefix > longest)
      throw new Error(`TRUSTED_PROXIES: “${entry}” is neither an address nor a network such as 10.0.0.0/8`);
    list.addSubnet(address, prefix, family);
    count += 1;
  }
  return count > 0 ? list : undefined;
}

/** @throws Error that lists every setting that is missing or wrong */
export function readSettings(environment: NodeJS.ProcessEnv): FrontSettings {
  const parsed = schema.safeParse(environment);
  if (!parsed.success) {
    const faults = parsed.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}`);
    throw new Error(`The configuration is not complete:\n${faults.join('\n')}`);
  }
  const values = parsed.data;
  const publicUrl = new URL(values.PUBLIC_URL);
  // NODE_ENV=production also makes libraries fast, and the demo wants that too: it is told apart by DEMO.
  const production = values.NODE_ENV === 'production' && !values.DEMO;
  if (publicUrl.pathname !== '/' || publicUrl.search || publicUrl.hash || publicUrl.username)
    throw new Error('PUBLIC_URL: a scheme and a host alone, such as https://dropwise.example.org');
  if (!['http:', 'https:'].includes(publicUrl.protocol)) throw new Error('PUBLIC_URL: https:// is expected');
  if (production && publicUrl.protocol !== 'https:')
    throw new Error('PUBLIC_URL: production needs https://, since sign-in cookies are only sent over TLS');
  if (values.DEMO && publicUrl.protocol === 'https:')
    throw new Error(
      'DEMO: the demo’s sign-ins are printed when it starts, so it is not for a public address',
    );
  return {
    production,
    host: values.HOST,
    port: values.PORT,
    publicUrl,
    trustedProxies: parseProxies(values.TRUSTED_PROXIES),
    drain_ms: values.DRAIN_SECONDS * 1000,
    logLevel: values.LOG_LEVEL,
    database: {
      host: values.DATABASE_HOST,
      port: values.DATABASE_PORT,
      user: values.DATABASE_USER,
      password: values.DATABASE_PASSWORD,
      database: values.DATABASE_NAME,
    },
    demo: values.DEMO,
  };
}
