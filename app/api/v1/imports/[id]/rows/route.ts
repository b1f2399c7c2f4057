import { handleRoute } from '@/lib/http/handle-route';
import { pieceLimit } from '@/lib/http/rate-limit';
import { idParams } from '@/lib/schemas/fields/ids';
import { stageRowsBody } from '@/lib/schemas/import';
import { stageRows } from '@/lib/services/import/stage-rows';

export const POST = handleRoute({ params: idParams, body: stageRowsBody }, async ({ actor, context, params, body }) => {
  pieceLimit.count(actor);
  return stageRows(context, { importId: params.id, ...body });
});
