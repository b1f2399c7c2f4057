'use client';

import { useQuery } from '@tanstack/react-query';
import type { NewestVersionView } from '@/lib/schemas/plan';
import type { PlanIdentity } from './plan-identity';

/** Between two looks while the page is in sight; coming back to it looks at once. */
const LOOK_EVERY_MS = 20_000;

export type NewestVersion = NonNullable<NewestVersionView['newest']>;

async function lookUp(bookingId: string, signal: AbortSignal): Promise<NewestVersion | null> {
  const response = await fetch(`/api/v1/bookings/${bookingId}/newest-version`, { signal, headers: { accept: 'application/json' } });
  if (!response.ok) throw new Error(`The server answered ${response.status}.`);
  return ((await response.json()) as NewestVersionView).newest;
}

/**
 * The newest version there is of the booking's plan. What cannot be reached is asked for again later and told nowhere:
 * saving meets whatever is stored in any case.
 */
export function useNewestVersion(bookingId: string | null): NewestVersion | null {
  const { data } = useQuery({
    queryKey: ['newest-version', bookingId],
    queryFn: ({ signal }) => lookUp(bookingId!, signal),
    enabled: bookingId !== null,
    refetchInterval: LOOK_EVERY_MS,
    refetchOnWindowFocus: 'always',
    retry: false,
  });
  return data ?? null;
}

/** Somebody else's version, or one's own from another tab, that this bench does not rest on. A used plan is history, not news. */
export function isNews(newest: NewestVersion | null, { planId, version }: PlanIdentity): newest is NewestVersion {
  if (!newest || newest.state === 'used') return false;
  return newest.planId === planId ? newest.version > version : version === 0;
}
