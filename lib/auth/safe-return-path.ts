/** Pages that make no sense to return to: they would loop, or end the session that has just begun. */
const NEVER = [/^\/sign-in(\/|$)/, /^\/set-password(\/|$)/, /^\/api\//];

/**
 * Where to go after signing in: a path of our own, else the start page. Everything is decided on the URL as a
 * browser would read it, so `//host`, `/\host`, `https:host`, control characters and encoded tricks all end here.
 */
export function safeReturnPath(wanted: unknown, fallback = '/'): string {
  if (typeof wanted !== 'string' || wanted.length > 2048) return fallback;
  // Browsers drop tabs and line breaks and read a backslash as a slash: nothing of ours contains them.
  if (!wanted.startsWith('/') || /[\\\p{Cc}]/u.test(wanted)) return fallback;
  const base = 'http://own.invalid';
  let url: URL;
  try {
    url = new URL(wanted, base);
  } catch {
    return fallback;
  }
  if (url.origin !== base || url.pathname.startsWith('//')) return fallback;
  if (NEVER.some((path) => path.test(url.pathname))) return fallback;
  return `${url.pathname}${url.search}${url.hash}`;
}
