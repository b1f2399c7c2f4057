type Plain = Record<string, unknown>;

function isPlain(value: unknown): value is Plain {
  return value !== null && typeof value === 'object' && !Array.isArray(value);
}

/** Equal in content; a key that holds undefined is the same as no key. */
export function sameForm(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (Array.isArray(a) && Array.isArray(b))
    return a.length === b.length && a.every((each, i) => sameForm(each, b[i]));
  if (!isPlain(a) || !isPlain(b)) return false;
  return [...new Set([...Object.keys(a), ...Object.keys(b)])].every((key) => sameForm(a[key], b[key]));
}

const keysOf = (value: Plain): string =>
  Object.keys(value)
    .filter((key) => value[key] !== undefined)
    .sort()
    .join();

/**
 * Two people's changes to one form, put together: what only one of them changed is taken from that one; where both
 * did, mine stands. Lists of another length and alternatives of another kind are taken whole.
 */
export function mergeForms<T>(base: T, theirs: T, mine: T): T {
  if (sameForm(mine, base)) return theirs;
  if (sameForm(theirs, base)) return mine;
  if (isPlain(base) && isPlain(theirs) && isPlain(mine)) {
    const alike = keysOf(base) === keysOf(theirs) && keysOf(base) === keysOf(mine);
    if (alike) {
      return Object.fromEntries(
        Object.keys(base).map((key) => [key, mergeForms(base[key], theirs[key], mine[key])]),
      ) as T;
    }
  }
  if (Array.isArray(base) && Array.isArray(theirs) && Array.isArray(mine)) {
    const alike = base.length === theirs.length && base.length === mine.length;
    if (alike) return base.map((each, index) => mergeForms<unknown>(each, theirs[index], mine[index])) as T;
  }
  return mine;
}
