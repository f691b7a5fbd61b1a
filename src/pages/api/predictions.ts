import { lessonFor } from '../../server/access/lesson.ts';
import { endpoint, json, readJson } from '../../server/problem.ts';
import { lockPrediction } from '../../server/runs/index.ts';
import { predictShape } from '../../server/runs/shapes.ts';

export const POST = endpoint(async ({ request, locals }) => {
  const { lesson: slug, prediction, answer, confidence } = await readJson(request, predictShape);
  const lesson = await lessonFor(slug, locals.standing);
  return json(await lockPrediction(locals.person!.id, lesson, prediction, answer, confidence));
});
