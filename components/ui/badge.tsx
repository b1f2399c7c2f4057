import type { ReactNode } from 'react';
import { cx } from './class-names';

/** A word about a state. The edge says how sure it is: solid, dotted (estimated), dashed (uncertain). */
export function Badge({
  children,
  tone = 'plain',
  edge = 'solid',
  className,
}: {
  children: ReactNode;
  tone?: 'plain' | 'strong' | 'tried';
  edge?: 'solid' | 'dotted' | 'dashed';
  className?: string;
}) {
  return (
    <span
      className={cx(
        'inline-flex items-center gap-1.5 rounded border px-2 py-0.5 text-sm font-medium whitespace-nowrap',
        tone === 'plain' && 'border-line-strong bg-paper text-ink',
        tone === 'strong' && 'border-ink bg-ink text-paper',
        tone === 'tried' && 'border-indigo bg-wash text-ink',
        edge === 'dotted' && 'border-dotted',
        edge === 'dashed' && 'border-dashed',
        className,
      )}
    >
      {children}
    </span>
  );
}
