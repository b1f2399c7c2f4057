'use client';

import { useMemo } from 'react';
import { Button } from '@/components/ui/button';
import { formDifferences, type Difference } from '@/components/ui/form-differences';
import { Popover } from '@/components/ui/popover';
import type { Prescription } from '@/lib/physics/model/prescription';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import { useBench } from '../bench-context';
import { usePatch } from './group';

/** Differences of one field: a window's centre or a slab is one field of several figures. */
export function changedFields(protocol: Prescription, now: Prescription): ReadonlyMap<keyof Prescription, readonly Difference[]> {
  const fields = new Map<keyof Prescription, Difference[]>();
  for (const each of formDifferences(prescriptionSchema, protocol, now)) {
    const head = each.path.split('.')[0] as keyof Prescription;
    fields.set(head, [...(fields.get(head) ?? []), each]);
  }
  return fields;
}

/** Where the values come from; once some were changed, which, and the way back for each and for all. */
export function FromProtocol({ source, protocol, prescription }: { source: string; protocol: Prescription | undefined; prescription: Prescription }) {
  const { store } = useBench();
  const patch = usePatch();
  const fields = useMemo(() => (protocol ? changedFields(protocol, prescription) : new Map()), [protocol, prescription]);
  if (!protocol || fields.size === 0) return <p className="min-w-0 truncate text-sm text-ink-soft">{source}</p>;
  const back = (head: keyof Prescription) => patch({ [head]: protocol[head] });
  return (
    <Popover
      align="end"
      label="Changed from the protocol"
      trigger={
        <Button variant="quiet" size="sm" className="-my-1.5 -mr-2 px-2!">
          {fields.size} changed
        </Button>
      }
    >
      <div className="w-80 max-w-full text-sm">
        <p className="mb-2 text-ink-soft">Protocol: {source}</p>
        <ul className="max-h-72 overflow-y-auto">
          {[...(fields as ReturnType<typeof changedFields>)].map(([head, differences]) => (
            <li key={head} className="flex items-baseline justify-between gap-3 border-t border-line py-1">
              <span className="min-w-0">
                {differences.map(({ path, words, theirs, mine }) => (
                  <span key={path} className="block">
                    {words}: <span className="figures">{mine}</span>, protocol <span className="figures">{theirs}</span>
                  </span>
                ))}
              </span>
              <Button size="sm" variant="quiet" className="flex-none px-2!" aria-label={`Back to the protocol: ${differences[0]!.words}`} onClick={() => back(head)}>
                Back
              </Button>
            </li>
          ))}
        </ul>
        <Button size="sm" className="mt-2" onClick={() => store.dispatch({ type: 'back-to-protocol', prescription: protocol })}>
          All back to the protocol
        </Button>
        <p className="mt-1 text-ink-soft">For this sequence. One undo takes it back.</p>
      </div>
    </Popover>
  );
}
