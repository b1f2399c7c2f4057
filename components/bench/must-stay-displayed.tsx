'use client';

import { Checkbox } from '@/components/ui/choice';
import type { Side } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import { useBench } from './bench-context';
import { PAIR_CLASS } from './bench-number';
import { BoxEdges } from './box-edges';
import { sequenceById } from './state/bench-document';
import { windowBox } from './state/window-box';

/** Anatomy that no remedy may push out of the picture; without it the keep-clear area alone has to stay in. */
export function MustStayDisplayed({ keepClear, sides }: { keepClear: KeepClear; sides: readonly Side[] }) {
  const { store } = useBench();
  const box = keepClear.mustStayDisplayed;
  const edit = (next: KeepClear, step?: string) =>
    store.dispatch({ type: 'edit-keep-clear', keepClear: next, ...(step === undefined ? {} : { step }) });
  const begin = () => {
    const { document, activeId } = store.read();
    const { area } = keepClear;
    return area.kind === 'box' ? area.box : windowBox(sequenceById(document, activeId).prescription);
  };
  return (
    <div className="mt-3 border-t border-line pt-2 text-sm" data-field="mustStayDisplayed">
      <Checkbox
        label="More must stay displayed"
        hint={box ? undefined : 'Not set: the keep-clear area alone must stay in the picture.'}
        checked={box !== undefined}
        onChange={(event) => {
          const { mustStayDisplayed: _, ...rest } = keepClear;
          edit(event.target.checked ? { ...rest, mustStayDisplayed: begin() } : rest);
        }}
      />
      {box && (
        <fieldset>
          <legend className="sr-only">Must stay displayed</legend>
          <div className={`mt-1 text-base ${PAIR_CLASS}`}>
            <BoxEdges name="must-stay" box={box} sides={sides} onEdit={(next, step) => edit({ ...keepClear, mustStayDisplayed: next }, step)} />
          </div>
        </fieldset>
      )}
      <Checkbox
        label="The area follows the window when it is recentred"
        checked={keepClear.followsWindow}
        onChange={(event) => edit({ ...keepClear, followsWindow: event.target.checked })}
      />
    </div>
  );
}
