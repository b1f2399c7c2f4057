import { handleRoute } from '@/lib/http/handle-route';
import { getPolicy } from '@/lib/services/site-policy/get-policy';

export const GET = handleRoute({}, async ({ context }) => getPolicy(context));
