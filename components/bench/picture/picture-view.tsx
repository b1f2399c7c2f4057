'use client';

import { useMemo, useRef, useState, type PointerEvent } from 'react';
import { useBoxSize } from '@/components/schematic/canvas/use-box-size';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { pictureScene } from '@/components/schematic/scene/picture-scene';
import { fitScene, fromPixels } from '@/components/schematic/scene/scene';
import { Slider } from '@/components/ui/slider';
import { describePicture } from '@/lib/presentation/describe-picture';
import { useActiveResult, useBenchState } from '../bench-context';
import { SliceSlider } from '../slice-slider';
import { shownSlice } from '../state/slices';
import { GreyCanvas } from './grey-canvas';
import { pictureBounds, pictureBox } from './picture-layout';
import { usePictures } from './use-pictures';

/** A simulated picture of the slice shown; with something tried, a wipe between now and tried. */
export function PictureView() {
  const { question, assessment } = useActiveResult();
  const remedy = useBenchState((state) => state.trial?.remedy);
  const chosen = useBenchState((state) => state.sliceIndex[state.activeId]);
  const slice = shownSlice(question.prescription, chosen);
  const { answer, waiting } = usePictures(remedy, slice.offsetMm);
  const [wipe, setWipe] = useState(50);
  const box = useRef<HTMLDivElement>(null);
  const size = useBoxSize(box);

  const now = answer && !('refusal' in answer.result.now) ? answer.result.now : null;
  const tried = answer?.result.tried && !('refusal' in answer.result.tried) ? answer.result.tried : null;
  const refusal = answer && 'refusal' in answer.result.now ? answer.result.now.refusal : undefined;
  // Pictures are laid out by the prescriptions they were made from, not by newer ones that are still being painted.
  const shownNow = answer?.job.now.question.prescription;
  const shownTried = tried ? answer?.job.tried?.question.prescription : undefined;
  const keepClear = answer?.job.now.question.keepClear;

  const layout = useMemo(() => {
    if (!size || !shownNow || !keepClear) return null;
    const fit = fitScene(pictureBounds(shownNow, shownTried), size.widthPx, size.heightPx);
    const [left, top] = fromPixels(fit, [0, 0]);
    const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
    const whole = pictureBounds(shownNow, shownTried);
    const wipeAt = whole.left + ((whole.right - whole.left) * wipe) / 100;
    const boxes = { now: pictureBox(shownNow), ...(shownTried ? { tried: pictureBox(shownTried) } : {}) };
    const scene = pictureScene({ prescription: shownNow, keepClear, ...boxes, ...(shownTried ? { wipeAt } : {}), bounds: { left, top, right, bottom } });
    return { fit, whole, wipeAt, boxes, scene };
  }, [size, shownNow, shownTried, keepClear, wipe]);

  const onPointer = (event: PointerEvent<HTMLDivElement>) => {
    if (!layout || !tried || (event.type === 'pointermove' && !event.currentTarget.hasPointerCapture(event.pointerId))) return;
    if (event.type === 'pointerdown') event.currentTarget.setPointerCapture(event.pointerId);
    const edge = event.currentTarget.getBoundingClientRect();
    const [u] = fromPixels(layout.fit, [event.clientX - edge.left, 0]);
    const { left, right } = layout.whole;
    setWipe(Math.min(100, Math.max(0, Math.round(((u - left) / (right - left)) * 100))));
  };
  const words = describePicture(assessment, remedy?.assessment);
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      <div
        ref={box}
        aria-busy={waiting}
        onPointerDown={onPointer}
        onPointerMove={onPointer}
        className="relative h-80 touch-none overflow-hidden select-none sm:h-[26rem] xl:h-auto xl:min-h-72 xl:flex-1"
      >
        {layout && size && now && (
          <>
            <GreyCanvas name="now" picture={now} box={layout.boxes.now} fit={layout.fit} />
            {tried && layout.boxes.tried && <GreyCanvas name="tried" picture={tried} box={layout.boxes.tried} fit={layout.fit} cut={layout.wipeAt} />}
            <SceneSvg scene={layout.scene} label={words.join(' ')} {...size} className="pointer-events-none absolute inset-0 size-full" />
          </>
        )}
        {!now && (
          <p className="p-4 text-ink-soft">
            {refusal ?? (assessment?.detail ? 'Painting the picture.' : 'There is no picture to simulate for this prescription.')}
          </p>
        )}
      </div>
      <div className="flex flex-wrap items-center gap-x-4 px-5 pb-1 text-sm">
        {tried ? (
          <>
            <p className="flex-none text-ink-soft">
              Wipe · now left of it, tried right · <span className="figures text-ink">{wipe} %</span>
            </p>
            <Slider label="Wipe between now and tried" unit="%" value={wipe} min={0} max={100} onChange={setWipe} className="max-w-md min-w-40 flex-1" />
          </>
        ) : (
          <p className="text-ink-soft">Try a remedy to lay its picture beside this one.</p>
        )}
      </div>
      <SliceSlider prescription={question.prescription} slice={slice} />
      <p className="px-5 pb-3 text-sm text-ink-soft">{words[0]}</p>
    </div>
  );
}
