'use client';

import { useEffect, useEffectEvent, useState, type ReactNode } from 'react';
import { Notice } from '@/components/ui/notice';
import { WovenEdge } from '@/components/ui/woven-edge';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { SizeAnswer, SizeFormView } from '@/lib/schemas/size-request';
import { SizeForm } from './size-form';

type Opened = ActionResult<SizeFormView>;

const NO_ANSWER: Opened = { ok: false, error: { code: 'unavailable', message: 'There was no answer. Please reload the page shortly.' } };

function Sheet({ children }: { children: ReactNode }) {
  return (
    <main id="main" className="mx-auto max-w-lg px-3 py-6 sm:px-6 sm:py-10">
      <div className="border-x border-line bg-paper">
        <WovenEdge />
        <div className="px-5 py-6">{children}</div>
        <WovenEdge />
      </div>
    </main>
  );
}

/** Behind the link: the place that asks, the form, a receipt. The secret leaves the address as soon as it is exchanged. */
export function SizePage({
  open,
  reopen,
  answer,
}: {
  open: (token: string) => Promise<Opened>;
  reopen: () => Promise<Opened>;
  answer: (given: SizeAnswer) => Promise<Opened>;
}) {
  const [opened, setOpened] = useState<Opened | null>(null);
  const [sentAt, setSentAt] = useState<Date | null>(null);

  // Once, when the page opens: an action that sets a cookie renders the page anew and hands down new actions, and
  // asking again after the answer would put "has been answered" in place of the receipt.
  const exchange = useEffectEvent((token: string) => (token ? open(token) : reopen()));

  useEffect(() => {
    let current = true;
    const token = window.location.hash.slice(1);
    void exchange(token)
      .catch(() => NO_ANSWER)
      .then((result) => {
        if (!current) return;
        if (token && result.ok) window.history.replaceState(null, '', window.location.pathname);
        setOpened(result);
      });
    return () => {
      current = false;
    };
  }, []);

  if (!opened) {
    return (
      <Sheet>
        <p role="status">One moment …</p>
      </Sheet>
    );
  }
  if (!opened.ok) {
    return (
      <Sheet>
        <h1 className="text-2xl">Measurements</h1>
        <Notice className="mt-4" tone="error" live title={opened.error.message} />
      </Sheet>
    );
  }
  const { siteName } = opened.data;
  if (sentAt) {
    return (
      <Sheet>
        <p className="text-ink-soft">{siteName}</p>
        <h1 className="mt-1 text-2xl">Thank you</h1>
        <div role="status" className="mt-4 space-y-3">
          <p>
            Your measurements arrived on{' '}
            {sentAt.toLocaleString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', hour: '2-digit', minute: '2-digit' })}.
          </p>
          <p>There is nothing more to do. Your appointment stays unless {siteName} tells you otherwise. The link has done its work and opens no more.</p>
        </div>
      </Sheet>
    );
  }
  return (
    <Sheet>
      <p className="text-ink-soft">{siteName}</p>
      <h1 className="mt-1 text-2xl">A few measurements for your scan</h1>
      <p className="mt-3">
        Scanners differ in the room they give. With these figures we can choose the one that suits you and plan enough time. It takes about five
        minutes and a tape measure.
      </p>
      <SizeForm
        answer={answer}
        onDone={() => {
          setSentAt(new Date());
          window.scrollTo({ top: 0 });
        }}
      />
    </Sheet>
  );
}
