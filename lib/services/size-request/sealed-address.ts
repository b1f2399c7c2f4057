import { environment } from '@/lib/env';
import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';

/** A key of its own, made from the server's secret: who reads the database alone reads no address. */
function key(): Buffer {
  return Buffer.from(hkdfSync('sha256', environment().sessionSecret, '', 'size-request address', 32));
}

/** AES-256-GCM, bound to the request it belongs to: copied to another row it opens no more. */
export function sealAddress(requestId: string, address: string): string {
  const nonce = randomBytes(12);
  const cipher = createCipheriv('aes-256-gcm', key(), nonce).setAAD(Buffer.from(requestId));
  return Buffer.concat([nonce, cipher.update(address, 'utf8'), cipher.final(), cipher.getAuthTag()]).toString('base64url');
}

/** The address, or null where there is none, or the secret it was sealed under is replaced. */
export function openAddress(requestId: string, sealed: string): string | null {
  if (sealed === '') return null;
  try {
    const bytes = Buffer.from(sealed, 'base64url');
    const decipher = createDecipheriv('aes-256-gcm', key(), bytes.subarray(0, 12)).setAAD(Buffer.from(requestId)).setAuthTag(bytes.subarray(-16));
    return Buffer.concat([decipher.update(bytes.subarray(12, -16)), decipher.final()]).toString('utf8');
  } catch {
    return null;
  }
}
