'use client';

// React streams what a server component puts inside an <svg> with a style attribute of its own, which the content
// security policy refuses; rendered from plain props it comes in one piece.
import { cx } from './class-names';

/**
 * Five states of one corner, drawn from the product's mark. No triangle, plain square or circle stands for a state:
 * in an MR department those outlines label equipment (ASTM F2503, IEC 62570; from memory).
 */
export type MarkKind = 'flat' | 'outward' | 'inward' | 'torn' | 'unworked';

export const MARK_PATHS: Record<MarkKind, { edge: string; fill?: string; thread?: string; dashed?: boolean }> = {
  // Whole sheet, its woven edge on the left: the corner lies flat.
  flat: { edge: 'M3 2.5 H17 V17.5 H3 Z', thread: 'M6.5 2.5 V17.5' },
  // The corner is turned over the edge and points away from the sheet.
  outward: { edge: 'M12 2.5 H3 V17.5 H12 Z', fill: 'M12 5.5 L18.5 10 L12 14.5 Z' },
  // The corner is turned onto the sheet.
  inward: { edge: 'M11 17.5 H3 V2.5 H17 V11.5', fill: 'M17 11.5 L11 17.5 V11.5 Z' },
  // The corner is gone.
  torn: { edge: 'M11 17.5 H3 V2.5 H17 V9.5 L14.8 10.6 L15.4 12.6 L12.8 13 L13 15.6 Z' },
  // Woven otherwise than this engine can work out.
  unworked: {
    edge: 'M3 2.5 H17 V17.5 H3 Z',
    thread: 'M6.5 6 H13.5 M6.5 10 H13.5 M6.5 14 H13.5',
    dashed: true,
  },
};

export function Mark({ kind, className, title }: { kind: MarkKind; className?: string; title?: string }) {
  const path = MARK_PATHS[kind];
  return (
    <svg
      viewBox="0 0 20 20"
      role={title ? 'img' : undefined}
      aria-label={title}
      aria-hidden={title ? undefined : true}
      data-mark={kind}
      className={cx('size-4.5 flex-none', className)}
    >
      <path
        d={path.edge}
        fill="none"
        stroke="currentColor"
        strokeWidth="1.75"
        strokeLinejoin="round"
        strokeDasharray={path.dashed ? '2.5 2' : undefined}
      />
      {path.fill && (
        <path
          d={path.fill}
          fill="currentColor"
          stroke="currentColor"
          strokeWidth="1"
          strokeLinejoin="round"
        />
      )}
      {path.thread && <path d={path.thread} fill="none" stroke="currentColor" strokeWidth="1.25" />}
    </svg>
  );
}
