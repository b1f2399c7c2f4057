'use client';

import { SomethingWrong } from '@/components/shell/something-wrong';
import { fontVariables } from './fonts';
import './globals.css';

/** Stands in for the root layout when that itself fails, so it brings its own document. */
export default function GlobalError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <html lang="en-GB" className={fontVariables}>
      <body className="bg-cloth text-ink antialiased">
        <title>This page could not be shown · Selvedge</title>
        <SomethingWrong digest={error.digest} reset={reset} />
      </body>
    </html>
  );
}
