import type { Role } from '@/lib/domain/access';

/** Invited: no password yet. */
export type PersonStatus = 'invited' | 'active' | 'disabled';

export interface Person {
  readonly siteId: string;
  readonly id: string;
  readonly email: string;
  readonly displayName: string;
  readonly roles: readonly Role[];
  readonly status: PersonStatus;
  readonly createdAt: Date;
  readonly version: number;
}

/** What a session is checked against on every request. */
export interface SessionAccount {
  readonly siteId: string;
  readonly userId: string;
  readonly email: string;
  readonly displayName: string;
  readonly roles: readonly Role[];
  readonly sessionEpoch: number;
  readonly passwordHash: string | null;
  readonly disabled: boolean;
}

/** One spelling per address, as the database compares it. */
export function normaliseEmail(email: string): string {
  return email.trim().normalize('NFKC').toLowerCase();
}
