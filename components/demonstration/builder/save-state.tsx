'use client';

import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { Saving } from './use-autosave';

const WORDS = { saved: 'All changes are saved.', waiting: 'Not saved yet.', saving: 'Saving …' } as const;

/** Whether what is on the page is stored, and what to do when it is not. */
export function SaveState({ saving, saveNow, overwrite }: { saving: Saving; saveNow: () => void; overwrite: (version: number) => void }) {
  if (saving.state === 'conflict') {
    return (
      <Notice
        tone="error"
        live
        title="Someone else changed this demonstration in the meantime. Nothing was overwritten."
        actions={
          <>
            <Button onClick={() => window.location.reload()}>Load theirs, lose mine</Button>
            <Button onClick={() => overwrite(saving.currentVersion)}>Save mine over it</Button>
          </>
        }
      >
        Your changes are still on this page and are not saved.
      </Notice>
    );
  }
  if (saving.state === 'failed') {
    const { message, fields, incidentId } = saving.error;
    return (
      <Notice tone="error" live title="Not saved." actions={<Button onClick={saveNow}>Save now</Button>}>
        <p>{message}{incidentId && ` Incident ${incidentId}.`}</p>
        {Object.entries(fields ?? {}).map(([field, text]) => <p key={field}>{field}: {text}</p>)}
      </Notice>
    );
  }
  return <p role="status" className="text-sm text-ink-soft" data-saving={saving.state}>{WORDS[saving.state]}</p>;
}
