import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { exportDemonstration } from '@/lib/services/demonstration/exchange-demonstration';

/** All scenes as a file that another site can bring in. */
export const GET = handleRoute({ params: idParams }, async ({ context, params }) => {
  const file = await exportDemonstration(context, params);
  return new Response(JSON.stringify(file, null, 1), {
    headers: {
      'content-type': 'application/json; charset=utf-8',
      'content-disposition': 'attachment; filename="scenes.json"',
      'cache-control': 'no-store',
    },
  });
});
