import { environment } from '@/lib/env';
import { passwordLink } from '../session/password-link';

/** Where a mail leads: a plan's page asks for sign-in by itself, so its address needs no secret. */
export function mailLink(mail: { readonly id: string; readonly payload: unknown }): string {
  const { planId } = (mail.payload ?? {}) as { readonly planId?: unknown };
  return typeof planId === 'string' ? `${environment().publicUrl}/plans/${planId}` : passwordLink(mail.id);
}
