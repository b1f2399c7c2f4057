import { type ExpressionBuilder, sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import type { DB } from '@/db/types';
import type { Person, SessionAccount } from '@/lib/domain/people';
import { PERSON_COLUMNS, toPerson, toSessionAccount } from './map-person';

const hasPassword = (eb: ExpressionBuilder<DB, 'app_user'>) => eb('password_hash', 'is not', null).$castTo<boolean>().as('has_password');

export async function listPeople(trx: SiteTransaction, siteId: string): Promise<Person[]> {
  const rows = await trx
    .selectFrom('app_user')
    .select(PERSON_COLUMNS)
    .select(hasPassword)
    .where('site_id', '=', siteId)
    .orderBy('display_name')
    .orderBy('id')
    .execute();
  return rows.map(toPerson);
}

/** The person, locked until the transaction ends when they are about to be changed. */
export async function findPerson(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  options: { lock?: boolean } = {},
): Promise<Person | null> {
  const row = await trx
    .selectFrom('app_user')
    .select(PERSON_COLUMNS)
    .select(hasPassword)
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .$if(options.lock === true, (query) => query.forUpdate())
    .executeTakeFirst();
  return row ? toPerson(row) : null;
}

export async function findPersonByEmail(trx: SiteTransaction, siteId: string, email: string): Promise<Person | null> {
  const row = await trx
    .selectFrom('app_user')
    .select(PERSON_COLUMNS)
    .select(hasPassword)
    .where('site_id', '=', siteId)
    .where(sql`gate.normalise_email(email)`, '=', sql`gate.normalise_email(${email})`)
    .executeTakeFirst();
  return row ? toPerson(row) : null;
}

export async function findSessionAccount(
  trx: SiteTransaction,
  siteId: string,
  userId: string,
): Promise<SessionAccount | null> {
  const row = await trx
    .selectFrom('app_user')
    .select(['site_id', 'id', 'email', 'display_name', 'roles', 'session_epoch', 'password_hash', 'disabled_at'])
    .where('site_id', '=', siteId)
    .where('id', '=', userId)
    .executeTakeFirst();
  return row ? toSessionAccount(row) : null;
}

/**
 * Leads who can sign in, locked in a fixed order: two leads who remove each other at the same moment wait for
 * one another, and the second sees what the first has done.
 */
export async function lockWorkingLeads(trx: SiteTransaction, siteId: string): Promise<string[]> {
  const rows = await trx
    .selectFrom('app_user')
    .select('id')
    .where('site_id', '=', siteId)
    .where(sql<boolean>`'lead' = any(roles)`)
    .where('disabled_at', 'is', null)
    .where('password_hash', 'is not', null)
    .orderBy('id')
    .forUpdate()
    .execute();
  return rows.map((row) => row.id);
}
