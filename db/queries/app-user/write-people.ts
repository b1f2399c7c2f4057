import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { Role } from '@/lib/domain/access';

export async function insertPerson(
  trx: SiteTransaction,
  person: { siteId: string; email: string; displayName: string; roles: readonly Role[] },
): Promise<string> {
  const row = await trx
    .insertInto('app_user')
    .values({
      site_id: person.siteId,
      email: person.email,
      display_name: person.displayName,
      roles: [...person.roles],
    })
    .returning('id')
    .executeTakeFirstOrThrow();
  return row.id;
}

/** @returns whether the expected version was still the stored one */
export async function updatePerson(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  expectedVersion: number,
  change: { displayName: string; roles: readonly Role[] },
): Promise<boolean> {
  const result = await trx
    .updateTable('app_user')
    .set({ display_name: change.displayName, roles: [...change.roles], version: expectedVersion + 1 })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('version', '=', expectedVersion)
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

/** Disabling also ends every session; enabling does not bring any of them back. */
export async function setDisabled(trx: SiteTransaction, siteId: string, id: string, at: Date | null): Promise<void> {
  await trx
    .updateTable('app_user')
    .set({ disabled_at: at, session_epoch: sql`session_epoch + 1`, version: sql`version + 1` })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}

/** Every session that was begun before counts no more. @returns the epoch that sessions need from now on */
export async function endSessions(trx: SiteTransaction, siteId: string, id: string): Promise<number> {
  const row = await trx
    .updateTable('app_user')
    .set({ session_epoch: sql`session_epoch + 1` })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .returning('session_epoch')
    .executeTakeFirstOrThrow();
  return row.session_epoch;
}

export async function setPasswordHash(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  passwordHash: string,
): Promise<void> {
  await trx
    .updateTable('app_user')
    .set({ password_hash: passwordHash })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .execute();
}
