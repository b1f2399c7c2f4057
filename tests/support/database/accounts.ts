import type { SiteTransaction } from '@/db/client';
import type { UserActor } from '@/lib/domain/access';
import { argon2Hasher, type PasswordHasher } from '@/lib/services/session/password-hash';
import type { TestSite } from './test-site';

export const PASSWORD = 'seven looms by the harbour';

let hashed: Promise<string> | undefined;

/** Lets a test person sign in with PASSWORD; hashed once per worker, because hashing is slow on purpose. */
export async function givePassword(site: TestSite, userId: string): Promise<void> {
  hashed ??= argon2Hasher.hash(PASSWORD);
  const password_hash = await hashed;
  await changeAccount(site, userId, { password_hash });
}

/** A person who can sign in. */
export async function activePerson(site: TestSite, ...roles: UserActor['roles'][number][]): Promise<UserActor & { email: string }> {
  const person = await site.person(...roles);
  await givePassword(site, person.userId);
  return { ...person, email: `${person.userId}@people.example` };
}

export async function changeAccount(
  site: TestSite,
  userId: string,
  values: { password_hash?: string; disabled_at?: Date | null; session_epoch?: number; roles?: string[] },
): Promise<void> {
  await site.withApp((trx) =>
    trx.updateTable('app_user').set(values).where('site_id', '=', site.siteId).where('id', '=', userId).execute(),
  );
}

export async function readAccount(site: TestSite, userId: string) {
  return site.withApp((trx) =>
    trx
      .selectFrom('app_user')
      .selectAll()
      .where('site_id', '=', site.siteId)
      .where('id', '=', userId)
      .executeTakeFirstOrThrow(),
  );
}

export async function auditActions(site: TestSite, subjectId: string): Promise<string[]> {
  const rows = await site.withApp((trx: SiteTransaction) =>
    trx
      .selectFrom('audit_event')
      .select('action')
      .where('site_id', '=', site.siteId)
      .where('subject_id', '=', subjectId)
      .orderBy('at')
      .execute(),
  );
  return rows.map((row) => row.action);
}

/** The real hasher, counting what it is asked: equal work is counted, not timed. */
export function countingHasher(): PasswordHasher & { verifications: number; hashes: number } {
  return {
    verifications: 0,
    hashes: 0,
    hash(password) {
      this.hashes += 1;
      return argon2Hasher.hash(password);
    },
    verify(stored, password) {
      this.verifications += 1;
      return argon2Hasher.verify(stored, password);
    },
  };
}

/**
 * Refuses every password at once. The first block after five failures lasts a second: on a busy machine five real
 * hashes may take longer than that, and the sixth try would be let through rightly.
 */
export function refusingHasher(): PasswordHasher & { verifications: number } {
  return {
    verifications: 0,
    hash: argon2Hasher.hash,
    async verify() {
      this.verifications += 1;
      return false;
    },
  };
}

/** What a promise ends in, as one comparable text. */
export async function outcomeOf(promise: Promise<unknown>): Promise<string> {
  try {
    await promise;
    return 'done';
  } catch (error) {
    const { code, message, fields } = error as { code?: string; message: string; fields?: object };
    return [code, message, fields ? JSON.stringify(fields) : ''].filter(Boolean).join(' | ');
  }
}
