import { environment } from '@/lib/env';
import { requestLink } from '../size-request/request-link';
import { passwordLink } from '../session/password-link';

/** Where a mail leads: a plan's page asks for sign-in by itself, so its address needs no secret. */
export function mailLink(mail: { readonly id: string; readonly payload: unknown; readonly sizeRequest?: { readonly id: string } | null }): string {
  if (mail.sizeRequest) return requestLink(mail.sizeRequest.id);
  const { planId } = (mail.payload ?? {}) as { readonly planId?: unknown };
  return typeof planId === 'string' ? `${environment().publicUrl}/plans/${planId}` : passwordLink(mail.id);
}
