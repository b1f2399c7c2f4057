import { handleRoute } from '@/lib/http/handle-route';
import { listProtocols } from '@/lib/services/protocol/list-protocols';

export const GET = handleRoute({}, async ({ context }) => ({ protocols: await listProtocols(context) }));
