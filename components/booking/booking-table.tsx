'use client';

import { rowSelectionFeature, rowSortingFeature, tableFeatures, useTable, type ColumnDef, type RowSelectionState } from '@tanstack/react-table';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useMemo, useRef, useState, type KeyboardEvent } from 'react';
import { Checkbox } from '@/components/ui/choice';
import { ArrowDownIcon, ArrowUpIcon } from '@/components/ui/icons';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { BOOKING_COLUMNS } from './booking-columns';
import type { BookingRow } from './booking-row';
import { BulkActions, type BulkDoers } from './bulk-actions';
import { nextSort, tableHref, type TableSearch } from './table-query';

const features = tableFeatures({ rowSortingFeature, rowSelectionFeature });

/**
 * One page of bookings as the database filtered and ordered them. Rows are walked with the arrow keys, Home and End,
 * chosen with Space and opened with Enter; each header is a link, so the order is in the address.
 */
export function BookingTable({ rows, search, may, doers }: {
  rows: readonly BookingRow[];
  search: TableSearch;
  may: { check: boolean; propose: boolean; export: boolean };
  doers: BulkDoers;
}) {
  const router = useRouter();
  const [chosen, setChosen] = useState<RowSelectionState>({});
  const [at, setAt] = useState(0);
  const body = useRef<HTMLTableSectionElement>(null);
  const columns = useMemo(
    () => BOOKING_COLUMNS.map((column): ColumnDef<typeof features, BookingRow> => ({
      id: column.id, header: column.header, cell: ({ row }) => column.cell(row.original),
    })),
    [],
  );
  const table = useTable({
    features, columns, data: rows as BookingRow[],
    manualSorting: true,
    getRowId: (row) => row.id,
    state: { rowSelection: chosen, sorting: [] },
    onRowSelectionChange: setChosen,
  });
  const shown = table.getRowModel().rows;
  // A choice made on another page does not act on rows nobody sees.
  const ids = shown.filter((row) => row.getIsSelected()).map(({ id }) => id);

  const onKeyDown = (event: KeyboardEvent<HTMLTableRowElement>, index: number) => {
    if (event.target !== event.currentTarget) return;
    const to = { ArrowDown: index + 1, ArrowUp: index - 1, Home: 0, End: shown.length - 1 }[event.key];
    if (to !== undefined) {
      event.preventDefault();
      const next = Math.max(0, Math.min(shown.length - 1, to));
      setAt(next);
      body.current?.querySelectorAll<HTMLElement>('tr')[next]?.focus();
    } else if (event.key === ' ') {
      event.preventDefault();
      shown[index]?.toggleSelected();
    } else if (event.key === 'Enter') {
      router.push(`/bookings/${shown[index]?.id}`);
    }
  };

  return (
    <div>
      <BulkActions ids={ids} search={search} may={may} doers={doers} onDone={() => { setChosen({}); router.refresh(); }} />
      <Table caption="Bookings">
        <thead>
          <tr>
            <Th className="w-12">
              <Checkbox
                label={<span className="sr-only">Choose all on this page</span>}
                checked={shown.length > 0 && ids.length === shown.length}
                onChange={(event) => table.toggleAllRowsSelected(event.target.checked)}
              />
            </Th>
            {BOOKING_COLUMNS.map(({ id, header, sort }) => {
              const now = sort && (search.sort ?? 'time').replace(/^-/, '') === sort ? (search.sort?.startsWith('-') ? 'descending' : 'ascending') : undefined;
              return (
                <Th key={id} aria-sort={now}>
                  {sort ? (
                    <Link href={tableHref(search, { sort: nextSort(sort, search.sort) })} scroll={false} className="-mx-1 inline-flex min-h-6 items-center gap-1 rounded px-1 hover:text-ink">
                      {header}
                      {now && (now === 'descending' ? <ArrowDownIcon className="size-3" /> : <ArrowUpIcon className="size-3" />)}
                    </Link>
                  ) : header}
                </Th>
              );
            })}
          </tr>
        </thead>
        <tbody ref={body}>
          {shown.map((row, index) => (
            <Tr
              key={row.id}
              tabIndex={index === Math.min(at, shown.length - 1) ? 0 : -1}
              aria-selected={row.getIsSelected()}
              onFocus={() => setAt(index)}
              onKeyDown={(event) => onKeyDown(event, index)}
              className="align-top -outline-offset-2 aria-selected:bg-wash"
            >
              <Td>
                <Checkbox
                  label={<span className="sr-only">Choose {row.original.accession}</span>}
                  checked={row.getIsSelected()}
                  onChange={(event) => row.toggleSelected(event.target.checked)}
                />
              </Td>
              {row.getAllCells().map((cell) => (
                <Td key={cell.id}><table.FlexRender cell={cell} /></Td>
              ))}
            </Tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}
