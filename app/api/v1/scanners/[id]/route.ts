import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { getScanner } from '@/lib/services/scanner/get-scanner';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) => getScanner(context, params));
