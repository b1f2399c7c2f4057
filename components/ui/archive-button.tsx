'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import type { ActionResult } from '@/lib/schemas/action-result';
import { Button } from './button';
import { FieldError } from './field';
import { useStatus } from './status';

/** Takes a record out of lists, or brings it back. Reversible, so it asks nothing first. */
export function ArchiveButton({
  archived,
  archive,
  restore,
  noun,
}: {
  archived: boolean;
  archive: () => Promise<ActionResult<unknown>>;
  restore: () => Promise<ActionResult<unknown>>;
  noun: string;
}) {
  const router = useRouter();
  const { say } = useStatus();
  const [pending, setPending] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const press = async () => {
    setPending(true);
    setProblem(null);
    try {
      const result = await (archived ? restore() : archive());
      if (result.ok) {
        say(
          archived
            ? `The ${noun} is back in the lists.`
            : `The ${noun} is out of the lists. Plans made with it stay.`,
        );
        router.refresh();
      } else {
        setProblem(result.error.message);
      }
    } catch {
      setProblem('The server did not answer. Try again shortly.');
    }
    setPending(false);
  };
  return (
    <div>
      <Button size="sm" pending={pending} pendingLabel="One moment…" onClick={() => void press()}>
        {archived ? `Bring this ${noun} back` : `Take this ${noun} out of the lists`}
      </Button>
      <div aria-live="polite">{problem && <FieldError>{problem}</FieldError>}</div>
    </div>
  );
}
