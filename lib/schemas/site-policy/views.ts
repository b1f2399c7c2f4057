import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { policySchema } from '@/lib/schemas/case/policy';
import type { PolicyView } from '@/lib/schemas/site-policy';

export const policyViewSchema = z.strictObject({
  version: z.int().describe('0 is the standard policy of a new site.'),
  policy: policySchema,
  changedAt: z.string().describe('Moment of the last edit, or empty for the standard policy.'),
}) satisfies z.ZodType<PolicyView>;
