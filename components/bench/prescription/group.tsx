'use client';

import type { ReactNode } from 'react';
import { Panel } from '@/components/ui/panel';
import type { Prescription } from '@/lib/physics/model/prescription';
import { useBench } from '../bench-context';
import { PAIR_CLASS } from '../bench-number';

export interface GroupProps {
  readonly prescription: Prescription;
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
}

/** Some fields of the prescription under one title; rolled up it is one line of what they say. */
export function Group({ title, summary, children, open, onOpenChange }: Omit<GroupProps, 'prescription'> & { title: string; summary: string; children: ReactNode }) {
  return (
    <Panel tone="bench" level={3} collapsible title={title} summary={summary} open={open} onOpenChange={onOpenChange} className="bench-group">
      {children}
    </Panel>
  );
}

export const Pair = ({ children }: { children: ReactNode }) => <div className={PAIR_CLASS}>{children}</div>;

/** Changes the active sequence, with what follows from the change. */
export function usePatch() {
  const { store } = useBench();
  return (patch: Partial<Prescription>, step?: string) =>
    store.dispatch({ type: 'edit-prescription', patch, ...(step === undefined ? {} : { step }) });
}

export const usable = (value: number | null): value is number => value !== null && Number.isFinite(value);
