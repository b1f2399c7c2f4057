'use server';

import { runAction } from '@/lib/http/run-action';
import type { ChangePasswordInput } from '@/lib/schemas/session/password';
import { changePassword } from '@/lib/services/session/change-password';
import { signOutEverywhere } from '@/lib/services/session/sign-out-everywhere';

export async function changePasswordAction(input: ChangePasswordInput) {
  return runAction('change a password', (context) => changePassword(context, input));
}

/** For the menu in the header: afterwards the page drops its own cookie too. */
export async function signOutEverywhereAction() {
  return runAction('sign out everywhere', signOutEverywhere);
}
