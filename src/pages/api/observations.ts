import { lessonFor } from '../../server/access/lesson.ts';
import { endpoint, json, readJson } from '../../server/problem.ts';
import { observe } from '../../server/runs/index.ts';
import { observeShape } from '../../server/runs/shapes.ts';

export const POST = endpoint(async ({ request, locals }) => {
  const { lesson: slug, prediction, observed } = await readJson(request, observeShape);
  const lesson = await lessonFor(slug, locals.standing);
  return json(await observe(locals.person!.id, lesson, prediction, observed));
});
