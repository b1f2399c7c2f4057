import { handleRoute } from '@/lib/http/handle-route';
import { writeLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { cancelImport } from '@/lib/services/import/cancel-import';

export const POST = handleRoute({ params: idParams }, async ({ actor, context, params }) => {
  writeLimit.count(actor);
  return cancelImport(context, params);
});
