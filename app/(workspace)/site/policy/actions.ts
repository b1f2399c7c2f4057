'use server';

import { toPolicyForm } from '@/components/site-policy/to-policy-form';
import { runAction } from '@/lib/http/run-action';
import type { PolicyForm } from '@/lib/schemas/site-policy';
import { editPolicy } from '@/lib/services/site-policy/edit-policy';
import { getPolicy } from '@/lib/services/site-policy/get-policy';

export async function savePolicy(expectedVersion: number, form: PolicyForm) {
  return runAction('edit the policy', (context) => editPolicy(context, { expectedVersion, form }));
}

export async function readPolicyForm() {
  return runAction('read the policy', async (context) => toPolicyForm(await getPolicy(context)));
}
