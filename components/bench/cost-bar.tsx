import { cx } from '@/components/ui/class-names';
import type { CostTerm } from '@/lib/physics/model/remedy';

/** The terms of a cost side by side. Widths are SVG attributes: the page's policy allows no style attributes. */
export function CostBar({ terms, scale, className }: { terms: readonly CostTerm[]; scale: number; className?: string }) {
  const paid = terms.filter(({ tenths }) => tenths > 0).sort((a, b) => b.tenths - a.tenths);
  const total = paid.reduce((sum, { tenths }) => sum + tenths, 0);
  const shrink = total > scale ? scale / total : 1;
  const widths = paid.map(({ tenths }) => (tenths * shrink * 1000) / scale);
  const startOf = (i: number): number => widths.slice(0, i).reduce((sum, width) => sum + width, 0);
  return (
    <svg viewBox="0 0 1000 10" preserveAspectRatio="none" aria-hidden="true" className={cx('block h-1.5 w-full', className)}>
      {paid.map(({ kind }, i) => (
        <rect
          key={kind}
          x={startOf(i)}
          width={Math.max(2, (widths[i] ?? 0) - 5)}
          height={10}
          className={i === 0 ? 'fill-ink-soft' : i === 1 ? 'fill-line-strong' : 'fill-line'}
        />
      ))}
    </svg>
  );
}
