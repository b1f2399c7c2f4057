'use client';

import { memo, useCallback, useDeferredValue, useMemo, useState, type ComponentType } from 'react';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import type { Prescription, SequenceFamily } from '@/lib/physics/model/prescription';
import { useBench, useBenchState } from './bench-context';
import { BenchForm, withLeaf } from './bench-form';
import { AccelerationGroup } from './prescription/acceleration-group';
import { FromProtocol } from './prescription/from-protocol';
import type { GroupProps } from './prescription/group';
import { OversamplingGroup } from './prescription/oversampling-group';
import { PresaturationGroup } from './prescription/presaturation-group';
import { ReceiveGroup } from './prescription/receive-group';
import { SlicesGroup } from './prescription/slices-group';
import { TimingGroup } from './prescription/timing-group';
import { WindowGroup } from './prescription/window-group';
import { sequenceById } from './state/bench-document';
import type { BenchState } from './state/bench-state';
import { FAMILIES_3D } from './state/prescription-edit';

/** In the order they stand in. Rendered again only for another prescription, or to open or close: a drag moves few fields. */
const GROUPS = {
  oversampling: memo(OversamplingGroup),
  window: memo(WindowGroup),
  slices: memo(SlicesGroup),
  timing: memo(TimingGroup),
  acceleration: memo(AccelerationGroup),
  presaturation: memo(PresaturationGroup),
  receive: memo(ReceiveGroup),
} satisfies Record<string, ComponentType<GroupProps>>;
export type GroupKey = keyof typeof GROUPS;
const GROUP_KEYS = Object.keys(GROUPS) as GroupKey[];
const Source = memo(FromProtocol);

/** What the protocol has on this scanner, by sequence. */
export type ProtocolPrescriptions = Readonly<Record<string, Prescription>>;

/** What is usually changed first in a family, so that its group is the one that lies open. */
function firstGroup({ family, breathing }: Prescription): GroupKey {
  if (FAMILIES_3D.includes(family)) return 'slices';
  if (breathing === 'breath-hold' && family === 'balanced') return 'window';
  return 'oversampling';
}

/** Every field of the active sequence; groups roll up to one line, and the open one follows the sequence. */
export function PrescriptionPanel({ source, protocol }: { source: string; protocol: ProtocolPrescriptions }) {
  const id = useBenchState((state) => state.activeId);
  // A form of its own for each sequence: a refused value waits where it was typed.
  return <SequenceForm key={id} id={id} source={source} protocol={protocol[id]} />;
}

function SequenceForm({ id, source, protocol }: { id: string; source: string; protocol: Prescription | undefined }) {
  const { store } = useBench();
  const select = useCallback((state: BenchState) => sequenceById(state.document, id).prescription, [id]);
  // Summaries and derived figures follow a drag when there is time for it; the picture comes first.
  const prescription = useDeferredValue(useBenchState(select));
  // Another family has another first group; within one, what a person opened stays open.
  const [chosen, setChosen] = useState<{ family: SequenceFamily; key: GroupKey | null } | null>(null);
  const open = chosen?.family === prescription.family ? chosen.key : firstGroup(prescription);
  const onEdit = (path: string, value: unknown, step?: string) => {
    const now = sequenceById(store.read().document, id).prescription;
    const after = withLeaf(now, path.split('.'), value);
    const head = path.split('.')[0] as keyof Prescription;
    store.dispatch({ type: 'edit-prescription', patch: { [head]: after[head] }, ...(step === undefined ? {} : { step }) });
  };
  const { family } = prescription;
  const groups = useMemo(
    () => GROUP_KEYS.map((key) => ({ key, choose: (next: boolean) => setChosen({ family, key: next ? key : null }) })),
    [family],
  );
  return (
    <BenchForm schema={prescriptionSchema} select={select} label={`Prescription, ${prescription.name}`} onEdit={onEdit}>
      <div className="flex items-baseline justify-between gap-4 px-4 pt-3 pb-1">
        <h2 className="text-sm font-semibold tracking-wider text-ink-soft uppercase">Prescription</h2>
        <Source source={source} protocol={protocol} prescription={prescription} />
      </div>
      {groups.map(({ key, choose }) => {
        const Group = GROUPS[key];
        return <Group key={key} prescription={prescription} open={open === key} onOpenChange={choose} />;
      })}
    </BenchForm>
  );
}
