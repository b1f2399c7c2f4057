const PLAIN = /^[+-]?\d{1,9}(?:[.,]\d{1,9})?$/;
const THOUSANDS_POINT = /^[+-]?\d{1,3}(?:\.\d{3})+,\d{1,9}$/;
const THOUSANDS_COMMA = /^[+-]?\d{1,3}(?:,\d{3})+\.\d{1,9}$/;

/**
 * A number with a decimal point or a decimal comma; with both, the last one is decimal. "1,234" is read as one and a
 * bit: sizes never need a thousands sign, and a value read too small is caught by its allowed range.
 */
export function readNumber(text: string): number | undefined {
  const trimmed = text.trim().replace(/[\u00a0\u202f ]/g, '');
  if (PLAIN.test(trimmed)) return Number(trimmed.replace(',', '.'));
  if (THOUSANDS_POINT.test(trimmed)) return Number(trimmed.replaceAll('.', '').replace(',', '.'));
  if (THOUSANDS_COMMA.test(trimmed)) return Number(trimmed.replaceAll(',', ''));
  return undefined;
}
