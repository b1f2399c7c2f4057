'use client';

import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/choice';
import { useActiveResult, useBench, useBenchState } from './bench-context';
import { BoreView } from './bore/bore-view';
import { CertaintyControl } from './certainty/certainty-control';
import { KeyHelp } from './key-help';
import { PictureView } from './picture/picture-view';
import { SectionView } from './section-view';
import { SlabView } from './slab-view';
import type { BenchView } from './state/bench-state';
import { VerdictLine } from './verdict-line';

/** The views of one state under one row of controls and the verdict: the room below is the picture's. */
export function PictureColumn() {
  const { store } = useBench();
  const chosen = useBenchState((state) => state.view);
  const canUndo = useBenchState((state) => state.past.length > 0);
  const canRedo = useBenchState((state) => state.future.length > 0);
  const slab = useActiveResult().assessment?.slab;
  const view: BenchView = chosen === 'slab' && !slab ? 'section' : chosen;
  return (
    <>
      <div className="flex flex-wrap items-center justify-between gap-x-3 gap-y-1 px-5 pt-2.5">
        <Segmented<BenchView>
          size="sm"
          legend="View"
          legendHidden
          value={view}
          options={[
            { value: 'section', label: 'Section' },
            { value: 'slab', label: 'Slab', disabled: !slab },
            { value: 'picture', label: 'Picture' },
            { value: 'bore', label: 'Bore' },
          ]}
          onChange={(next) => store.dispatch({ type: 'choose-view', view: next })}
        />
        <div className="flex flex-wrap items-center max-sm:-ml-2">
          <Button variant="quiet" size="sm" className="px-2!" disabled={!canUndo} onClick={() => store.dispatch({ type: 'undo' })}>
            Undo
          </Button>
          <Button variant="quiet" size="sm" className="px-2!" disabled={!canRedo} onClick={() => store.dispatch({ type: 'redo' })}>
            Redo
          </Button>
          <KeyHelp />
          <CertaintyControl />
        </div>
      </div>
      <VerdictLine className="max-lg:hidden" />
      {view === 'slab' && slab && <SlabView slab={slab} />}
      {view === 'section' && <SectionView />}
      {view === 'picture' && <PictureView />}
      {view === 'bore' && <BoreView />}
    </>
  );
}
