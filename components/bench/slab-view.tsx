'use client';

import { useMemo, useRef } from 'react';
import { SceneCanvas } from '@/components/schematic/canvas/scene-canvas';
import { useBoxSize } from '@/components/schematic/canvas/use-box-size';
import { fitScene, fromPixels } from '@/components/schematic/scene/scene';
import { slabBounds, slabScene } from '@/components/schematic/scene/slab-scene';
import { sliceAxisOf } from '@/lib/domain/case/lines';
import type { SlabResult } from '@/lib/physics/model/assessment';
import { AXIS_WORDS } from '@/lib/presentation/anatomy-words';
import { describeSlab } from '@/lib/presentation/describe-slab';
import { phaseOversamplingSetting, sliceOversamplingSetting } from '@/lib/presentation/oversampling-form';
import { useActiveResult, useBenchState } from './bench-context';
import { PictureBox } from './zoom/picture-box';
import { useZoom } from './zoom/use-zoom';
import { ViewBar } from './zoom/view-bar';

/** The slice direction of a 3D sequence, now or as it would be with what is tried. */
export function SlabView({ slab }: { slab: SlabResult }) {
  const { question } = useActiveResult();
  const remedy = useBenchState((state) => state.trial?.remedy);
  const prescription = remedy?.prescription ?? question.prescription;
  const shown = remedy?.assessment.slab ?? slab;
  const box = useRef<HTMLDivElement>(null);
  const size = useBoxSize(box);
  const { slices } = prescription;

  const acquiredSlabMm = slices.mode === 'slab' ? slices.acquiredPartitions * slices.partitionThicknessMm : 0;
  const whole = useMemo(() => size && fitScene(slabBounds(acquiredSlabMm), size.widthPx, size.heightPx), [size, acquiredSlabMm]);
  const zoomed = useZoom(box, whole, size);
  const { fit } = zoomed;
  const picture = useMemo(() => {
    if (!size || !fit || slices.mode !== 'slab') return null;
    const [left, top] = fromPixels(fit, [0, 0]);
    const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
    const scene = slabScene({
      slab: shown,
      sliceAxis: sliceAxisOf(prescription.plane),
      partitionThicknessMm: slices.partitionThicknessMm,
      acquiredSlabMm,
      bounds: { left, top, right, bottom },
      mmPerPx: 1 / fit.scale,
    });
    return { scene, fit };
  }, [size, fit, shown, slices, acquiredSlabMm, prescription.plane]);

  const { scanner } = question;
  const slice = sliceOversamplingSetting(prescription, scanner);
  const phase = phaseOversamplingSetting(prescription, scanner);
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      <PictureBox box={box} picture={zoomed} label="Slab, along the slice direction" describedBy="slab-in-words">
        {picture && size && <SceneCanvas name="slab" {...picture} {...size} still />}
      </PictureBox>
      <ViewBar picture={zoomed}>
        <p className="text-ink-soft">
          Slice oversampling, {AXIS_WORDS[sliceAxisOf(prescription.plane)]}: <span className="figures text-ink">{slice?.value}</span>
          {' · '}phase oversampling, {AXIS_WORDS[prescription.phaseAxis]}: <span className="figures text-ink">{phase.value}</span>
        </p>
      </ViewBar>
      <div id="slab-in-words" className="px-5 pb-3 text-sm text-ink-soft">
        {describeSlab(shown).map((line) => (
          <p key={line}>{line}</p>
        ))}
      </div>
    </div>
  );
}
