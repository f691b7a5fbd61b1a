import pino from 'pino';

/** One JSON line an event, secrets hidden. The level comes from LOG_LEVEL. */
export const log = pino({
  level: process.env.LOG_LEVEL ?? 'info',
  base: { service: 'dropwise' },
  timestamp: pino.stdTimeFunctions.isoTime,
  redact: { paths: ['password', 'token', 'cookie', '*.password', '*.token', '*.cookie'], censor: '[hidden]' },
});
