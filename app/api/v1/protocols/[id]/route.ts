import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { getProtocol } from '@/lib/services/protocol/get-protocol';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) => getProtocol(context, params));
