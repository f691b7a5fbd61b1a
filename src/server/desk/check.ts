import path from 'node:path';
import { Worker } from 'node:worker_threads';
import type { CompiledLesson, Fault, LessonRehearsal } from '../../lessons/index.ts';
import { ProblemError } from '../problem.ts';

export type Checked =
  | { readonly ok: true; readonly lesson: CompiledLesson; readonly rehearsal: LessonRehearsal }
  | { readonly ok: false; readonly faults: readonly Fault[] };

/** A long lesson with careful benches takes some seconds; what takes longer than this was made to. */
const PATIENCE_MS = 60_000;
const MEMORY_MB = 512;
/** Checks at once in one process: pages have to be served meanwhile. */
const AT_ONCE = 2;
let running = 0;

/**
 * Compiles and rehearses an author's text in a thread of its own, within bounded time and memory. Where it exceeds them,
 * that is told as a fault.
 * @param lessons slugs that its links may lead to
 * @throws ProblemError 503 while as many checks as may are running
 */
export async function checkLesson(
  markdown: string,
  file: string,
  { lessons = [], patience_ms = PATIENCE_MS }: { lessons?: readonly string[]; patience_ms?: number } = {},
): Promise<Checked> {
  if (running >= AT_ONCE)
    throw new ProblemError({
      status: 503,
      code: 'desk-busy',
      title: 'Other lessons are being checked. Your text is still here: try again in a moment.',
      headers: { 'Retry-After': '5' },
    });
  running += 1;
  const worker = new Worker(path.resolve('src/server/desk/worker.mjs'), {
    workerData: { markdown, file, lessons },
    resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB },
  });
  const stopped = (message: string): Checked => ({
    ok: false,
    faults: [{ file, line: 1, column: 1, message }],
  });
  let timer: NodeJS.Timeout | undefined;
  try {
    return await new Promise<Checked>((resolve, reject) => {
      timer = setTimeout(
        () =>
          resolve(
            stopped(
              `Checking this lesson takes more than ${Math.ceil(patience_ms / 1000)} s. Take out what repeats itself, or make it two lessons.`,
            ),
          ),
        patience_ms,
      );
      worker.once('message', resolve);
      worker.once('error', (error: NodeJS.ErrnoException) =>
        error.code === 'ERR_WORKER_OUT_OF_MEMORY'
          ? resolve(stopped('Checking this lesson takes too much memory. Take out what repeats itself.'))
          : reject(error),
      );
      worker.once('exit', (code) => reject(new Error(`The check ended without an answer (${code}).`)));
    });
  } finally {
    clearTimeout(timer);
    running -= 1;
    await worker.terminate();
  }
}
