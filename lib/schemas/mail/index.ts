/** One mail of the outbox as people see it: whom it is for by name or masked, never what it says. */
export interface MailView {
  readonly id: string;
  readonly kind: string;
  readonly status: 'queued' | 'sent' | 'failed';
  /** A person's name, or a masked address. */
  readonly to: string;
  /** The booking whose size request it carries. */
  readonly booking?: { readonly id: string; readonly accession: string };
  readonly attempts: number;
  readonly createdAt: string;
  readonly sentAt?: string;
  /** While it waits for another try. */
  readonly nextAttemptAt?: string;
  /** What the mail server said last. */
  readonly problem?: string;
  readonly maySendAgain: boolean;
}

export interface MailList {
  readonly failed: readonly MailView[];
  readonly queued: readonly MailView[];
  readonly sent: readonly MailView[];
}
