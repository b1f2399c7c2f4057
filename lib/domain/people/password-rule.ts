export const PASSWORD_MIN = 12;
/** Long enough for any phrase; short enough that hashing one is never a burden. */
export const PASSWORD_MAX = 200;

/** Openings and wholes that lists of broken passwords are full of. From memory; common practice. */
const WORN = ['password', 'passw0rd', 'qwerty', 'letmein', 'welcome', 'iloveyou', 'administrator', 'abc123', '123456', 'changeme'];

function isRun(text: string): boolean {
  const codes = [...text].map((c) => c.codePointAt(0) ?? 0);
  const steps = new Set(codes.slice(1).map((code, i) => code - (codes[i] ?? 0)));
  const only = [...steps][0];
  return steps.size === 1 && only !== undefined && Math.abs(only) <= 1;
}

/**
 * What is wrong with a new password, in words, or null. No rule about kinds of characters: length and not being
 * guessable are what count.
 * @param about words an attacker would try first: the e-mail address, the name, the product
 */
export function passwordFault(password: string, about: readonly string[] = []): string | null {
  const length = [...password].length;
  if (length < PASSWORD_MIN) return `${length} characters given; at least ${PASSWORD_MIN} are needed. A few words in a row do well.`;
  if (length > PASSWORD_MAX) return `${length} characters given; at most ${PASSWORD_MAX} are accepted.`;
  const plain = password.normalize('NFKC').toLowerCase();
  if (new Set(plain).size < 5 || isRun(plain)) return 'This is one pattern repeated; use at least five different characters, not in a row.';
  const rest = [...about.flatMap((words) => words.toLowerCase().split(/[\s@.]+/)), 'selvedge', ...WORN]
    .filter((word) => word.length >= 3)
    .sort((a, b) => b.length - a.length)
    .reduce((left, word) => left.replaceAll(word, ''), plain);
  if ([...rest.replace(/[\d\s\p{P}\p{S}]/gu, '')].length < 4) {
    return 'This is mostly your name, the product’s name or a well-known password; add words of your own.';
  }
  return null;
}
