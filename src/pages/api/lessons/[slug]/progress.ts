import { lessonFor } from '../../../../server/access/lesson.ts';
import { endpoint, json } from '../../../../server/problem.ts';
import { progressOf } from '../../../../server/runs/index.ts';

export const GET = endpoint(async ({ params, locals }) => {
  const lesson = await lessonFor(params.slug!, locals.standing);
  return json(await progressOf(locals.person!.id, lesson));
});
