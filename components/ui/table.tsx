import type { HTMLAttributes, ReactNode, TdHTMLAttributes, ThHTMLAttributes } from 'react';
import { cx } from './class-names';

/** Dense table on paper. The scroller can be focused, so a wide table can be read with the keyboard. */
export function Table({
  caption,
  children,
  className,
}: {
  caption: string;
  children: ReactNode;
  className?: string;
}) {
  return (
    <div
      role="region"
      aria-label={caption}
      tabIndex={0}
      className={cx('relative overflow-x-auto rounded-md border border-line bg-paper', className)}
    >
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </div>
  );
}

export function Th({ className, scope = 'col', ...rest }: ThHTMLAttributes<HTMLTableCellElement>) {
  return (
    <th
      scope={scope}
      {...rest}
      className={cx(
        'border-b border-line px-3 py-2 text-sm first:pl-4 last:pr-4 font-semibold whitespace-nowrap text-ink-soft',
        className,
      )}
    />
  );
}

export function Td({ className, ...rest }: TdHTMLAttributes<HTMLTableCellElement>) {
  return <td {...rest} className={cx('px-3 py-2 align-middle first:pl-4 last:pr-4', className)} />;
}

export function Tr({ className, ...rest }: HTMLAttributes<HTMLTableRowElement>) {
  return <tr {...rest} className={cx('border-b border-line last:border-b-0 hover:bg-cloth', className)} />;
}
