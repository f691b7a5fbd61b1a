import pino from 'pino';

/** One JSON line an event. Values are JSON-encoded, so a line break in a header cannot start a second line. */
export function createLog(level: string) {
  return pino({
    level,
    base: { service: 'web' },
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: {
      paths: ['*.password', '*.token', '*.cookie', '*.authorization', 'cookie', 'authorization'],
      censor: '[hidden]',
    },
  });
}
export type Log = ReturnType<typeof createLog>;
