import { useId } from 'react';
import { cx } from './class-names';

/** The selvedge: a double ink line with woven ticks, as wide as what it closes. */
export function WovenEdge({ className }: { className?: string }) {
  const id = useId();
  return (
    <svg aria-hidden="true" height="8" className={cx('block w-full text-ink', className)}>
      <defs>
        <pattern id={id} width="7" height="8" patternUnits="userSpaceOnUse">
          <path d="M0 7 L5 1" stroke="currentColor" strokeWidth="1" />
        </pattern>
      </defs>
      <rect width="100%" height="8" fill={`url(#${id})`} />
      <path d="M0 0.5 H4000 M0 7.5 H4000" stroke="currentColor" strokeWidth="1" />
    </svg>
  );
}
