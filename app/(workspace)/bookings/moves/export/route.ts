import { handleRoute } from '@/lib/http/handle-route';
import { exportMoves } from '@/lib/services/move-proposal/list-moves';

/** The open moves as a file for whoever keeps the booking system. */
export const GET = handleRoute({}, async ({ context }) =>
  new Response(await exportMoves(context), {
    headers: {
      'content-type': 'text/csv; charset=utf-8',
      'content-disposition': 'attachment; filename="moves-to-make.csv"',
      'cache-control': 'no-store',
    },
  }),
);
