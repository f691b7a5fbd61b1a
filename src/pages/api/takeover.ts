import { lessonFor } from '../../server/access/lesson.ts';
import { endpoint, json, readJson } from '../../server/problem.ts';
import { takeOver } from '../../server/runs/index.ts';
import { takeOverShape } from '../../server/runs/shapes.ts';

export const POST = endpoint(async ({ request, locals }) => {
  const { lesson: slug, prediction, ...work } = await readJson(request, takeOverShape);
  const lesson = await lessonFor(slug, locals.standing);
  return json(await takeOver(locals.person!.id, lesson, { ...work, ...(prediction ? { prediction } : {}) }));
});
