import { cookies } from 'next/headers';
import { parseTheme, THEME_COOKIE, type Theme } from './theme';

/** The theme this browser asked for, on the server. */
export async function currentTheme(): Promise<Theme> {
  return parseTheme((await cookies()).get(THEME_COOKIE)?.value);
}
