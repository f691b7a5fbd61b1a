// Compiles and rehearses one lesson in a thread of its own, which is ended where it takes too long or too much.
import { parentPort, workerData } from 'node:worker_threads';
import { register } from 'tsx/esm/api';

register();
const { compile, rehearseLesson } = await import('../../lessons/index.ts');
const { markdown, file, lessons } = workerData;
const result = compile(markdown, { file });
parentPort?.postMessage(
  result.ok
    ? {
        ok: true,
        lesson: result.lesson,
        rehearsal: rehearseLesson(result.lesson, markdown, {
          lessons: new Set(lessons),
          pictures: new Set(),
        }),
      }
    : result,
);
