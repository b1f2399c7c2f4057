/**
 * Reads a number as people type it: decimal comma or point, spaces between groups of thousands, a minus from a
 * word processor, and the field's own unit left on the end.
 * @returns the number, null for nothing typed, NaN for what is not one number.
 */
export function parseNumber(text: string, unit?: string): number | null {
  let plain = text.trim().replace(/[\u2212\u2013]/g, '-');
  if (unit && plain.toLowerCase().endsWith(unit.toLowerCase())) plain = plain.slice(0, -unit.length).trim();
  if (plain === '') return null;
  plain = plain.replace(/(\d)[\u0020\u00a0\u2009\u202f](?=\d{3}(\D|$))/g, '$1');
  // A comma and a point together could be read two ways; a person is asked instead.
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/.test(plain)) return Number.NaN;
  return Number(plain.replace(',', '.'));
}

/** Plain form for a text field: at most six decimals, no grouping, no exponent. */
export function formatPlain(value: number | null | undefined): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return '';
  const rounded = Math.round(value * 1e6) / 1e6;
  if (Object.is(rounded, -0)) return '0';
  const text = rounded.toString();
  return text.includes('e') ? rounded.toFixed(6).replace(/\.?0+$/, '') : text;
}

/** One step of an arrow key, held inside the limits and free of binary dust. */
export function stepNumber(value: number | null, by: number, min?: number, max?: number): number {
  const from = value === null || Number.isNaN(value) ? (min ?? 0) : value + by;
  const held = Math.min(max ?? Number.POSITIVE_INFINITY, Math.max(min ?? Number.NEGATIVE_INFINITY, from));
  return Math.round(held * 1e6) / 1e6;
}

/** What was given and what is allowed; undefined when the number is acceptable. */
export function numberProblem(
  text: string,
  value: number | null,
  limits: { min?: number; max?: number; whole?: boolean; unit?: string; optional?: boolean },
): string | undefined {
  const unit = limits.unit ? ` ${limits.unit}` : '';
  const allowed =
    limits.min !== undefined && limits.max !== undefined
      ? `${formatPlain(limits.min)} to ${formatPlain(limits.max)}${unit}`
      : limits.min !== undefined
        ? `${formatPlain(limits.min)}${unit} or more`
        : limits.max !== undefined
          ? `${formatPlain(limits.max)}${unit} or less`
          : 'any number';
  if (value === null) return limits.optional ? undefined : `nothing given; allowed: ${allowed}`;
  if (Number.isNaN(value)) return `“${text.trim()}” is not a number; allowed: ${allowed}`;
  if (limits.whole && !Number.isInteger(value))
    return `${text.trim()} is not a whole number; allowed: ${allowed}`;
  if (limits.min !== undefined && value < limits.min)
    return `${text.trim()} is too small; allowed: ${allowed}`;
  if (limits.max !== undefined && value > limits.max)
    return `${text.trim()} is too large; allowed: ${allowed}`;
  return undefined;
}
