'use client';

import { Button } from '@/components/ui/button';
import { MessagePage } from './message-page';

/** An unexpected error, with the number under which it was logged. */
export function SomethingWrong({
  digest,
  reset,
  inside = false,
}: {
  digest: string | undefined;
  reset: () => void;
  inside?: boolean;
}) {
  return (
    <MessagePage
      inside={inside}
      title="This page could not be shown"
      actions={
        <Button variant="primary" onClick={reset}>
          Try again
        </Button>
      }
    >
      <p>Something went wrong on our side. Nothing was stored in part.</p>
      {digest && (
        <p className="text-base">
          If it happens again, tell whoever runs this installation the number{' '}
          <span className="figures text-ink">{digest}</span>.
        </p>
      )}
    </MessagePage>
  );
}
