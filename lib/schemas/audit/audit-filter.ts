import '@/lib/schemas/fields/jitless';
import * as z from 'zod';

/** The filter lives in the page's address; what cannot be read is dropped rather than refused. */
export const auditFilterSchema = z.object({
  action: z.string().regex(/^[a-z-]+\.[a-z-]+$/).optional().catch(undefined),
  subject: z.string().regex(/^[a-z-]+$/).optional().catch(undefined),
  id: z.uuid().optional().catch(undefined),
  by: z.uuid().optional().catch(undefined),
  /** Position of the last line of the page before: microseconds since 1970 and id. */
  before: z
    .string()
    .regex(/^\d{1,16}~[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/)
    .optional()
    .catch(undefined),
});
export type AuditFilterInput = z.infer<typeof auditFilterSchema>;
