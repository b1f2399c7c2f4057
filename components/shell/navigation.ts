import { type Actor, type Action, mayAttempt } from '@/lib/domain/access';

export interface NavigationItem {
  readonly href: string;
  readonly label: string;
}

interface Entry extends NavigationItem {
  /** Shown to those who may do this. Courtesy: each page's use-case is the lock. */
  readonly needs: Action;
}

const MAIN: readonly Entry[] = [
  { href: '/today', label: 'Today', needs: 'booking.read' },
  { href: '/bench', label: 'Bench', needs: 'check.run' },
  { href: '/bookings', label: 'Bookings', needs: 'booking.read' },
  { href: '/demonstrations', label: 'Demonstrations', needs: 'demonstration.edit' },
  { href: '/site', label: 'Site', needs: 'scanner.read' },
];

/** What a person sees in the header, from the one permission table. */
export function navigationFor(actor: Actor): NavigationItem[] {
  return MAIN.filter((entry) => mayAttempt(actor, entry.needs)).map(({ href, label }) => ({ href, label }));
}

/** Where work begins, first that is theirs: who sees no bookings teaches, and comes to the bench only to fetch a scene. */
const HOMES = ['/today', '/demonstrations', '/bench'] as const;

/** Where a person lands. */
export function homeFor(actor: Actor): string {
  const theirs = navigationFor(actor);
  return HOMES.find((home) => theirs.some(({ href }) => href === home)) ?? theirs[0]?.href ?? '/';
}

/** Whether a page belongs to an entry: itself or anything below it. */
export function isCurrent(href: string, path: string): boolean {
  return path === href || path.startsWith(`${href}/`);
}
