import { createHash, randomBytes } from 'node:crypto';

/** 256 random bits, as they are shown or mailed; only `hash` is stored. */
export function makeSecretToken(prefix = ''): { readonly secret: string; readonly hash: string } {
  const secret = `${prefix}${randomBytes(32).toString('base64url')}`;
  return { secret, hash: hashSecretToken(secret) };
}

/** No salt and no stretching: a secret of 256 random bits cannot be guessed from its hash. */
export function hashSecretToken(secret: string): string {
  return createHash('sha256').update(secret, 'utf8').digest('hex');
}
