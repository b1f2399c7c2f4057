import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { commitImportBody } from '@/lib/schemas/import';
import { commitImport } from '@/lib/services/import/commit-import';

export const POST = handleRoute({ params: idParams, body: commitImportBody }, async ({ actor, context, params, body }) => {
  writeLimit.count(actor);
  return commitImport(context, { importId: params.id, ...body });
});
