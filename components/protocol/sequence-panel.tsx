'use client';

import { useFormContext, useFormState } from 'react-hook-form';
import { IconButton } from '@/components/ui/button';
import { FormMessage, useReadOnly } from '@/components/ui/form';
import { ArrowDownIcon, ArrowUpIcon, CrossIcon, PlusIcon } from '@/components/ui/icons';
import { Panel } from '@/components/ui/panel';
import { KindGroup, SlicesGroup, useSequence, WindowGroup } from './sequence-groups';
import { PresaturationGroup } from './sequence-presaturation';
import { SavingGroup, TimingGroup } from './sequence-timing';
import { sequenceSummary } from './sequence-facts';

export interface SequencePanelProps {
  index: number;
  count: number;
  startsOpen: boolean;
  onMove: (by: -1 | 1) => void;
  onRemove: () => void;
  onRepeat: () => void;
}

/** One sequence of a protocol; rolled up it is one line. */
export function SequencePanel({ index, count, startsOpen, onMove, onRemove, onRepeat }: SequencePanelProps) {
  const at = `sequences.${index}`;
  const sequence = useSequence(at);
  const readOnly = useReadOnly();
  const { getFieldState } = useFormContext();
  const formState = useFormState();
  const refused = (keys: readonly string[]) =>
    keys.some((key) => getFieldState(`${at}.${key}`, formState).invalid);
  if (!sequence) return null;
  const name = sequence.name || `Sequence ${index + 1}`;
  const invalid = getFieldState(at, formState).invalid;
  const actions = (
    <>
      <IconButton label={`Move ${name} up`} disabled={index === 0} onClick={() => onMove(-1)}>
        <ArrowUpIcon />
      </IconButton>
      <IconButton label={`Move ${name} down`} disabled={index === count - 1} onClick={() => onMove(1)}>
        <ArrowDownIcon />
      </IconButton>
      <IconButton label={`Repeat ${name} as a new sequence`} onClick={onRepeat}>
        <PlusIcon />
      </IconButton>
      <IconButton label={`Remove ${name}`} disabled={count === 1} onClick={onRemove}>
        <CrossIcon />
      </IconButton>
    </>
  );
  return (
    <Panel
      level={3}
      title={`${index + 1}. ${name}`}
      collapsible
      defaultOpen={startsOpen}
      open={invalid || undefined}
      summary={<span className="hidden lg:inline">{sequenceSummary(sequence)}</span>}
      actions={!readOnly && actions}
    >
      <div className="space-y-3">
        <KindGroup at={at} refused={refused} />
        <WindowGroup at={at} refused={refused} />
        <SlicesGroup at={at} refused={refused} />
        <TimingGroup at={at} refused={refused} />
        <SavingGroup at={at} refused={refused} />
        <PresaturationGroup at={at} refused={refused} />
        <FormMessage name={`${at}.slices.mode`} />
      </div>
    </Panel>
  );
}
