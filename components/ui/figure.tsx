import type { ReactNode } from 'react';
import { cx } from './class-names';

/** A number in the figures face with its unit in text. */
export function Figure({
  value,
  unit,
  tried,
  className,
}: {
  value: ReactNode;
  unit?: ReactNode;
  /** A second value, shown as now → tried. */
  tried?: ReactNode;
  className?: string;
}) {
  return (
    <span className={cx('whitespace-nowrap', className)}>
      <span className="figures">{value}</span>
      {tried !== undefined && (
        <>
          <span aria-hidden="true" className="text-ink-soft">
            {' → '}
          </span>
          <span className="sr-only"> becomes </span>
          <span className="figures text-indigo">{tried}</span>
        </>
      )}
      {unit && <span className="text-sm text-ink-soft"> {unit}</span>}
    </span>
  );
}

/** Name and value pairs, dense. */
export function Facts({ children, className }: { children: ReactNode; className?: string }) {
  return <dl className={cx('grid grid-cols-[auto_1fr] gap-x-6 gap-y-1', className)}>{children}</dl>;
}

export function Fact({ name, children }: { name: ReactNode; children: ReactNode }) {
  return (
    <>
      <dt className="text-ink-soft">{name}</dt>
      <dd className="min-w-0">{children}</dd>
    </>
  );
}
