import '@/lib/schemas/fields/jitless';
import type * as z from 'zod';
import type { SitePolicy } from '@/lib/domain/case/model';
import { policyShape } from '@/lib/schemas/case/policy';
import { strict } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema } from '@/lib/schemas/fields/ids';

const { version: _version, ...editable } = policyShape;

/** What the policy form holds; the version is counted by the server. */
export const policyFormSchema = strict(editable);
export type PolicyForm = z.output<typeof policyFormSchema>;

export const editPolicyInput = strict({ expectedVersion: expectedVersionSchema, form: policyFormSchema });

export interface PolicyView {
  readonly version: number;
  readonly policy: SitePolicy;
  readonly changedAt: string;
}
