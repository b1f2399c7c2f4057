import { formatMoment } from '@/lib/presentation/moment';
import type { MailView } from '@/lib/schemas/mail';

export interface MailRow extends Pick<MailView, 'id' | 'to' | 'booking' | 'problem' | 'maySendAgain'> {
  readonly what: string;
  readonly since: string;
  readonly state: string;
}

const WHAT: Readonly<Record<string, string>> = {
  invitation: 'Invitation', 'password-reset': 'Password link', 'size-request': 'Size request', 'sign-off-asked': 'Sign-off asked',
  'plan-for-use': 'Plan for use', 'plan-sent-back': 'Plan sent back', escalation: 'A lead is asked',
};

const at = (iso: string) => formatMoment(new Date(iso));
const tries = (count: number) => (count === 1 ? '1 try' : `${count} tries`);

function stateOf({ status, attempts, sentAt, nextAttemptAt }: MailView): string {
  if (status === 'sent') return `handed to the mail server ${sentAt ? at(sentAt) : ''}`.trim();
  if (status === 'failed') return `given up after ${tries(attempts)}`;
  return nextAttemptAt ? `refused so far, ${tries(attempts)}; tried again ${at(nextAttemptAt)}` : 'waits for the mail server';
}

/** Moments become words on the server, so that every browser prints the same. */
export function toMailRow(view: MailView): MailRow {
  const { id, to, booking, problem, maySendAgain } = view;
  return {
    id, to, maySendAgain,
    what: WHAT[view.kind] ?? view.kind,
    since: at(view.createdAt),
    state: stateOf(view),
    ...(booking ? { booking } : {}),
    ...(problem ? { problem } : {}),
  };
}
