'use client';

import { useMemo, useRef, useState, type PointerEvent } from 'react';
import { useBoxSize } from '@/components/schematic/canvas/use-box-size';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { pictureScene } from '@/components/schematic/scene/picture-scene';
import { fitScene, fromPixels, toPixels } from '@/components/schematic/scene/scene';
import { Slider } from '@/components/ui/slider';
import { describePicture } from '@/lib/presentation/describe-picture';
import { useActiveResult, useBenchState } from '../bench-context';
import { SliceSlider } from '../slice-slider';
import { shownSlice } from '../state/slices';
import { PictureBox } from '../zoom/picture-box';
import { useZoom } from '../zoom/use-zoom';
import { ViewBar } from '../zoom/view-bar';
import { GreyCanvas } from './grey-canvas';
import { pictureBounds, pictureBox } from './picture-layout';
import { usePictures } from './use-pictures';

/** As near as this to the line between now and tried it is taken hold of, pixels: a finger's half. */
const LINE_PX = 22;

/** A simulated picture of the slice shown; with something tried, a wipe between now and tried. */
export function PictureView() {
  const { question, assessment } = useActiveResult();
  const remedy = useBenchState((state) => state.trial?.remedy);
  const chosen = useBenchState((state) => state.sliceIndex[state.activeId]);
  const slice = shownSlice(question.prescription, chosen);
  const { answer, waiting } = usePictures(remedy, slice.offsetMm);
  const [wipe, setWipe] = useState(50);
  const wiping = useRef(false);
  const box = useRef<HTMLDivElement>(null);
  const size = useBoxSize(box);

  const now = answer && !('refusal' in answer.result.now) ? answer.result.now : null;
  const tried = answer?.result.tried && !('refusal' in answer.result.tried) ? answer.result.tried : null;
  const refusal = answer && 'refusal' in answer.result.now ? answer.result.now.refusal : undefined;
  // Pictures are laid out by the prescriptions they were made from, not by newer ones that are still being painted.
  const shownNow = answer?.job.now.question.prescription;
  const shownTried = tried ? answer?.job.tried?.question.prescription : undefined;
  const keepClear = answer?.job.now.question.keepClear;

  const bounds = useMemo(() => shownNow && pictureBounds(shownNow, shownTried), [shownNow, shownTried]);
  const fitted = useMemo(() => (size && bounds ? fitScene(bounds, size.widthPx, size.heightPx) : null), [size, bounds]);
  const zoomed = useZoom(box, fitted, size);
  const { fit } = zoomed;
  const layout = useMemo(() => {
    if (!size || !fit || !bounds || !shownNow || !keepClear) return null;
    const [left, top] = fromPixels(fit, [0, 0]);
    const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
    const wipeAt = bounds.left + ((bounds.right - bounds.left) * wipe) / 100;
    const boxes = { now: pictureBox(shownNow), ...(shownTried ? { tried: pictureBox(shownTried) } : {}) };
    const visible = { left, top, right, bottom };
    const scene = pictureScene({ prescription: shownNow, keepClear, ...boxes, ...(shownTried ? { wipeAt } : {}), bounds: visible, mmPerPx: 1 / fit.scale });
    return { fit, bounds, wipeAt, boxes, scene };
  }, [size, fit, bounds, shownNow, shownTried, keepClear, wipe]);

  const wipeTo = (event: PointerEvent<HTMLDivElement>) => {
    if (!layout || !wiping.current || event.buttons === 0) return;
    const edge = event.currentTarget.getBoundingClientRect();
    const [u] = fromPixels(layout.fit, [event.clientX - edge.left, 0]);
    const { left, right } = layout.bounds;
    setWipe(Math.min(100, Math.max(0, Math.round(((u - left) / (right - left)) * 100))));
  };
  /** The whole picture is wiped wherever it is taken hold of; of an enlarged one only the line, its ground moves it. */
  const takeWipe = (event: PointerEvent<HTMLDivElement>): boolean => {
    wiping.current = false;
    if (!layout || !tried || event.button !== 0 || !event.isPrimary) return false;
    const whole = zoomed.zoom.factor === 1;
    const edge = event.currentTarget.getBoundingClientRect();
    const [x] = toPixels(layout.fit, [layout.wipeAt, 0]);
    if (!whole && Math.abs(event.clientX - edge.left - x) > LINE_PX) return false;
    wiping.current = true;
    wipeTo(event);
    // A finger on the whole picture may be the first of two that pinch.
    if (whole && event.pointerType !== 'mouse') return false;
    event.currentTarget.setPointerCapture(event.pointerId);
    return true;
  };
  const words = describePicture(assessment, remedy?.assessment);
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      <PictureBox
        box={box}
        picture={zoomed}
        label="Simulated picture"
        describedBy="picture-in-words"
        busy={waiting}
        onPointerDown={takeWipe}
        onPointerMove={wipeTo}
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
      </PictureBox>
      <ViewBar picture={zoomed}>
        <div className="flex flex-wrap gap-x-5">
          {tried && (
            <div className="flex min-w-44 flex-1 items-center gap-4">
              <p className="flex-none text-ink-soft">
                Wipe <span className="figures text-ink">{wipe} %</span>
              </p>
              <Slider label="Wipe between now and tried" unit="%" value={wipe} min={0} max={100} onChange={setWipe} className="min-w-24" />
            </div>
          )}
          <div className="min-w-56 flex-1">
            <SliceSlider prescription={question.prescription} slice={slice} />
          </div>
        </div>
      </ViewBar>
      <p id="picture-in-words" className="px-5 pb-2 text-sm text-ink-soft">
        {words[0]}
        {!tried && ' Try a remedy to lay its picture beside this one.'}
      </p>
    </div>
  );
}
