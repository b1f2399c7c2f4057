import { environment } from '@/lib/env';
import { requestLink } from '../size-request/request-link';
import { passwordLink } from '../session/password-link';

/** Where a mail leads: the page of a plan or booking asks for sign-in by itself, so its address needs no secret. */
export function mailLink(mail: { readonly id: string; readonly payload: unknown; readonly sizeRequest?: { readonly id: string } | null }): string {
  if (mail.sizeRequest) return requestLink(mail.sizeRequest.id);
  const { planId, bookingId } = (mail.payload ?? {}) as { readonly planId?: unknown; readonly bookingId?: unknown };
  if (typeof planId === 'string') return `${environment().publicUrl}/plans/${planId}`;
  return typeof bookingId === 'string' ? `${environment().publicUrl}/bookings/${bookingId}` : passwordLink(mail.id);
}
