// One JSON line an event. JSON escapes line breaks and control characters, so nothing in a request can forge a line.
import pino, { type DestinationStream, type Logger } from 'pino';

/** Names whose values never reach a log, wherever in an object they stand. */
const SECRETS = ['password', 'token', 'secret', 'cookie', 'authorization', 'set-cookie'];

export function createLog(level: string, destination?: DestinationStream): Logger {
  const options = {
    level,
    base: { pid: process.pid },
    timestamp: pino.stdTimeFunctions.isoTime,
    formatters: { level: (label: string) => ({ level: label }) },
    redact: {
      paths: SECRETS.flatMap((name) => [`["${name}"]`, `*["${name}"]`, `*.*["${name}"]`]),
      censor: '[redacted]',
    },
  };
  return destination ? pino(options, destination) : pino(options);
}

/** The framework and its libraries speak on the console; from here on that becomes log lines too. */
export function captureConsole(log: Logger): void {
  const levels = {
    debug: 'debug',
    log: 'info',
    info: 'info',
    warn: 'warn',
    error: 'error',
    trace: 'debug',
  } as const;
  for (const [method, level] of Object.entries(levels))
    console[method as keyof typeof levels] = (...said: unknown[]) => {
      const error = said.find((part) => part instanceof Error);
      const words = said
        .filter((part) => part !== error)
        .map((part) => (typeof part === 'string' ? part : JSON.stringify(part)));
      log[level](error ? { err: error } : {}, words.join(' ') || (error?.message ?? ''));
    };
}
