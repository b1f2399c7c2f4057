'use client';

import { Button, LinkButton } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { ScannerSaving } from './use-scanner-saving';

function words({ state, unsaved, waiting, version, planState }: ScannerSaving): string {
  switch (state.kind) {
    case 'sending':
      return 'Saving';
    case 'waiting':
      return `No network. ${waiting === 1 ? 'One change waits' : `${waiting} changes wait`} in this tab; trying again (${state.attempts}).`;
    case 'refused':
    case 'overtaken':
      return 'Not saved';
    case 'idle':
      if (unsaved) return version === 0 ? 'Not saved yet' : `Unsaved changes since version ${version}`;
      return version === 0 ? 'Nothing changed yet' : `Saved: ${planState ?? 'draft'}, version ${version}`;
  }
}

/** At the bottom edge, under the thumb: says where saving stands and saves. */
export function SaveBar({ saving }: { saving: ScannerSaving }) {
  const { state } = saving;
  return (
    <div className="sticky bottom-0 border-t border-line bg-paper">
      {state.kind === 'overtaken' && (
        <Notice
          tone="error"
          live
          className="m-3"
          title={`${state.theirs.savedBy} saved version ${state.theirs.version} in the meantime.`}
          actions={<Button onClick={saving.saveOnTop}>Save yours as version {state.theirs.version + 1}</Button>}
        >
          Nothing was overwritten and nothing of yours is lost. The bench shows both side by side.
        </Notice>
      )}
      {state.kind === 'refused' && (
        <Notice tone="error" live className="m-3" title={`Not saved. ${state.problem.title}`} actions={<Button onClick={saving.retry}>Try again</Button>}>
          {Object.entries(state.problem.fields ?? {}).map(([path, message]) => <p key={path}>{path ? `${path}: ${message}` : message}</p>)}
        </Notice>
      )}
      <div className="flex flex-wrap items-center justify-between gap-3 px-4 py-3">
        <p role="status" className="min-w-0 flex-1 text-sm">{words(saving)}</p>
        {saving.version > 0 && state.kind === 'idle' && !saving.unsaved && (
          <LinkButton href={`/plans/${saving.planId}`} prefetch={false}>Plan and outcome</LinkButton>
        )}
        <Button variant={saving.unsaved ? 'primary' : 'secondary'} className="min-h-14 px-6 text-lg" pending={state.kind === 'sending'} pendingLabel="Saving" onClick={saving.save}>
          Save sizes and plan
        </Button>
      </div>
    </div>
  );
}
