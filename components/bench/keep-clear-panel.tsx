'use client';

import { Segmented } from '@/components/ui/choice';
import { Panel } from '@/components/ui/panel';
import { sidesOfPlane } from '@/components/schematic/scene/section-frame';
import type { Side } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import { useBench, useBenchState } from './bench-context';
import { PAIR_CLASS, PlainNumber } from './bench-number';
import { keepClearOf, sequenceById } from './state/bench-document';
import { edgeOf, windowBox, withEdge } from './state/window-box';

const NAMES: Readonly<Record<Side, string>> = {
  anterior: 'Anterior', posterior: 'Posterior', right: 'Right', left: 'Left', superior: 'Superior', inferior: 'Inferior',
};

/** What must stay free of fold, fixed in the patient: the whole picture, or a box by its edges from the FOV origin. */
export function KeepClearPanel({ preset, asked }: { preset: KeepClear; asked?: string }) {
  const { store } = useBench();
  const keepClear = useBenchState((state) => keepClearOf(state.document, sequenceById(state.document, state.activeId)));
  const frozen = useBenchState((state) => sequenceById(state.document, state.activeId).frozenKeepClear !== undefined);
  const plane = useBenchState((state) => sequenceById(state.document, state.activeId).prescription.plane);
  const { area } = keepClear;
  const edit = (next: KeepClear['area'], step?: string) =>
    store.dispatch({ type: 'edit-keep-clear', keepClear: { ...keepClear, area: next }, ...(step === undefined ? {} : { step }) });
  const presetLabel = preset.area.kind === 'box' ? (preset.area.label ?? 'preset') : 'whole picture';
  const choices = [
    { value: 'preset', label: capital(presetLabel) },
    ...(preset.area.kind === 'box' ? [{ value: 'whole-picture', label: 'Whole picture' }] : []),
    { value: 'own', label: 'Own box' },
  ];
  const chosen = isSame(area, preset.area) ? 'preset' : area.kind === 'whole-picture' ? 'whole-picture' : 'own';
  const inPlane = sidesOfPlane(plane);
  const sides = [...inPlane, ...(Object.keys(NAMES) as Side[]).filter((side) => !inPlane.includes(side))];
  return (
    <Panel tone="bench" collapsible title="Keep-clear area" summary={area.kind === 'box' ? (area.label ?? 'own box') : 'whole picture'}>
      <Segmented
        size="sm"
        legend="What must stay free of fold"
        legendHidden
        value={chosen}
        options={choices}
        onChange={(value) => {
          if (value === 'preset') edit(preset.area);
          else if (value === 'whole-picture') edit({ kind: 'whole-picture' });
          else edit({ kind: 'box', box: area.kind === 'box' ? area.box : windowBox(sequenceById(store.read().document, store.read().activeId).prescription), label: 'own box' });
        }}
      />
      {area.kind === 'box' ? (
        <div className={`mt-2 ${PAIR_CLASS}`}>
          {sides.map((side) => (
            <PlainNumber
              key={side}
              name={`keep-clear.${side}`}
              label={NAMES[side]}
              value={Math.round(edgeOf(area.box, side) * 10) / 10}
              unit="mm"
              min={-400}
              max={400}
              onEdit={(value, step) => {
                if (value === null || !Number.isFinite(value) || Math.abs(value) > 400) return;
                edit({ kind: 'box', box: withEdge(area.box, side, value), label: 'own box' }, step);
              }}
            />
          ))}
        </div>
      ) : (
        <p className="mt-2 text-sm text-ink-soft">All that is displayed must stay free of fold.</p>
      )}
      {asked && <p className="mt-1 text-sm text-ink-soft">{asked}</p>}
      {frozen && (
        <p className="mt-1 text-sm text-ink-soft">
          Stays what the picture was before its window changed, for this sequence alone.
        </p>
      )}
    </Panel>
  );
}

function isSame(a: KeepClear['area'], b: KeepClear['area']): boolean {
  if (a.kind !== 'box' || b.kind !== 'box') return a.kind === b.kind;
  return (Object.keys(NAMES) as Side[]).every((side) => edgeOf(a.box, side) === edgeOf(b.box, side));
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
