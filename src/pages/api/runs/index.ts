import { lessonFor } from '../../../server/access/lesson.ts';
import { endpoint, json, readJson } from '../../../server/problem.ts';
import { openRun } from '../../../server/runs/index.ts';
import { openShape } from '../../../server/runs/shapes.ts';

export const POST = endpoint(async ({ request, locals }) => {
  const { runId, lesson: slug, bench, seed, branchedFrom } = await readJson(request, openShape);
  const lesson = await lessonFor(slug, locals.standing);
  const run = await openRun(locals.person!.id, lesson, bench, runId, {
    ...(seed === undefined ? {} : { seed }),
    ...(branchedFrom === undefined ? {} : { branchedFrom }),
  });
  return json({ runId: run.publicId, bench: run.bench, seed: run.seed, count: run.moveCount }, 200);
});
