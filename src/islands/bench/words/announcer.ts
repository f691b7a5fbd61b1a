/** At most one message a second goes to the live region; of those that come in between, the last one is said. */
export const QUIET_MS = 1000;

export interface Timers {
  readonly now: () => number;
  readonly after: (ms: number, call: () => void) => number;
  readonly clear: (handle: number) => void;
}

const BROWSER: Timers = {
  now: () => performance.now(),
  after: (ms, call) => window.setTimeout(call, ms),
  clear: (handle) => window.clearTimeout(handle),
};

export interface Announcer {
  readonly say: (message: string) => void;
  readonly stop: () => void;
}

export function createAnnouncer(speak: (message: string) => void, timers: Timers = BROWSER): Announcer {
  let last = Number.NEGATIVE_INFINITY;
  let waiting: { handle: number; message: string } | null = null;

  const speakNow = (message: string) => {
    last = timers.now();
    speak(message);
  };
  return {
    say: (message) => {
      const wait = QUIET_MS - (timers.now() - last);
      if (waiting !== null) {
        waiting.message = message;
      } else if (wait <= 0) {
        speakNow(message);
      } else {
        const pending = {
          message,
          handle: timers.after(wait, () => {
            waiting = null;
            speakNow(pending.message);
          }),
        };
        waiting = pending;
      }
    },
    stop: () => {
      if (waiting !== null) timers.clear(waiting.handle);
      waiting = null;
    },
  };
}
