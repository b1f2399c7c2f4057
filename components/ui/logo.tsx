'use client';

// React streams what a server component puts inside an <svg> with a style attribute of its own, which the content
// security policy refuses; rendered from plain props it comes in one piece.
import { cx } from './class-names';

/** A square of cloth, one corner folded over, a single thread line. */
export function Logo({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 32 32" aria-hidden="true" className={cx('size-8 flex-none', className)}>
      <path
        d="M4.5 4.5 H27.5 V19.5 L19.5 27.5 H4.5 Z"
        fill="none"
        stroke="currentColor"
        strokeWidth="2.25"
        strokeLinejoin="round"
      />
      <path
        d="M27.5 19.5 H19.5 V27.5"
        fill="none"
        stroke="currentColor"
        strokeWidth="2.25"
        strokeLinejoin="round"
      />
      <path d="M9.5 4.5 V27.5" className="stroke-indigo" fill="none" strokeWidth="1.5" />
    </svg>
  );
}
