'use server';

import { headers } from 'next/headers';
import { after } from 'next/server';
import { clientAddress } from '@/lib/http/client-address';
import { recordIncident } from '@/lib/http/incident';
import { runPublicAction } from '@/lib/http/run-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import { parseInput } from '@/lib/schemas/parse-input';
import { type AskPasswordLinkInput, askPasswordLinkSchema } from '@/lib/schemas/session/password';
import { askPasswordLink } from '@/lib/services/session/ask-password-link';

/** Answers first and works afterwards: neither the words nor the time tell whether there is such an account. */
export async function askForLinkAction(input: AskPasswordLinkInput): Promise<ActionResult> {
  return runPublicAction('ask for a password link', async () => {
    const { email } = parseInput(askPasswordLinkSchema, input);
    const address = clientAddress((await headers()).get('x-forwarded-for'));
    after(async () => {
      try {
        await askPasswordLink({ email, address });
      } catch (error) {
        recordIncident(error, 'ask for a password link, after the answer');
      }
    });
    return undefined;
  });
}
