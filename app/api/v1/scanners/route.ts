import { handleRoute } from '@/lib/http/handle-route';
import { listScanners } from '@/lib/services/scanner/list-scanners';

export const GET = handleRoute({}, async ({ context }) => ({ scanners: await listScanners(context) }));
