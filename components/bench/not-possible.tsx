'use client';

import { Panel } from '@/components/ui/panel';
import type { RemedyNotPossible } from '@/lib/physics/model/remedy';
import { remedyTitle } from '@/lib/presentation/remedy-words';

/** What was considered and ruled out, with the reason: never silently dropped. */
export function NotPossible({ items }: { items: readonly RemedyNotPossible[] }) {
  const single = items.filter(({ changes, payback }) => changes.length === 1 && !payback);
  const combined = items.length - single.length;
  return (
    <Panel tone="bench" level={3} collapsible defaultOpen={false} title="Not possible here" summary={`${items.length}`}>
      <ul className="space-y-2">
        {single.map((item) => (
          <li key={item.key} className="text-sm">
            <span className="font-semibold">{remedyTitle(item)}</span>
            <span className="block text-ink-soft">{item.reason.text}</span>
          </li>
        ))}
      </ul>
      {combined > 0 && (
        <details className="mt-2 text-sm">
          <summary>{combined} combinations</summary>
          <ul className="mt-1 space-y-1.5">
            {items
              .filter((item) => !single.includes(item))
              .map((item) => (
                <li key={item.key}>
                  {remedyTitle(item)}
                  <span className="block text-ink-soft">{item.reason.text}</span>
                </li>
              ))}
          </ul>
        </details>
      )}
    </Panel>
  );
}
