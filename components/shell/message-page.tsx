import type { ReactNode } from 'react';
import { Logo } from '@/components/ui/logo';

/** A page that has one thing to say: not found, an error, a link that has ended. */
export function MessagePage({ title, children, actions }: { title: string; children: ReactNode; actions?: ReactNode }) {
  return (
    <main id="main" className="mx-auto flex min-h-[70dvh] max-w-xl flex-col justify-center px-6 py-16">
      <Logo className="size-12" />
      <h1 className="mt-6 text-3xl">{title}</h1>
      <div className="mt-3 space-y-3 text-lg text-ink-soft">{children}</div>
      {actions && <div className="mt-8 flex flex-wrap gap-3">{actions}</div>}
      <div aria-hidden="true" className="woven-edge mt-12" />
    </main>
  );
}
