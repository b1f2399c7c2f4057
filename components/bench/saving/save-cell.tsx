'use client';

import { Button, LinkButton } from '@/components/ui/button';
import { isUnsaved } from '../state/bench-state';
import { useBenchState } from '../bench-context';
import type { PlanSaving } from './use-plan-saving';

/** Save, and the sheet of what was saved; says in words where the plan stands. */
export function SaveCell({ plan }: { plan: PlanSaving }) {
  const unsaved = useBenchState(isUnsaved);
  const { identity, saving, save } = plan;
  const busy = saving.kind === 'saving';
  return (
    <div className="flex flex-auto items-center justify-end gap-3 px-4 py-2.5 max-xl:w-full max-xl:border-t max-xl:border-line">
      <p role="status" className="text-right text-sm text-balance text-ink-soft max-xl:mr-auto max-xl:text-left xl:max-w-44">
        {stateWords(plan, unsaved)}
      </p>
      {identity.version > 0 && (
        <LinkButton href={`/plans/${identity.planId}/sheet`} className="flex-none">
          Plan sheet
        </LinkButton>
      )}
      <Button
        variant={unsaved ? 'primary' : 'secondary'}
        pending={busy}
        pendingLabel="Saving"
        onClick={() => save()}
        className="flex-none"
      >
        Save plan
      </Button>
    </div>
  );
}

function stateWords({ identity, saving, restsOn }: PlanSaving, unsaved: boolean): string {
  if (saving.kind === 'saving' && saving.attempt > 1) {
    return `Not reached the server yet; trying again (${saving.attempt}). Your plan is kept in this tab.`;
  }
  if (identity.version === 0) return 'Not saved yet';
  // A sign-off, or putting it for use, makes no new version: the newest state is asked for with it.
  const version = `${restsOn?.state ?? identity.state ?? 'draft'}, version ${identity.version}${restsOn ? ` by ${restsOn.savedBy}` : ''}`;
  return unsaved ? `Unsaved changes since version ${identity.version}` : `Saved: ${version}`;
}
