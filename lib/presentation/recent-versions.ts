/** How many versions of a record its page lists; one more is read to say what the oldest shown changed. */
const SHOWN = 10;

/** Version numbers to read for a history ending at `newest`, newest first. */
export function recentVersions(newest: number): number[] {
  return Array.from({ length: Math.min(newest, SHOWN + 1) }, (_, index) => newest - index);
}

/** The rows to show: the extra one only served the comparison, unless it is the first version. */
export function trimHistory<T extends { readonly version: number }>(rows: readonly T[]): readonly T[] {
  return rows.length > SHOWN ? rows.slice(0, SHOWN) : rows;
}
