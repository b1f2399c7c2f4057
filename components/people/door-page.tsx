import Link from 'next/link';
import type { ReactNode } from 'react';
import { Logo } from '@/components/ui/logo';
import { WovenEdge } from '@/components/ui/woven-edge';

/** The pages before the shell: one column of paper between two woven edges. */
export function DoorPage({ title, lead, children }: { title: string; lead?: ReactNode; children: ReactNode }) {
  return (
    <main id="main" className="mx-auto flex min-h-dvh max-w-md flex-col justify-center px-4 py-10 sm:px-6">
      <Link href="/" className="flex w-fit items-center gap-3 rounded text-ink">
        <Logo className="size-9" />
        <span className="text-xl font-bold tracking-tight">Selvedge</span>
      </Link>
      <div className="mt-8 border-x border-line bg-paper">
        <WovenEdge />
        <div className="px-6 py-7">
          <h1 className="text-2xl">{title}</h1>
          {lead && <p className="mt-2 text-ink-soft">{lead}</p>}
          <div className="mt-6">{children}</div>
        </div>
        <WovenEdge />
      </div>
    </main>
  );
}
