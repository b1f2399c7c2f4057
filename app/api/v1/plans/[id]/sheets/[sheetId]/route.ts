import { handleRoute } from '@/lib/http/handle-route';
import { sheetParams } from '@/lib/schemas/plan-sheet';
import { getSheet } from '@/lib/services/plan-sheet/get-sheet';

export const GET = handleRoute({ params: sheetParams }, async ({ context, params }) =>
  getSheet(context, { planId: params.id, sheetId: params.sheetId }),
);
