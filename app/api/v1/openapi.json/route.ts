import { handlePublicRoute } from '@/lib/http/handle-route';
import { openApiDocument } from '@/lib/schemas/openapi/document';

/** The description of this API, made from the schemas the routes parse with. It holds no data of any site. */
export const GET = handlePublicRoute({}, async () => openApiDocument());
