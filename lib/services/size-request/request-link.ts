import { environment } from '@/lib/env';
import { createHmac, timingSafeEqual } from 'node:crypto';

const sign = (what: string, text: string) => createHmac('sha256', environment().sessionSecret).update(`${what} ${text}`).digest('base64url');

/** The secret of a request's link, 256 bits, made anew each time it is written: only its hash is stored. */
export const requestSecret = (requestId: string): string => sign('size-request', requestId);

/** The secret is in the fragment, which browsers never send: it stays out of logs and referrers. */
export const requestLink = (requestId: string): string => `${environment().publicUrl}/size#${requestSecret(requestId)}`;

/** How long a page that was opened with a link may be filled in without opening the link again. */
export const CLAIM_MINUTES = 60;

export interface Claim {
  readonly siteId: string;
  readonly requestId: string;
}

/** What the link is exchanged for: a signed word of ours that names the request, for an hour. */
export function writeClaim({ siteId, requestId }: Claim, now: Date): string {
  const body = `${siteId}.${requestId}.${now.getTime() + CLAIM_MINUTES * 60_000}`;
  return `${body}.${sign('size-claim', body)}`;
}

export function readClaim(text: string | undefined, now: Date): Claim | null {
  const [, body, siteId, requestId, until, signature] = /^(([0-9a-f-]{36})\.([0-9a-f-]{36})\.(\d{13}))\.([\w-]{43})$/.exec(text ?? '') ?? [];
  if (!body || !siteId || !requestId || !signature) return null;
  const expected = sign('size-claim', body);
  if (!timingSafeEqual(Buffer.from(signature), Buffer.from(expected)) || Number(until) <= now.getTime()) return null;
  return { siteId, requestId };
}
