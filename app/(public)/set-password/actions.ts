'use server';

import { runPublicAction } from '@/lib/http/run-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { SetPasswordInput } from '@/lib/schemas/session/password';
import { inspectPasswordLink, setPassword } from '@/lib/services/session/set-password';

export async function inspectLinkAction(token: string) {
  return runPublicAction('look at a password link', () => inspectPasswordLink({ token }));
}

export async function setPasswordAction(input: SetPasswordInput): Promise<ActionResult<{ email: string }>> {
  return runPublicAction('set a password', () => setPassword(input));
}
