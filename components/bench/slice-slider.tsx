'use client';

import { Slider } from '@/components/ui/slider';
import type { Prescription } from '@/lib/physics/model/prescription';
import { withMinus } from '@/lib/presentation/round';
import { useBench } from './bench-context';

/** Which slice of the stack, or partition of the slab, is shown. */
export function SliceSlider({
  prescription,
  slice,
}: {
  prescription: Prescription;
  slice: { readonly index: number; readonly count: number; readonly offsetMm: number };
}) {
  const { store } = useBench();
  if (slice.count < 2) return null;
  const noun = prescription.slices.mode === 'slab' ? 'Partition' : 'Slice';
  const offset = withMinus(String(Math.round(slice.offsetMm)));
  return (
    <div className="flex items-center gap-4">
      <p className="flex-none text-ink-soft">
        {noun} <span className="figures text-ink">{slice.index + 1}</span> of <span className="figures">{slice.count}</span> ·{' '}
        <span className="figures">{offset} mm</span>
      </p>
      <Slider
        label={`${noun} shown`}
        value={slice.index + 1}
        min={1}
        max={slice.count}
        onChange={(value) => store.dispatch({ type: 'choose-slice', index: value - 1 })}
        className="min-w-24"
      />
    </div>
  );
}
