import Link from 'next/link';
import { Button, LinkButton } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { RESULT_FILTERS } from '@/lib/schemas/pre-check';
import { RESULT_WORDS } from '@/lib/presentation/pre-check-words';
import { tableHref, type TableSearch } from './table-query';

interface Choice {
  readonly value: string;
  readonly label: string;
}

/** Which bookings: a plain form, so that the choice is in the address; the results beside it with their counts. */
export function BookingFilter({ search, days, counts, scanners, protocols }: {
  search: TableSearch;
  days: { from: string; to: string };
  counts: Readonly<Record<string, number>>;
  scanners: readonly Choice[];
  protocols: readonly Choice[];
}) {
  const all = Object.values(counts).reduce((sum, count) => sum + count, 0);
  const chips = [{ id: undefined, label: 'All', count: all }, ...RESULT_FILTERS.map((id) => ({ id, label: RESULT_WORDS[id], count: counts[id] ?? 0 }))];
  const narrowed = Boolean(search.result ?? search.scanner ?? search.protocol ?? search.find);
  return (
    <div className="mb-4 space-y-4">
      <form
        method="get" action="/bookings" aria-label="Filter the bookings" autoComplete="off"
        className="grid grid-cols-2 items-end gap-x-3 gap-y-3 md:grid-cols-3 xl:grid-cols-[9.5rem_9.5rem_1fr_1fr_1fr_auto]"
      >
        <TextInput label="From" name="from" type="date" required key={`from ${days.from}`} defaultValue={days.from} figures />
        <TextInput label="To" name="to" type="date" required key={`to ${days.to}`} defaultValue={days.to} figures />
        <Select label="Scanner" name="scanner" key={`scanner ${search.scanner}`} defaultValue={search.scanner ?? ''} placeholder="Any scanner" options={scanners} />
        <Select label="Protocol" name="protocol" key={`protocol ${search.protocol}`} defaultValue={search.protocol ?? ''} placeholder="Any protocol" options={protocols} />
        <TextInput label="Accession contains" name="find" type="search" key={`find ${search.find}`} defaultValue={search.find ?? ''} figures spellCheck={false} />
        {search.result && <input type="hidden" name="result" value={search.result} />}
        {search.sort && <input type="hidden" name="sort" value={search.sort} />}
        <div className="flex gap-2">
          <Button type="submit">Show</Button>
          {narrowed && <LinkButton href={tableHref({}, { from: days.from, to: days.to })} variant="quiet">Show all</LinkButton>}
        </div>
      </form>
      <ul aria-label="Pre-check results" className="flex flex-wrap gap-2">
        {chips.map(({ id, label, count }) => {
          const current = search.result === id;
          return (
            <li key={label}>
              <Link
                href={tableHref(search, { result: id })}
                aria-current={current ? 'true' : undefined}
                className={cx(
                  'inline-flex min-h-8 items-center gap-2 rounded border px-3 text-sm no-underline',
                  current ? 'border-ink bg-ink text-paper' : 'border-line-strong bg-paper text-ink hover:bg-sunk',
                )}
              >
                {label} <span className="figures">{count}</span>
              </Link>
            </li>
          );
        })}
      </ul>
    </div>
  );
}
