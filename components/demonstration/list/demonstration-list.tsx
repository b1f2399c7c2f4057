'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import { formatDate } from '@/lib/presentation/moment';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { DemonstrationLine } from '@/lib/schemas/demonstration';

export interface ListActions {
  readonly duplicate: (input: { id: string }) => Promise<ActionResult<{ id: string }>>;
  readonly putAway: (input: { id: string; away: boolean }) => Promise<ActionResult<{ linksEnded: number }>>;
}

const several = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

function linksEnd(links: number): string {
  return links === 0 ? '' : ` ${links === 1 ? 'Its link ends' : `Its ${links} links end`} for good, at the next load.`;
}

/** What the site has, newest change first. Those who do not build open the presentation. */
export function DemonstrationList({ lines, mayEdit, actions }: { lines: readonly DemonstrationLine[]; mayEdit: boolean; actions: ListActions }) {
  const router = useRouter();
  return (
    <ul aria-label="Demonstrations" className="divide-y divide-line border-y border-line">
      {lines.map(({ id, title, scenes, links, changedAt }) => (
        <li key={id} className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2 py-3">
          <div className="min-w-0 flex-1 basis-72">
            <Link href={mayEdit ? `/demonstrations/${id}` : `/demonstrations/${id}/present`} className="text-link text-lg font-semibold">{title}</Link>
            <p className="text-sm text-ink-soft">
              {several(scenes, 'scene', 'scenes')} · changed {formatDate(new Date(changedAt))}
              {mayEdit && links > 0 && ` · ${several(links, 'link works', 'links work')}`}
            </p>
          </div>
          {mayEdit && (
            <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
              {scenes > 0 && <Link href={`/demonstrations/${id}/present`} className="text-link">Present <span className="sr-only">“{title}”</span></Link>}
              <ActionButton size="sm" action={() => actions.duplicate({ id })} onDone={() => router.refresh()} pendingLabel="Copying …">
                Duplicate <span className="sr-only">“{title}”</span>
              </ActionButton>
              <ActionButton
                size="sm"
                action={() => actions.putAway({ id, away: true })}
                onDone={() => router.refresh()}
                confirm={{ question: `It leaves this list and can be brought back.${linksEnd(links)}`, yes: `Put “${title}” away`, no: 'Keep it' }}
              >
                Put away <span className="sr-only">“{title}”</span>
              </ActionButton>
            </div>
          )}
        </li>
      ))}
    </ul>
  );
}

/** What was put away, to be brought back. */
export function PutAwayList({ lines, actions }: { lines: readonly DemonstrationLine[]; actions: ListActions }) {
  const router = useRouter();
  if (lines.length === 0) return null;
  return (
    <details className="mt-4">
      <summary className="cursor-pointer text-ink-soft">{several(lines.length, 'demonstration is', 'demonstrations are')} put away</summary>
      <ul aria-label="Put away" className="mt-2 divide-y divide-line border-y border-line">
        {lines.map(({ id, title, scenes }) => (
          <li key={id} className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1 py-2">
            <span>{title} <span className="text-sm text-ink-soft">{several(scenes, 'scene', 'scenes')}</span></span>
            <ActionButton size="sm" action={() => actions.putAway({ id, away: false })} onDone={() => router.refresh()}>
              Bring back <span className="sr-only">“{title}”</span>
            </ActionButton>
          </li>
        ))}
      </ul>
    </details>
  );
}
