'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionButton } from '@/components/ui/action-button';
import { Button } from '@/components/ui/button';
import { CopyOnce } from '@/components/ui/copy-once';
import { FormProblem } from '@/components/ui/form-problem';
import { Notice } from '@/components/ui/notice';
import { Select } from '@/components/ui/select';
import type { ErrorView } from '@/lib/domain/errors';
import { formatDate } from '@/lib/presentation/moment';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { ShareLine } from '@/lib/schemas/demonstration';

export interface ShareActions {
  readonly createShare: (input: { id: string; days: number }) => Promise<ActionResult<{ address: string; expiresAt: string }>>;
  readonly revokeShare: (input: { id: string }) => Promise<ActionResult<unknown>>;
}

const DAYS = [1, 7, 30, 90, 366] as const;
const STATE_WORDS: Readonly<Record<ShareLine['state'], string>> = { works: 'works', expired: 'has expired', revoked: 'is revoked' };

/** Links for people without an account: made, counted, revoked. */
export function SharePanel({ id, shares, actions }: { id: string; shares: readonly ShareLine[]; actions: ShareActions }) {
  const router = useRouter();
  const [days, setDays] = useState('7');
  const [pending, setPending] = useState(false);
  const [problem, setProblem] = useState<Pick<ErrorView, 'message' | 'incidentId'> | null>(null);
  const [made, setMade] = useState<{ address: string; expiresAt: string } | null>(null);
  const make = async () => {
    setPending(true);
    const result = await actions.createShare({ id, days: Number(days) }).catch(() => null);
    setPending(false);
    if (!result?.ok) return setProblem(result?.error ?? { message: 'The server did not answer. Try again shortly.' });
    setProblem(null);
    setMade(result.data);
    router.refresh();
  };
  return (
    <section aria-labelledby="share-heading" className="space-y-4">
      <h2 id="share-heading" className="text-lg">Share by link</h2>
      <p className="text-sm text-ink-soft">Whoever has the link sees the scenes, without notes and names, and moves the controls left open. It needs no account and ends by itself.</p>
      <div className="flex flex-wrap items-end gap-3">
        <Select label="Works for" value={days} onChange={(event) => setDays(event.target.value)} options={DAYS.map((each) => ({ value: String(each), label: each === 1 ? '1 day' : `${each} days` }))} />
        <Button variant="primary" pending={pending} pendingLabel="Making the link …" onClick={() => void make()}>Make a link</Button>
      </div>
      <FormProblem problem={problem} />
      {made && (
        <>
          <Notice tone="done" live title="The link is made. It is shown this once.">
            Works until {formatDate(new Date(made.expiresAt))}.
          </Notice>
          <CopyOnce key={made.address} label="Link to the demonstration" button="Copy the link" value={made.address} />
        </>
      )}
      {shares.length > 0 && (
        <ul className="divide-y divide-line border-y border-line">
          {shares.map((share) => (
            <li key={share.id} className="space-y-2 py-3" data-share={share.state}>
              <p>
                Made {formatDate(new Date(share.madeAt))}, {STATE_WORDS[share.state]}
                {share.state === 'works' && ` until ${formatDate(new Date(share.expiresAt))}`}.{' '}
                <span className="text-ink-soft">Opened <span className="figures">{share.openings}</span> {share.openings === 1 ? 'time' : 'times'}.</span>
              </p>
              {share.state === 'works' && (
                <ActionButton
                  action={() => actions.revokeShare({ id: share.id })}
                  onDone={() => router.refresh()}
                  confirm={{ question: 'Whoever holds this link finds nothing from the next load on. This cannot be undone.', yes: 'Revoke the link', no: 'Keep it' }}
                >
                  Revoke
                </ActionButton>
              )}
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
