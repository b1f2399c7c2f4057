/**
 * A site describes its accession numbers by a mask: `#` one digit, `@` one letter, `?` a letter or digit,
 * `*` any run of letters, digits, dots, slashes and dashes; everything else stands for itself: `HB-####`.
 * A mask and not a regular expression: it cannot be written so that matching never ends.
 */
export const ACCESSION_MASK_MAX = 64;

const CLASSES: Readonly<Record<string, string>> = {
  '#': '[0-9]', '@': '[A-Za-z]', '?': '[A-Za-z0-9]', '*': '[A-Za-z0-9./-]*',
};

/** What is wrong with a mask; undefined when it can be used. */
export function maskRefusal(mask: string): string | undefined {
  if (mask.length < 1 || mask.length > ACCESSION_MASK_MAX) return `${mask.length} characters given; allowed: 1 to ${ACCESSION_MASK_MAX}`;
  // Each further run multiplies the work of a mismatch.
  if ((mask.match(/\*/g) ?? []).length > 2) return 'more than two * given; allowed: up to two';
  if (/[^\x21-\x7e]/.test(mask)) return 'a character outside printable ASCII given; allowed: letters, digits and signs, no spaces';
  return undefined;
}

function matchesMask(text: string, mask: string): boolean {
  const source = [...mask].map((char) => CLASSES[char] ?? char.replace(/[\\^$.*+?()[\]{}|/-]/g, '\\$&')).join('');
  return new RegExp(`^${source}$`).test(text);
}

function isDay(year: number, month: number, day: number): boolean {
  const date = new Date(Date.UTC(year, month - 1, day));
  return year >= 1900 && year < 2100 && date.getUTCMonth() === month - 1 && date.getUTCDate() === day;
}

/** Eight digits that spell a day in any of the usual orders. */
function spellsDay(digits: string): boolean {
  const at = (from: number, to: number) => Number(digits.slice(from, to));
  return (
    isDay(at(0, 4), at(4, 6), at(6, 8)) || isDay(at(4, 8), at(2, 4), at(0, 2)) || isDay(at(4, 8), at(0, 2), at(2, 4))
  );
}

function looksLikeDate(text: string): boolean {
  if (/(^|\D)(\d{4}[./-]\d{1,2}[./-]\d{1,2}|\d{1,2}[./-]\d{1,2}[./-](\d{4}|\d{2}))(\D|$)/.test(text)) return true;
  return (text.match(/\d+/g) ?? []).some((run) => run.length === 8 && spellsDay(run));
}

/** Letters that the mask does not spell out, four or more together, or no digit at all. */
function looksLikeName(text: string, mask: string): boolean {
  if (!/\d/.test(text) || /[\s,^]/.test(text)) return true;
  const runs = text.match(/\p{L}{4,}/gu) ?? [];
  return runs.some((run) => !mask.toLowerCase().includes(run.toLowerCase()));
}

/**
 * Why a text may not be stored as an accession number; undefined when it may. The text itself is not repeated where
 * it looks like a name or a date: the message may be logged or read over a shoulder.
 */
export function accessionRefusal(text: string, mask: string): string | undefined {
  if (text.length < 1 || text.length > 64) return `${text.length} characters given; allowed: 1 to 64`;
  if (looksLikeName(text, mask)) return `This looks like a name. Allowed: the accession number exactly as the worklist shows it, in the form ${mask}`;
  if (looksLikeDate(text)) return `This looks like a date. Allowed: the accession number exactly as the worklist shows it, in the form ${mask}`;
  if (!matchesMask(text, mask)) return `“${text}” given; allowed: the form ${mask} (# digit, @ letter, ? either, * any)`;
  return undefined;
}
