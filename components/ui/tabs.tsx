'use client';

import * as RadixTabs from '@radix-ui/react-tabs';
import type { ReactNode } from 'react';
import { cx } from './class-names';
import { useMounted } from './use-mounted';

export interface TabItem<T extends string> {
  value: T;
  label: ReactNode;
  content: ReactNode;
  disabled?: boolean;
}

/** Views of one thing. Painted after hydration (see useMounted); until then the place is held. */
export function Tabs<T extends string>({
  label,
  value,
  onChange,
  items,
  aside,
  className,
}: {
  label: string;
  value: T;
  onChange: (value: T) => void;
  items: readonly TabItem<T>[];
  aside?: ReactNode;
  className?: string;
}) {
  const mounted = useMounted();
  if (!mounted) return <div aria-hidden="true" className={cx('min-h-64', className)} />;
  return (
    <RadixTabs.Root value={value} onValueChange={(next) => onChange(next as T)} className={className}>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <RadixTabs.List aria-label={label} className="flex flex-wrap gap-1">
          {items.map((item) => (
            <RadixTabs.Trigger
              key={item.value}
              value={item.value}
              disabled={item.disabled}
              className="min-h-8 rounded px-3 font-medium text-ink-soft hover:bg-sunk hover:text-ink data-[state=active]:bg-ink data-[state=active]:text-paper"
            >
              {item.label}
            </RadixTabs.Trigger>
          ))}
        </RadixTabs.List>
        {aside}
      </div>
      {items.map((item) => (
        <RadixTabs.Content key={item.value} value={item.value} className="mt-3">
          {item.content}
        </RadixTabs.Content>
      ))}
    </RadixTabs.Root>
  );
}
