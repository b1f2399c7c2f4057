/** Letters and digits that cannot be taken for one another when read aloud or copied by hand (no 0 O 1 I L U). */
export const SHORT_CODE_ALPHABET = '23456789ABCDEFGHJKMNPQRSTVWXYZ';
export const SHORT_CODE_LENGTH = 8;

/** A code from random bytes. 256 is no multiple of the alphabet; the bias (at most 1 in 8) harms no uniqueness. */
export function shortCodeFrom(bytes: Uint8Array): string {
  return Array.from(bytes.slice(0, SHORT_CODE_LENGTH), (byte) => SHORT_CODE_ALPHABET[byte % SHORT_CODE_ALPHABET.length]).join('');
}

/** As typed by hand: any case, spaces and dashes dropped; undefined when it cannot be a code. */
export function readShortCode(text: string): string | undefined {
  const code = text.replace(/[\s-]/g, '').toUpperCase();
  return code.length === SHORT_CODE_LENGTH && [...code].every((letter) => SHORT_CODE_ALPHABET.includes(letter)) ? code : undefined;
}
