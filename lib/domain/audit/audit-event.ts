import type { Action, Actor } from '@/lib/domain/access';

/** Signing in and out are no permissions, but they are worth a line. */
export type AuditAction = Action | 'account.sign-in' | 'account.set-password' | 'account.ask-password-link';

/** What a line of the log can be about. */
export const AUDIT_SUBJECTS = [
  'site',
  'person',
  'api-token',
  'scanner',
  'scanner-session',
  'protocol',
  'site-policy',
  'booking',
  'move',
  'size-reading',
  'size-request',
  'import',
  'plan',
  'sign-off',
  'outcome',
  'demonstration',
  'mail',
] as const;
export type AuditSubject = (typeof AUDIT_SUBJECTS)[number];

/** Written with a change, in its transaction: ids and field names, never values. */
export interface AuditEntry {
  readonly action: AuditAction;
  readonly subjectType: AuditSubject;
  readonly subjectId: string;
  /** Names of the fields that changed. */
  readonly fields?: readonly string[];
}

/** One line as it is read back. */
export interface AuditEvent {
  readonly id: string;
  readonly at: Date;
  readonly actorKind: Actor['kind'];
  readonly actorId: string;
  /** The person's or token's name today; null when it is not known any more. */
  readonly actorName: string | null;
  readonly action: string;
  readonly subjectType: string;
  readonly subjectId: string;
  readonly fields: readonly string[];
}
