import '@/lib/schemas/fields/jitless';
import type * as z from 'zod';
import type { PathwayPolicy } from '@/lib/domain/site-policy/document';
import type { SitePolicy } from '@/lib/domain/case/model';
import { policyShape } from '@/lib/schemas/case/policy';
import { count, strict } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema } from '@/lib/schemas/fields/ids';

const { version: _version, ...editable } = policyShape;

export const pathwayShape = {
  setUpMinutes: count({ min: 0, max: 120, unit: 'minutes', text: 'Positioning, coils and pauses beside the scan itself' }),
};

/** What the policy form holds; the version is counted by the server. */
export const policyFormSchema = strict({ ...editable, ...pathwayShape });
export type PolicyForm = z.output<typeof policyFormSchema>;

export const editPolicyInput = strict({ expectedVersion: expectedVersionSchema, form: policyFormSchema });

export interface PolicyView {
  readonly version: number;
  readonly policy: SitePolicy;
  /** What the pathway rests on and the engine does not. */
  readonly pathway: PathwayPolicy;
  readonly changedAt: string;
}
