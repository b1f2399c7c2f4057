import { hash, verify } from '@node-rs/argon2';

/** What services need of a password hash; tests count the calls. */
export interface PasswordHasher {
  hash(password: string): Promise<string>;
  /** False, never a throw, for a stored text that is no hash. */
  verify(storedHash: string, password: string): Promise<boolean>;
}

/** Argon2id (the package’s default) with 19 MiB, two passes, one lane: OWASP Password Storage Cheat Sheet, first recommended setting (from memory). */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** The same password typed on another keyboard may arrive in another Unicode form. */
const asTyped = (password: string) => password.normalize('NFKC');

export const argon2Hasher: PasswordHasher = {
  hash: (password) => hash(asTyped(password), COST),
  async verify(storedHash, password) {
    try {
      return await verify(storedHash, asTyped(password));
    } catch {
      return false;
    }
  },
};

/**
 * A hash at the same cost that no password matches (its salt and output are fixed bytes). Verified against when there
 * is no account, so that the answer takes as long as a wrong password does.
 */
export const UNMATCHABLE_HASH =
  '$argon2id$v=19$m=19456,t=2,p=1$c2VsdmVkZ2UtZHVtbXktMQ$AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA';
