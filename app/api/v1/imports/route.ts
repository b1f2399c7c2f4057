import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { startImportInput } from '@/lib/schemas/import';
import { startImport } from '@/lib/services/import/start-import';

export const POST = handleRoute({ body: startImportInput }, async ({ actor, context, body }) => {
  writeLimit.count(actor);
  return Response.json(await startImport(context, body), { status: 201, headers: { 'cache-control': 'no-store' } });
});
