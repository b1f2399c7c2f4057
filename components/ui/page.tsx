import Link from 'next/link';
import type { ReactNode } from 'react';
import { cx } from './class-names';

export function PageHeader({
  title,
  lead,
  actions,
  back,
}: {
  title: ReactNode;
  lead?: ReactNode;
  actions?: ReactNode;
  back?: { href: string; label: string };
}) {
  return (
    <header className="mb-6 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
      <div className="min-w-0 max-w-prose">
        {back && (
          <p className="mb-1 text-sm">
            <Link href={back.href} className="text-link">
              ← {back.label}
            </Link>
          </p>
        )}
        <h1 className="text-2xl">{title}</h1>
        {lead && <p className="mt-1 text-ink-soft">{lead}</p>}
      </div>
      {actions && <div className="flex flex-wrap gap-3">{actions}</div>}
    </header>
  );
}

/** Width and rhythm of every page but the bench. */
export function PageBody({
  children,
  narrow = false,
  wide = false,
}: {
  children: ReactNode;
  narrow?: boolean;
  wide?: boolean;
}) {
  return (
    <div
      className={cx(
        'mx-auto w-full px-4 py-8 sm:px-6',
        narrow ? 'max-w-3xl' : wide ? 'max-w-[96rem]' : 'max-w-6xl',
      )}
    >
      {children}
    </div>
  );
}

/** Says why there is nothing and what to do next. */
export function EmptyState({
  title,
  children,
  action,
}: {
  title: ReactNode;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="rounded-md border border-dashed border-line-strong px-6 py-10 text-center">
      <p className="text-lg font-semibold">{title}</p>
      {children && <div className="mx-auto mt-2 max-w-prose text-ink-soft">{children}</div>}
      {action && <div className="mt-5 flex justify-center gap-3">{action}</div>}
    </div>
  );
}

/** Holds the place of what is on its way. */
export function Skeleton({ className }: { className?: string }) {
  return <div aria-hidden="true" className={cx('animate-pulse rounded bg-sunk', className)} />;
}

/** A whole page on its way, announced once. */
export function PageSkeleton({ label = 'Loading' }: { label?: string }) {
  return (
    <PageBody>
      <p role="status" className="sr-only">
        {label}
      </p>
      <Skeleton className="h-8 w-64" />
      <Skeleton className="mt-3 h-5 w-96 max-w-full" />
      <Skeleton className="mt-8 h-64 w-full" />
    </PageBody>
  );
}
