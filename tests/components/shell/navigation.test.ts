import { describe, expect, it } from 'vitest';
import { homeFor, isCurrent, navigationFor } from '@/components/shell/navigation';
import { parseTheme, THEMES } from '@/components/shell/theme';
import { ROLES, type Role, type UserActor } from '@/lib/domain/access';

const actor = (...roles: Role[]): UserActor => ({
  kind: 'user',
  siteId: 's',
  userId: 'u',
  displayName: 'R. Demo',
  roles,
});
const labels = (...roles: Role[]) => navigationFor(actor(...roles)).map(({ label }) => label);

describe('navigation per role', () => {
  it.each(['radiographer', 'coordinator', 'radiologist'] as const)('%s', (role) => {
    expect(labels(role)).toEqual(['Today', 'Bench', 'Bookings', 'Site']);
    expect(homeFor(actor(role))).toBe('/today');
  });

  it('a lead sees all of it', () => {
    expect(labels('lead')).toEqual(['Today', 'Bench', 'Bookings', 'Demonstrations', 'Site']);
    expect(homeFor(actor('lead'))).toBe('/today');
  });

  it('an educator sees no bookings and lands on demonstrations', () => {
    expect(labels('educator')).toEqual(['Bench', 'Demonstrations', 'Site']);
    expect(homeFor(actor('educator'))).toBe('/demonstrations');
  });

  it('several roles see the union, and none at all sees nothing', () => {
    expect(labels('educator', 'radiographer')).toEqual(labels('lead'));
    expect(labels(...ROLES)).toEqual(labels('lead'));
    expect(labels()).toEqual([]);
    expect(homeFor(actor())).toBe('/');
  });
});

it('an entry is current on its own page and below it, not beside it', () => {
  expect(isCurrent('/site', '/site')).toBe(true);
  expect(isCurrent('/site', '/site/scanners')).toBe(true);
  expect(isCurrent('/site', '/sites')).toBe(false);
});

it('a theme cookie is one of ours or follows the system', () => {
  for (const theme of THEMES) expect(parseTheme(theme)).toBe(theme);
  for (const other of [undefined, '', 'DAY', 'dark', '"><script>']) expect(parseTheme(other)).toBe('system');
});
