import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { policySchema } from '@/lib/schemas/case/policy';
import { pathwayShape, type PolicyView } from '@/lib/schemas/site-policy';

export const policyViewSchema = z.strictObject({
  version: z.int().describe('0 is the standard policy of a new site.'),
  policy: policySchema,
  pathway: z.strictObject(pathwayShape).describe('What the pathway rests on and the engine does not.'),
  changedAt: z.string().describe('Moment of the last edit, or empty for the standard policy.'),
}) satisfies z.ZodType<PolicyView>;
