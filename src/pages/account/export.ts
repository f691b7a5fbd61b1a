import type { APIRoute } from 'astro';
import { exportPerson } from '../../server/people/export.ts';

export const GET: APIRoute = async ({ locals }) =>
  new Response(JSON.stringify(await exportPerson(locals.person!.id), null, 2), {
    headers: {
      'Content-Type': 'application/json; charset=utf-8',
      'Content-Disposition': 'attachment; filename="dropwise-my-data.json"',
      'Cache-Control': 'no-store',
    },
  });
