'use server';

import { runAction } from '@/lib/http/run-action';
import { retryMail } from '@/lib/services/mail/retry-mail';

export async function sendAgain(id: string) {
  return runAction('send a mail again', (context) => retryMail(context, { id }));
}
