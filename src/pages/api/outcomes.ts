import { lessonFor } from '../../server/access/lesson.ts';
import { endpoint, json, readJson } from '../../server/problem.ts';
import { outcomeShape } from '../../server/runs/shapes.ts';

/**
 * What was computed for a prediction, for somebody without an account: their work is in their browser, so the browser says
 * that they have said what they saw. For people with an account `observations` answers this instead.
 */
export const POST = endpoint(async ({ request, locals }) => {
  const { lesson: slug, prediction } = await readJson(request, outcomeShape);
  const { lesson } = await lessonFor(slug, locals.standing);
  const block = lesson.blocks.find((one) => one.kind === 'prediction' && one.spec.id === prediction);
  return json({ outcome: block?.kind === 'prediction' ? block.spec.outcome : null });
});
