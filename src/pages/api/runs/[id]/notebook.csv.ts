import { endpoint } from '../../../../server/problem.ts';
import { runPage } from '../../../../server/runs/index.ts';

export const GET = endpoint(async ({ params, locals }) => {
  const { csv, lesson } = await runPage(locals.person!.id, params.id!);
  return new Response(csv, {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': `attachment; filename="${lesson}-notebook.csv"`,
      'Cache-Control': 'no-store',
    },
  });
});
