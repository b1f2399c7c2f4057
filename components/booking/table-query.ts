import { BOOKING_SORTS, RESULT_FILTERS, type BookingSort, type BookingTableInput } from '@/lib/schemas/pre-check';
import { dayRange } from './requested-days';

export type TableSearch = Partial<Record<'from' | 'to' | 'result' | 'scanner' | 'protocol' | 'find' | 'sort' | 'after', string>>;

const ID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;

/** What the address asks for; what it says wrongly is left out, so that an old link still opens. */
export function tableQuery(address: TableSearch, now: Date): BookingTableInput & { from: string; to: string } {
  // A name that stands twice in an address comes as a list, whatever the type says.
  const search: TableSearch = Object.fromEntries(Object.entries(address).filter(([, text]) => typeof text === 'string'));
  const id = (text: string | undefined) => (text && ID.test(text) ? text : undefined);
  const result = RESULT_FILTERS.find((one) => one === search.result);
  const sort = BOOKING_SORTS.find((one) => one === search.sort?.replace(/^-/, ''));
  const find = search.find?.replace(/\p{Cc}/gu, '').trim().slice(0, 64);
  return {
    ...dayRange(search, now),
    ...(result ? { result } : {}),
    ...(id(search.scanner) ? { scanner: search.scanner } : {}),
    ...(id(search.protocol) ? { protocol: search.protocol } : {}),
    ...(find ? { find } : {}),
    ...(sort ? { sort, descending: search.sort!.startsWith('-') } : {}),
    ...(search.after ? { after: search.after } : {}),
  };
}

/** The address of the same table with something else asked for; a new question starts on its first page. */
export function tableHref(search: TableSearch, change: TableSearch, path = '/bookings'): string {
  const next = new URLSearchParams();
  for (const [name, value] of Object.entries({ ...search, after: undefined, ...change })) if (value) next.set(name, value);
  return next.size > 0 ? `${path}?${next}` : path;
}

/** The worst first where worse is more; time from early to late. */
export function nextSort(sort: BookingSort, now: string | undefined): string | undefined {
  const first = sort === 'time' ? 'time' : `-${sort}`;
  const second = sort === 'time' ? '-time' : sort;
  if (now === first || (sort === 'time' && !now)) return second;
  return now === second ? undefined : first;
}
