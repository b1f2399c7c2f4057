import { handleRoute } from '@/lib/http/handle-route';
import { sheetParams } from '@/lib/schemas/plan-sheet';
import { getSheetFile } from '@/lib/services/plan-sheet/get-sheet';

/** The file of one sheet. Its name says the version and nothing about the patient: it ends up in a downloads folder. */
export const GET = handleRoute({ params: sheetParams }, async ({ context, params }) => {
  const { bytes, planVersion } = await getSheetFile(context, { planId: params.id, sheetId: params.sheetId });
  return new Response(new Uint8Array(bytes), {
    headers: {
      'content-type': 'application/pdf',
      'content-disposition': `attachment; filename="plan-sheet-v${planVersion}.pdf"`,
      'cache-control': 'no-store',
    },
  });
});
