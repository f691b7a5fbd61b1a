import { endpoint, json, readJson } from '../../../../server/problem.ts';
import { saveMoves } from '../../../../server/runs/index.ts';
import { movesShape } from '../../../../server/runs/shapes.ts';

export const POST = endpoint(async ({ params, request, locals }) => {
  const { after, moves } = await readJson(request, movesShape);
  return json(await saveMoves(locals.person!.id, params.id!, after, moves));
});
