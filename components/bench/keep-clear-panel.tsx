'use client';

import { useDeferredValue, useMemo } from 'react';
import { Panel } from '@/components/ui/panel';
import { Select } from '@/components/ui/select';
import { sidesOfPlane } from '@/components/schematic/scene/section-frame';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import { useBench, useBenchState } from './bench-context';
import { PAIR_CLASS } from './bench-number';
import { BoxEdges, sidesBeginningWith } from './box-edges';
import { isSameArea, keepClearChoices, OWN } from './keep-clear-choices';
import { MustStayDisplayed } from './must-stay-displayed';
import { keepClearOf, sequenceById } from './state/bench-document';
import { windowBox } from './state/window-box';

/** What must stay free of fold, fixed in the patient: the whole picture, or a box by its edges from the FOV origin. */
export function KeepClearPanel({ preset, asked }: { preset: KeepClear; asked?: string }) {
  const { store } = useBench();
  const keepClear = useBenchState((state) => keepClearOf(state.document, sequenceById(state.document, state.activeId)));
  const frozen = useBenchState((state) => sequenceById(state.document, state.activeId).frozenKeepClear !== undefined);
  const plane = useBenchState((state) => sequenceById(state.document, state.activeId).prescription.plane);
  // Presets follow the body's size; while it is dragged the picture comes first.
  const extents = useDeferredValue(useBenchState((state) => state.document.patient.extents));
  const region = useBenchState((state) => state.document.patient.region);
  const { area } = keepClear;
  const edit = (next: KeepClear['area'], step?: string) =>
    store.dispatch({ type: 'edit-keep-clear', keepClear: { ...keepClear, area: next }, ...(step === undefined ? {} : { step }) });
  const choices = useMemo(() => keepClearChoices(preset, { extents, region }, asked !== undefined), [preset, extents, region, asked]);
  const chosen = choices.find((choice) => isSameArea(choice.area, area))?.value ?? OWN;
  const sides = sidesBeginningWith(sidesOfPlane(plane));
  return (
    <Panel tone="bench" collapsible title="Keep-clear area" summary={area.kind === 'box' ? (area.label ?? 'own box') : 'whole picture'}>
      <Select
        compact
        label="What must stay free of fold"
        labelHidden
        value={chosen}
        options={[...choices, { value: OWN, label: 'Own box' }]}
        onChange={({ target: { value } }) => {
          const choice = choices.find((each) => each.value === value);
          if (choice) return edit(choice.area);
          const { document, activeId } = store.read();
          const box = area.kind === 'box' ? area.box : windowBox(sequenceById(document, activeId).prescription);
          edit({ kind: 'box', box, label: 'own box' });
        }}
      />
      {asked && <p className="mt-1 text-sm text-ink-soft">{asked}{chosen !== 'start' && ' The plan holds another area.'}</p>}
      {area.kind === 'box' ? (
        <div className={`mt-2 ${PAIR_CLASS}`}>
          <BoxEdges name="keep-clear" box={area.box} sides={sides} onEdit={(box, step) => edit({ kind: 'box', box, label: 'own box' }, step)} />
        </div>
      ) : (
        <p className="mt-2 text-sm text-ink-soft">All that is displayed must stay free of fold.</p>
      )}
      {frozen && (
        <p className="mt-1 text-sm text-ink-soft">
          Stays what the picture was before its window changed, for this sequence alone.
        </p>
      )}
      <MustStayDisplayed keepClear={keepClear} sides={sides} />
    </Panel>
  );
}
