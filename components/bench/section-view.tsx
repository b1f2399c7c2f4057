'use client';

import { memo, useDeferredValue, useMemo, useRef, useState, type PointerEvent } from 'react';
import { SceneCanvas } from '@/components/schematic/canvas/scene-canvas';
import { useBoxSize } from '@/components/schematic/canvas/use-box-size';
import { fitScene, fromPixels, type Fit } from '@/components/schematic/scene/scene';
import { screenFrame } from '@/components/schematic/scene/section-frame';
import { sectionBounds, sectionScene, type DrawnSection } from '@/components/schematic/scene/section-scene';
import { geometryCase } from '@/lib/physics/assess/assess';
import type { Assessment } from '@/lib/physics/model/assessment';
import { drawSection } from '@/lib/physics/section/draw-section';
import type { Case } from '@/lib/physics/model/case';
import type { SectionDrawing } from '@/lib/physics/section/section-drawing';
import { describeSection, describePlace } from '@/lib/presentation/describe-section';
import { useActiveResult, useActiveSequence, useBenchState } from './bench-context';
import { HandleOverlay } from './handle-overlay';
import { PieceOverlay } from './piece-overlay';
import { SliceSlider } from './slice-slider';
import { triedCase } from './state/case-of';
import { benchHandles } from './state/handles';
import { shownSlice } from './state/slices';
import { PictureBox } from './zoom/picture-box';
import { useZoom } from './zoom/use-zoom';
import { ViewBar } from './zoom/view-bar';

/** The section of the active sequence: where tissue is and where it lands, now and with what is tried. */
export function SectionView() {
  const { question, assessment } = useActiveResult();
  const sequence = useActiveSequence();
  const trial = useBenchState((state) => state.trial);
  const chosen = useBenchState((state) => state.sliceIndex[state.activeId]);
  const handles = useMemo(() => benchHandles(question), [question]);
  const box = useRef<HTMLDivElement>(null);
  const place = useRef<HTMLParagraphElement>(null);
  const size = useBoxSize(box);
  const [focus, setFocus] = useState<string | undefined>(undefined);
  // The picture keeps its scale while a handle is held: what is dragged must stay under the pointer.
  const [heldFit, setHeldFit] = useState<Fit | null>(null);
  const slice = shownSlice(question.prescription, chosen);

  const now = useMemo(() => drawn(question, slice.offsetMm), [question, slice.offsetMm]);
  const tried = useMemo(() => {
    if (!trial || trial.sequenceId !== sequence.id) return undefined;
    return drawn(triedCase(question, trial.remedy), slice.offsetMm);
  }, [trial, question, sequence.id, slice.offsetMm]);

  const fitNow = useMemo(() => (size && now ? fitScene(sectionBounds(now, tried), size.widthPx, size.heightPx) : null), [size, now, tried]);
  const picture = useZoom(box, heldFit ?? fitNow, size);
  const { fit } = picture;

  const scene = useMemo(() => {
    if (!fit || !now) return null;
    const bounds = visibleBounds(fit, size!.widthPx, size!.heightPx);
    return sectionScene({ ...now, ...(tried ? { tried } : {}), bounds, focus, handles, mmPerPx: 1 / fit.scale });
  }, [fit, size, now, tried, focus, handles]);

  const shown = tried ?? now;
  // Written past React: it changes with every pixel.
  const onPointerMove = (event: PointerEvent<HTMLDivElement>) => {
    if (!place.current || !fit) return;
    const edge = event.currentTarget.getBoundingClientRect();
    const [u, v] = fromPixels(fit, [event.clientX - edge.left, event.clientY - edge.top]);
    place.current.textContent = describePlace(u, v, screenFrame(question.prescription).sides);
  };
  return (
    <div className="flex min-h-0 flex-1 flex-col">
      <PictureBox
        box={box}
        picture={picture}
        label={`Section, ${question.prescription.plane}`}
        describedBy="section-in-words"
        onPointerMove={onPointerMove}
        onPointerLeave={() => place.current && (place.current.textContent = '')}
      >
        {scene && fit && size && (
          <>
            <SceneCanvas name="section" scene={scene} fit={fit} {...size} still={heldFit !== null} onHover={(name) => setFocus(name ?? undefined)} />
            <PieceOverlay drawing={shown!.drawing} prescription={question.prescription} fit={fit} onFocus={setFocus} />
            <HandleOverlay handles={handles} fit={fit} size={size} onHold={(id) => setHeldFit(id === null ? null : fitNow)} />
            <p ref={place} aria-hidden="true" className="figures pointer-events-none absolute top-1 left-2 text-sm text-ink-soft" />
          </>
        )}
        {!now && <p className="p-4 text-ink-soft">The picture follows as soon as every value is allowed.</p>}
      </PictureBox>
      <ViewBar picture={picture}>
        <SliceSlider prescription={question.prescription} slice={slice} />
      </ViewBar>
      <SectionWords drawing={shown?.drawing} assessment={assessment} />
    </div>
  );
}

/** The picture in words, for whoever does not see it. */
const SectionWords = memo(function SectionWords(shown: { drawing: SectionDrawing | undefined; assessment: Assessment | undefined }) {
  // Nobody reads along while a handle is held: the words come when there is time for them, and make nothing else wait.
  const drawing = useDeferredValue(shown.drawing);
  const assessment = useDeferredValue(shown.assessment);
  return <WordList drawing={drawing} assessment={assessment} />;
});

const WordList = memo(function WordList({ drawing, assessment }: { drawing: SectionDrawing | undefined; assessment: Assessment | undefined }) {
  // Displaced fat, and each multiple of a ghost, are pieces of their own that the same words may tell.
  const lines = drawing && assessment ? [...new Set(describeSection(drawing, assessment.phaseAxis, assessment.readoutAxis))] : [];
  return (
    <div id="section-in-words" className="sr-only" aria-live="off">
      {lines.length > 0 && (
        <ul>
          {lines.map((line, i) => (
            <li key={i}>{line}</li>
          ))}
        </ul>
      )}
    </div>
  );
});

/** What the engine refuses to assess cannot be drawn either; the refusal is told beside the verdict. */
function drawn(question: Case, sliceOffsetMm: number): DrawnSection | undefined {
  try {
    const drawing = drawSection(geometryCase(question), { sliceOffsetMm });
    return { question, drawing, asGiven: drawSection(question, { sliceOffsetMm }).tissue };
  } catch (error) {
    if (error instanceof Error && error.name === 'DomainError') return undefined;
    throw error;
  }
}

/** The whole canvas in mm: letters and scale bar sit in its corners, whatever its shape. */
function visibleBounds(fit: Fit, widthPx: number, heightPx: number) {
  const [left, top] = fromPixels(fit, [0, 0]);
  const [right, bottom] = fromPixels(fit, [widthPx, heightPx]);
  return { left, top, right, bottom };
}
