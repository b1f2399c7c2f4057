import { isRole } from '@/lib/domain/access';
import type { Person, SessionAccount } from '@/lib/domain/people';
import type { Row } from '@/db/types';

/** Everything but the secrets. */
export const PERSON_COLUMNS = [
  'site_id',
  'id',
  'email',
  'display_name',
  'roles',
  'disabled_at',
  'created_at',
  'version',
] as const;

type PersonRow = Pick<Row<'app_user'>, (typeof PERSON_COLUMNS)[number]> & { readonly has_password: boolean };

export function toPerson(row: PersonRow): Person {
  return {
    siteId: row.site_id,
    id: row.id,
    email: row.email,
    displayName: row.display_name,
    roles: row.roles.filter(isRole),
    status: row.disabled_at ? 'disabled' : row.has_password ? 'active' : 'invited',
    createdAt: row.created_at,
    version: row.version,
  };
}

type AccountRow = Pick<
  Row<'app_user'>,
  'site_id' | 'id' | 'email' | 'display_name' | 'roles' | 'session_epoch' | 'password_hash' | 'disabled_at'
>;

export function toSessionAccount(row: AccountRow): SessionAccount {
  return {
    siteId: row.site_id,
    userId: row.id,
    email: row.email,
    displayName: row.display_name,
    roles: row.roles.filter(isRole),
    sessionEpoch: row.session_epoch,
    passwordHash: row.password_hash,
    disabled: row.disabled_at !== null,
  };
}
