'use client';

import Link from 'next/link';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { Notice } from '@/components/ui/notice';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { SetPasswordInput } from '@/lib/schemas/session/password';
import { SetPasswordForm } from './set-password-form';

type LinkResult = ActionResult<{ email: string; displayName: string; first: boolean }>;

const INCOMPLETE: LinkResult = {
  ok: false,
  error: { code: 'gone', message: 'The link is not complete. Open it from the mail again, or copy all of it.' },
};
const NO_ANSWER: LinkResult = {
  ok: false,
  error: { code: 'unavailable', message: 'The server did not answer. Reload the page shortly.' },
};

function onHashChange(notify: () => void): () => void {
  window.addEventListener('hashchange', notify);
  return () => window.removeEventListener('hashchange', notify);
}

/** The secret is in the address's fragment, which the browser keeps to itself: this part of the page must ask for it. */
export function PasswordLink({
  inspectLink,
  setPassword,
}: {
  inspectLink: (token: string) => Promise<LinkResult>;
  setPassword: (input: SetPasswordInput) => Promise<ActionResult<{ email: string }>>;
}) {
  const fragment = useSyncExternalStore(onHashChange, () => window.location.hash, () => null);
  const token = fragment?.slice(1) ?? null;
  const [answer, setAnswer] = useState<{ token: string; result: LinkResult } | null>(null);

  useEffect(() => {
    if (!token) return;
    let current = true;
    void inspectLink(token)
      .catch(() => NO_ANSWER)
      .then((result) => current && setAnswer({ token, result }));
    return () => {
      current = false;
    };
  }, [token, inspectLink]);

  // Once known, the account stays on screen while the fragment is cleared after the password is set.
  const result = token === '' && !answer?.result.ok ? INCOMPLETE : answer?.result;
  if (!result || !(answer || result === INCOMPLETE)) return <p role="status">Looking at your link …</p>;
  if (!result.ok) {
    return (
      <Notice tone="error" live title={result.error.message}>
        <Link href="/sign-in/new-password" className="underline">
          Ask for a new link
        </Link>
      </Notice>
    );
  }
  const { email, displayName } = result.data;
  return (
    <>
      <p className="mb-5">For the account of {displayName}.</p>
      <SetPasswordForm key={answer!.token} token={answer!.token} email={email} setPassword={setPassword} />
    </>
  );
}
