import { describe, expect, it } from 'vitest';
import { dayRange } from '@/components/booking/requested-days';
import { tableQuery, type TableSearch } from '@/components/booking/table-query';

const NOW = new Date('2026-05-04T09:00:00');
const DEFAULT = { from: '2026-05-03', to: '2026-05-18' };

describe('an address that asks for bookings', () => {
  it.each<[string, unknown]>([
    ['a name that stands twice', { find: ['a', 'b'], sort: ['time', '-time'], result: ['escalate', 'escalate'] }],
    ['nothing but control characters', { find: '\u0000\u0007' }],
    ['days of no booking’s year', { from: '0000-01-01', to: '9999-12-31' }],
    ['days that are none', { from: '2026-99-99', to: 'x' }],
    ['ids that are none', { scanner: 'abc', protocol: '\u0000' }],
  ])('is shown as if it did not say %s', (_, search) => {
    expect(tableQuery(search as TableSearch, NOW)).toEqual(DEFAULT);
  });

  it('is shown as it says', () => {
    const search = { from: '2000-01-01', to: '2199-12-31', find: ' HB-2\t1 ', sort: '-over', result: 'escalate' };
    expect(tableQuery(search, NOW)).toEqual({ from: '2000-01-01', to: '2199-12-31', find: 'HB-21', sort: 'over', descending: true, result: 'escalate' });
    expect(dayRange({ from: '2026-06-02', to: '2026-06-01' }, NOW)).toEqual({ from: '2026-06-01', to: '2026-06-02' });
  });
});
