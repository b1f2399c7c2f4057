'use server';

import { cookies } from 'next/headers';
import { environment } from '@/lib/env';
import { runPublicAction } from '@/lib/http/run-action';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { SizeAnswer, SizeFormView } from '@/lib/schemas/size-request';
import { answerSizeRequest, openSizeRequest, reopenSizeRequest } from '@/lib/services/size-request/answer-size-request';
import { CLAIM_MINUTES } from '@/lib/services/size-request/request-link';

const COOKIE = 'selvedge-size';
const claimOf = async () => (await cookies()).get(COOKIE)?.value;

/** The link's secret goes in, a cookie that lasts an hour comes back; the link itself stays good. */
export async function openFormAction(token: string): Promise<ActionResult<SizeFormView>> {
  return runPublicAction('open a size request', async () => {
    const { view, claim } = await openSizeRequest({ token });
    (await cookies()).set(COOKIE, claim, {
      path: '/size', httpOnly: true, sameSite: 'strict', secure: environment().publicUrl.startsWith('https:'), maxAge: CLAIM_MINUTES * 60,
    });
    return view;
  });
}

export async function reopenFormAction(): Promise<ActionResult<SizeFormView>> {
  return runPublicAction('open a size request again', async () => reopenSizeRequest(await claimOf()));
}

export async function answerAction(answer: SizeAnswer): Promise<ActionResult<SizeFormView>> {
  return runPublicAction('answer a size request', async () => {
    const done = await answerSizeRequest(await claimOf(), answer);
    (await cookies()).delete({ name: COOKIE, path: '/size' });
    return done;
  });
}
