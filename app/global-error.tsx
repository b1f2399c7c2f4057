'use client';

import { Button } from '@/components/ui/button';
import { MessagePage } from '@/components/shell/message-page';
import { fontVariables } from './fonts';
import './globals.css';

/** Stands in for the root layout when that itself fails, so it brings its own document. */
export default function GlobalError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <html lang="en-GB" className={fontVariables}>
      <body className="bg-cloth text-ink antialiased">
        <title>This page could not be shown · Selvedge</title>
        <MessagePage
          title="This page could not be shown"
          actions={
            <Button variant="primary" onClick={reset}>
              Try again
            </Button>
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
      </body>
    </html>
  );
}
