'use client';

import { SomethingWrong } from '@/components/shell/something-wrong';

export default function ErrorPage({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return <SomethingWrong digest={error.digest} reset={reset} />;
}
