'use server';

import { runAction } from '@/lib/http/run-action';
import type { KeepClearRequestForm } from '@/lib/schemas/keep-clear-request';
import { requestKeepClear } from '@/lib/services/keep-clear-request/request-keep-clear';

export async function askKeepClear(bookingId: string, form: KeepClearRequestForm) {
  return runAction('ask for a keep-clear area', (context) => requestKeepClear(context, { ...form, bookingId }));
}
