'use client';

import { MessagePage } from '@/components/shell/message-page';
import { Button, LinkButton } from '@/components/ui/button';

export default function ErrorPage({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <MessagePage
      title="This page could not be shown"
      actions={
        <>
          <Button variant="primary" onClick={reset}>
            Try again
          </Button>
          <LinkButton href="/today">Go to today’s bookings</LinkButton>
        </>
      }
    >
      <p>Something went wrong on our side. Nothing was stored in part.</p>
      {error.digest && (
        <p className="text-base">
          If it happens again, tell whoever runs this installation the number{' '}
          <span className="figures text-ink">{error.digest}</span>.
        </p>
      )}
    </MessagePage>
  );
}
