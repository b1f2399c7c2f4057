'use client';

import {
  columnFilteringFeature,
  createFilteredRowModel,
  createSortedRowModel,
  filterFn_includesString,
  globalFilteringFeature,
  rowSortingFeature,
  sortFn_alphanumeric,
  sortFn_text,
  tableFeatures,
  useTable,
  type ColumnDef,
  type SortingState,
} from '@tanstack/react-table';
import { usePathname, useSearchParams } from 'next/navigation';
import { useMemo, type ReactNode } from 'react';
import { ArrowDownIcon, ArrowUpIcon } from './icons';
import { Table, Td, Th, Tr } from './table';
import { TextInput } from './text-input';

const features = tableFeatures({
  rowSortingFeature,
  columnFilteringFeature,
  globalFilteringFeature,
  sortedRowModel: createSortedRowModel(),
  filteredRowModel: createFilteredRowModel(),
  sortFns: { alphanumeric: sortFn_alphanumeric, text: sortFn_text },
  filterFns: { includesString: filterFn_includesString },
});

export interface DataColumn<T> {
  readonly id: string;
  readonly header: string;
  /** What is sorted and searched by. */
  readonly value: (row: T) => string | number;
  readonly cell: (row: T) => ReactNode;
}

/** "?sort=when" ascending, "?sort=-when" descending. */
export function parseSort(text: string | null, ids: readonly string[]): SortingState {
  if (!text) return [];
  const desc = text.startsWith('-');
  const id = desc ? text.slice(1) : text;
  return ids.includes(id) ? [{ id, desc }] : [];
}

/** A dense table whose order and search live in the address, so that a reload or a sent link shows the same. */
export function DataTable<T extends object>({
  caption,
  columns,
  rows,
  empty,
  searchLabel,
  aside,
}: {
  caption: string;
  columns: readonly DataColumn<T>[];
  rows: readonly T[];
  /** Said when the search leaves nothing. */
  empty: string;
  searchLabel: string;
  aside?: ReactNode;
}) {
  const path = usePathname();
  const params = useSearchParams();
  const sorting = parseSort(
    params.get('sort'),
    columns.map((column) => column.id),
  );
  const search = params.get('find') ?? '';

  const setParam = (name: string, value: string) => {
    const next = new URLSearchParams(window.location.search);
    if (value) next.set(name, value);
    else next.delete(name);
    // The rows are here already: the address follows without asking the server again.
    window.history.replaceState(null, '', next.size > 0 ? `${path}?${next}` : path);
  };

  // New column objects would make the table start over on every render.
  const definitions = useMemo(
    () =>
      columns.map((column): ColumnDef<typeof features, T> => ({
        id: column.id,
        accessorFn: column.value,
        header: column.header,
        cell: ({ row }) => column.cell(row.original),
      })),
    [columns],
  );
  const table = useTable({
    features,
    data: rows as T[],
    columns: definitions,
    state: { sorting, globalFilter: search },
    globalFilterFn: 'includesString',
  });
  const shown = table.getRowModel().rows;

  return (
    <div>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-3">
        <TextInput
          className="w-full sm:w-72"
          type="search"
          label={searchLabel}
          defaultValue={search}
          onChange={(event) => setParam('find', event.target.value.trim())}
        />
        {aside}
      </div>
      <Table caption={caption}>
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const now = sorting.find((sort) => sort.id === header.column.id);
                return (
                  <Th key={header.id} aria-sort={now ? (now.desc ? 'descending' : 'ascending') : undefined}>
                    <button
                      type="button"
                      className="-mx-1 inline-flex min-h-6 items-center gap-1 rounded px-1 hover:text-ink"
                      onClick={() =>
                        setParam('sort', now ? (now.desc ? '' : `-${header.column.id}`) : header.column.id)
                      }
                    >
                      {String(header.column.columnDef.header)}
                      {now &&
                        (now.desc ? (
                          <ArrowDownIcon className="size-3" />
                        ) : (
                          <ArrowUpIcon className="size-3" />
                        ))}
                    </button>
                  </Th>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody>
          {shown.map((row) => (
            <Tr key={row.id}>
              {row.getAllCells().map((cell) => (
                <Td key={cell.id}>
                  <table.FlexRender cell={cell} />
                </Td>
              ))}
            </Tr>
          ))}
          {shown.length === 0 && (
            <tr>
              <Td colSpan={columns.length} className="py-8 text-center text-ink-soft">
                {empty}
              </Td>
            </tr>
          )}
        </tbody>
      </Table>
      <p role="status" className="mt-2 text-sm text-ink-soft">
        {shown.length === rows.length ? `${rows.length} shown` : `${shown.length} of ${rows.length} shown`}
      </p>
    </div>
  );
}
