'use client';

import { useState } from 'react';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useStatus } from '@/components/ui/status';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';
import { tableHref, type TableSearch } from './table-query';

interface ManyProposed {
  readonly proposed: number;
  readonly skipped: readonly { readonly accession: string; readonly reason: string }[];
}

export interface BulkDoers {
  readonly recheck: (ids: string[]) => Promise<ActionResult<{ waiting: number }>>;
  readonly propose: (ids: string[]) => Promise<ActionResult<ManyProposed>>;
}

const LOST: ErrorView = { code: 'unavailable', message: 'The server did not answer. Try again shortly; what was done already stays.' };
const bookings = (count: number) => `${count} ${count === 1 ? 'booking' : 'bookings'}`;

/** What can be done with the chosen bookings at once, and what came of it. */
export function BulkActions({ ids, search, may, doers, onDone }: {
  ids: string[];
  search: TableSearch;
  may: { check: boolean; propose: boolean; export: boolean };
  doers: BulkDoers;
  onDone: () => void;
}) {
  const { say } = useStatus();
  const [pending, setPending] = useState<'check' | 'propose' | null>(null);
  const [problem, setProblem] = useState<ErrorView | null>(null);
  const [skipped, setSkipped] = useState<ManyProposed['skipped']>([]);

  const run = async <T,>(which: 'check' | 'propose', work: () => Promise<ActionResult<T>>, done: (data: T) => void) => {
    setPending(which);
    setProblem(null);
    setSkipped([]);
    const result = await work().catch(() => ({ ok: false as const, error: LOST }));
    setPending(null);
    if (!result.ok) return setProblem(result.error);
    done(result.data);
    onDone();
  };
  const file = tableHref(search, {}, '/bookings/export');
  return (
    <div className="mb-3 space-y-3">
      <div className="flex flex-wrap items-center gap-2">
        <p className="mr-2 min-w-36 text-sm text-ink-soft" role="status">
          {ids.length === 0 ? 'None chosen' : `${bookings(ids.length)} chosen`}
        </p>
        {may.check && (
          <Button size="sm" disabled={ids.length === 0} pending={pending === 'check'} pendingLabel="Asking…"
            onClick={() => void run('check', () => doers.recheck(ids), ({ waiting }) => say(`${bookings(waiting)} will be checked again in the background.`))}>
            Check again
          </Button>
        )}
        {may.propose && (
          <Button size="sm" disabled={ids.length === 0} pending={pending === 'propose'} pendingLabel="Looking for places…"
            onClick={() => void run('propose', () => doers.propose(ids), (data) => {
              say(`${bookings(data.proposed)} proposed to move. The tasks are under Moves.`);
              setSkipped(data.skipped);
            })}>
            Propose the soonest place
          </Button>
        )}
        {may.export && (
          <LinkButton size="sm" prefetch={false} href={ids.length === 0 ? file : `${file}${file.includes('?') ? '&' : '?'}ids=${ids.join(',')}`}>
            {ids.length === 0 ? 'Download all as CSV' : 'Download chosen as CSV'}
          </LinkButton>
        )}
      </div>
      {problem && <Notice tone="error" live title={problem.message} />}
      {skipped.length > 0 && (
        <Notice live title={`No move was proposed for ${bookings(skipped.length)}`}>
          <ul className="list-disc pl-5">
            {skipped.map(({ accession, reason }) => <li key={accession}><span className="figures">{accession}</span>: {reason}</li>)}
          </ul>
        </Notice>
      )}
    </div>
  );
}
