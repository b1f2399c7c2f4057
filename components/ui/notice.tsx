import type { ReactNode } from 'react';
import { cx } from './class-names';

/**
 * A message that stays on the page. `error` is inverse ink with a woven edge: red and ochre mean fold, so an
 * error has to be unmistakable without them.
 */
export function Notice({
  title,
  children,
  tone = 'note',
  live = false,
  actions,
  className,
}: {
  title?: ReactNode;
  children?: ReactNode;
  tone?: 'note' | 'done' | 'error';
  /** Announce when it appears. */
  live?: boolean;
  actions?: ReactNode;
  className?: string;
}) {
  const error = tone === 'error';
  return (
    <div
      role={live ? (error ? 'alert' : 'status') : undefined}
      className={cx(
        'flex overflow-hidden rounded border',
        error ? 'border-ink bg-ink text-paper' : 'border-line bg-paper text-ink',
        tone === 'done' && 'border-indigo bg-wash',
        className,
      )}
    >
      <span
        aria-hidden="true"
        className={cx(
          'w-1.5 flex-none',
          error ? 'woven-paper' : tone === 'done' ? 'bg-indigo' : 'bg-ink-soft',
        )}
      />
      <div className="min-w-0 flex-1 px-4 py-3">
        {title && <p className="font-semibold">{title}</p>}
        {children && <div className={cx(Boolean(title) && 'mt-1')}>{children}</div>}
        {actions && <div className="mt-3 flex flex-wrap gap-3">{actions}</div>}
      </div>
    </div>
  );
}
