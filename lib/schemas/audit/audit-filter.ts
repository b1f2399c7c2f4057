import '@/lib/schemas/fields/jitless';
import * as z from 'zod';

/** The filter lives in the page's address; what cannot be read is dropped rather than refused. */
export const auditFilterSchema = z.object({
  action: z.string().regex(/^[a-z-]+\.[a-z-]+$/).optional().catch(undefined),
  subject: z.string().regex(/^[a-z-]+$/).optional().catch(undefined),
  id: z.uuid().optional().catch(undefined),
  by: z.uuid().optional().catch(undefined),
  /** Position of the last line of the page before: `moment~id`. */
  before: z
    .string()
    .regex(/^\d{4}-\d\d-\d\d \d\d:\d\d:\d\d(\.\d{1,6})?[+-]\d\d(:\d\d)?~[0-9a-f-]{36}$/)
    .optional()
    .catch(undefined),
});
export type AuditFilterInput = z.infer<typeof auditFilterSchema>;
