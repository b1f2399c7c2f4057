import { handleRoute } from '@/lib/http/handle-route';
import { handOutParams } from '@/lib/schemas/demonstration';
import { getHandOutFile } from '@/lib/services/demonstration/get-hand-out';

/** The file of one hand-out. Its name says nothing about what is in it: it ends up in a downloads folder. */
export const GET = handleRoute({ params: handOutParams }, async ({ context, params }) => {
  const bytes = await getHandOutFile(context, { demonstrationId: params.id, handOutId: params.handOutId });
  return new Response(new Uint8Array(bytes), {
    headers: {
      'content-type': 'application/pdf',
      'content-disposition': 'attachment; filename="hand-out.pdf"',
      'cache-control': 'no-store',
    },
  });
});
