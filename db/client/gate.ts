import { sql } from 'kysely';
import { type Database, database } from './pool';

/** The doors that work before a site is known (schema `gate`). Everything else goes through inTransaction. */

export interface SignInMatch {
  readonly siteId: string;
  readonly userId: string;
  /** Null for an invited person who has set no password yet. */
  readonly passwordHash: string | null;
}

/** The enabled account of an address, whichever site it belongs to. */
export async function resolveSignIn(email: string, db: Database = database()): Promise<SignInMatch | null> {
  const { rows } = await sql<{ site_id: string; user_id: string; password_hash: string | null }>`
    select site_id, user_id, password_hash from gate.resolve_sign_in(${email})`.execute(db);
  const row = rows[0];
  return row ? { siteId: row.site_id, userId: row.user_id, passwordHash: row.password_hash } : null;
}

export type TokenKind = 'api' | 'set-password' | 'size-request' | 'demonstration-share';

export interface TokenMatch {
  readonly siteId: string;
  readonly id: string;
  readonly expiresAt: Date;
}

/** A token that is neither used, revoked nor expired, by the hash of its secret. */
export async function resolveToken(
  kind: TokenKind,
  hash: string,
  db: Database = database(),
): Promise<TokenMatch | null> {
  const { rows } = await sql<{ site_id: string; id: string; expires_at: Date }>`
    select site_id, id, expires_at from gate.resolve_token(${kind}, ${hash})`.execute(db);
  const row = rows[0];
  return row ? { siteId: row.site_id, id: row.id, expiresAt: row.expires_at } : null;
}

export interface DueWork {
  readonly siteId: string;
  readonly id: string;
}

/** Work that a sweep finds when its wake-up call was lost: mail to send, plan sheets and hand-outs to make, bookings to check. */
export async function dueWork(kind: 'mail' | 'plan-sheet' | 'hand-out' | 'pre-check' | 'size-request-expiry', atMost: number, db: Database = database()): Promise<DueWork[]> {
  const { rows } = await sql<{ site_id: string; id: string }>`
    select site_id, id from gate.due_work(${kind}, ${atMost})`.execute(db);
  return rows.map((row) => ({ siteId: row.site_id, id: row.id }));
}

/**
 * Counts one try for a key (a hash of the address or of the network origin) before the password is looked at.
 * @returns until when this key is blocked, or null when the try may go on
 */
export async function beginSignIn(keyHash: string, db: Database = database()): Promise<Date | null> {
  const { rows } = await sql<{ blocked_until: Date | null }>`
    select gate.begin_sign_in(${keyHash}) as blocked_until`.execute(db);
  return rows[0]?.blocked_until ?? null;
}

/** Forgets the tries of a key after a sign-in that succeeded. */
export async function forgiveSignIn(keyHash: string, db: Database = database()): Promise<void> {
  await sql`select gate.forgive_sign_in(${keyHash})`.execute(db);
}
