'use client';

import { useEffect, useState } from 'react';
import { Badge } from '@/components/ui/badge';
import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/choice';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import type { RowOutcome } from '@/lib/domain/import';
import type { LedgerPage } from './row-ledger';
import type { Counts } from './use-import';

const PAGE = 50;
const WORDS: Readonly<Record<RowOutcome, string>> = { created: 'New', changed: 'Changed', same: 'Same as booked', skipped: 'Left out' };

/** Row by row what the file will do. Rows that are left out show their line and why, not what stood in them. */
export function ComparedRows({
  counts, place, page,
}: {
  counts: Counts;
  /** What the number of a row counts. */
  place: 'Line' | 'Entry';
  page: (outcome: RowOutcome | 'all', from: number, size: number) => Promise<LedgerPage>;
}) {
  const [outcome, setOutcome] = useState<RowOutcome | 'all'>('all');
  const [from, setFrom] = useState(0);
  const [shown, setShown] = useState<LedgerPage | null>(null);
  useEffect(() => {
    let current = true;
    void page(outcome, from, PAGE).then((found) => current && setShown(found));
    return () => {
      current = false;
    };
    // The rows of one comparison do not change; `page` is made anew on every render.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [outcome, from]);
  const total = Object.values(counts).reduce((sum, count) => sum + count, 0);
  const choices = [
    { value: 'all' as const, label: `All ${total}` },
    ...(Object.keys(WORDS) as RowOutcome[]).map((value) => ({ value, label: `${WORDS[value]} ${counts[value]}` })),
  ];
  return (
    <div className="space-y-4">
      <Segmented
        legend="Rows"
        value={outcome}
        options={choices}
        onChange={(value) => {
          setOutcome(value);
          setFrom(0);
        }}
      />
      <Table caption="What the file will do, row by row">
        <thead>
          <tr>
            <Th className="text-right">{place}</Th>
            <Th>Accession number</Th>
            <Th>Outcome</Th>
            <Th>What, or why</Th>
          </tr>
        </thead>
        <tbody>
          {(shown?.rows ?? []).map((row) => (
            <Tr key={row.number}>
              <Td className="figures text-right">{row.number}</Td>
              <Td className="figures whitespace-nowrap">{row.accession === '' ? '–' : row.accession}</Td>
              <Td>
                <Badge edge={row.outcome === 'skipped' ? 'dashed' : row.outcome === 'same' ? 'dotted' : 'solid'}>{WORDS[row.outcome]}</Badge>
              </Td>
              <Td>{row.note}</Td>
            </Tr>
          ))}
        </tbody>
      </Table>
      {shown && shown.total > PAGE && (
        <div className="flex flex-wrap items-center gap-3">
          <Button size="sm" disabled={from === 0} onClick={() => setFrom(from - PAGE)}>
            Earlier rows
          </Button>
          <Button size="sm" disabled={from + PAGE >= shown.total} onClick={() => setFrom(from + PAGE)}>
            Later rows
          </Button>
          <span className="text-sm text-ink-soft">
            {from + 1} to {Math.min(from + PAGE, shown.total)} of {shown.total}
          </span>
        </div>
      )}
    </div>
  );
}
