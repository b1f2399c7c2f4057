'use client';

import { Button } from '@/components/ui/button';
import { Segmented } from '@/components/ui/choice';
import { useActiveResult, useBench, useBenchState } from './bench-context';
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
  const view: BenchView = slab ? chosen : 'section';
  return (
    <>
      <div className="flex items-center justify-between gap-4 px-5">
        <Segmented<BenchView>
          size="sm"
          legend="View"
          legendHidden
          value={view}
          options={[
            { value: 'section', label: 'Section' },
            { value: 'slab', label: 'Slab', disabled: !slab },
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
        </div>
      </div>
      {view === 'slab' && slab ? <SlabView slab={slab} /> : <SectionView />}
    </>
  );
}
