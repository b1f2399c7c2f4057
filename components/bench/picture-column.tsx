'use client';

import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/choice';
import { useActiveResult, useBench, useBenchState } from './bench-context';
import { BoreView } from './bore/bore-view';
import { ProbabilityLine } from './certainty/probability-line';
import { KeyHelp } from './key-help';
import { PictureView } from './picture/picture-view';
import { SectionView } from './section-view';
import { SlabView } from './slab-view';
import type { BenchView } from './state/bench-state';

/** The views of one state, with undo and redo beside them. */
export function PictureColumn() {
  const { store } = useBench();
  const chosen = useBenchState((state) => state.view);
  const canUndo = useBenchState((state) => state.past.length > 0);
  const canRedo = useBenchState((state) => state.future.length > 0);
  const slab = useActiveResult().assessment?.slab;
  const view: BenchView = chosen === 'slab' && !slab ? 'section' : chosen;
  return (
    <>
      <ProbabilityLine />
      <div className="flex items-center justify-between gap-4 px-5">
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
        <div className="flex gap-1">
          <Button variant="quiet" size="sm" disabled={!canUndo} onClick={() => store.dispatch({ type: 'undo' })}>
            Undo
          </Button>
          <Button variant="quiet" size="sm" disabled={!canRedo} onClick={() => store.dispatch({ type: 'redo' })}>
            Redo
          </Button>
          <KeyHelp />
        </div>
      </div>
      {view === 'slab' && slab && <SlabView slab={slab} />}
      {view === 'section' && <SectionView />}
      {view === 'picture' && <PictureView />}
      {view === 'bore' && <BoreView />}
    </>
  );
}
