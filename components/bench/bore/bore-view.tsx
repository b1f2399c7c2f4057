'use client';

import { useMemo, useRef, useState } from 'react';
import { SceneCanvas } from '@/components/schematic/canvas/scene-canvas';
import { useBoxSize } from '@/components/schematic/canvas/use-box-size';
import { boreBounds, boreScene } from '@/components/schematic/scene/bore-scene';
import { fitScene, fromPixels } from '@/components/schematic/scene/scene';
import { checkBore, type BoreCheck } from '@/lib/physics/bore/check-bore';
import type { Patient } from '@/lib/physics/model/patient';
import type { Scanner } from '@/lib/physics/model/scanner';
import { describeBasis, describeClearance, describeSections, WHO_DECIDES } from '@/lib/presentation/describe-bore';
import { useActiveResult, useBench, useBenchState } from '../bench-context';
import { PlainNumber } from '../bench-number';
import { HandleOverlay } from '../handle-overlay';
import { boreHandles, LATERAL_MAX_MM } from '../state/handles';
import { PictureBox } from '../zoom/picture-box';
import { useZoom } from '../zoom/use-zoom';
import { ViewBar } from '../zoom/view-bar';

const PAD_MAX_MM = 150;

/** The patient in this scanner's opening, and the smallest clearance where it is. */
export function BoreView() {
  const { store } = useBench();
  const { question } = useActiveResult();
  const { scanner, policy } = question;
  const trial = useBenchState((state) => state.trial);
  // A tried remedy may raise the arms, which changes what lies in the bore.
  const patient = useMemo(
    () => (trial ? { ...question.patient, arms: { ...question.patient.arms, position: trial.remedy.arms } } : question.patient),
    [question.patient, trial],
  );
  const [padMm, setPadMm] = useState(0);
  const box = useRef<HTMLDivElement>(null);
  const size = useBoxSize(box);
  const check = useMemo(() => boreOf(patient, scanner, padMm), [patient, scanner, padMm]);
  const handles = useMemo(() => boreHandles({ patient, scanner }), [patient, scanner]);

  const whole = useMemo(() => size && fitScene(boreBounds(scanner), size.widthPx, size.heightPx), [size, scanner]);
  const zoomed = useZoom(box, whole, size);
  const { fit } = zoomed;
  const picture = useMemo(() => {
    if (!size || !fit || typeof check === 'string') return null;
    const [left, top] = fromPixels(fit, [0, 0]);
    const [right, bottom] = fromPixels(fit, [size.widthPx, size.heightPx]);
    const bounds = { left, top, right, bottom };
    return { fit, scene: boreScene({ check, scanner, patient, padMm, bounds, mmPerPx: 1 / fit.scale, handles }) };
  }, [size, fit, check, scanner, patient, padMm, handles]);

  const setOffset = (value: number | null, step: string) => {
    if (value === null || !Number.isFinite(value) || Math.abs(value) > LATERAL_MAX_MM) return;
    store.dispatch({ type: 'edit-patient', patch: { lateralOffsetMm: value }, step });
  };
  return (
    <div className="flex min-h-0 flex-1 flex-col xl:flex-row">
      <div className="flex min-h-0 min-w-0 flex-col xl:flex-1">
        <PictureBox box={box} picture={zoomed} label={`Opening of ${scanner.name}, seen along the bore`} describedBy="bore-in-words">
          {picture && size && (
            <>
              <SceneCanvas name="bore" scene={picture.scene} fit={picture.fit} {...size} still />
              <HandleOverlay handles={handles} fit={picture.fit} size={size} onHold={() => {}} />
            </>
          )}
        </PictureBox>
        <ViewBar picture={zoomed} />
      </div>
      {typeof check === 'string' ? (
        <p className="px-5 py-3 xl:w-72 xl:flex-none">A value needs another look: {check}</p>
      ) : (
        <div id="bore-in-words" className="relative px-5 py-3 text-sm text-ink-soft xl:w-72 xl:flex-none xl:overflow-y-auto">
          <div aria-live="polite">
            {describeClearance(check, policy.sureAt).map((line) => (
              <p key={line} className="text-base font-medium text-ink">
                {line}
              </p>
            ))}
          </div>
          <p className="mt-1 text-ink">{WHO_DECIDES}</p>
          <div className="my-2 grid max-w-md grid-cols-2 gap-x-6 xl:grid-cols-1">
            <PlainNumber
              label="Patient to the left"
              name="lateralOffsetMm"
              unit="mm"
              value={question.patient.lateralOffsetMm}
              min={-LATERAL_MAX_MM}
              max={LATERAL_MAX_MM}
              sliderMin={-100}
              sliderMax={100}
              onEdit={setOffset}
            />
            <PlainNumber
              label="Pad tried, compressed"
              name="padMm"
              unit="mm"
              value={padMm}
              min={0}
              max={PAD_MAX_MM}
              sliderMax={60}
              onEdit={(value) => value !== null && value >= 0 && value <= PAD_MAX_MM && setPadMm(value)}
            />
          </div>
          <ul className="space-y-1">
            {[...describeSections(check), ...describeBasis(check)].map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        </div>
      )}
    </div>
  );
}

/** The check, or why it cannot be asked. */
function boreOf(patient: Patient, scanner: Scanner, padMm: number): BoreCheck | string {
  try {
    return checkBore(patient, scanner, { padMm });
  } catch (error) {
    if (error instanceof Error && error.name === 'DomainError') return error.message;
    throw error;
  }
}
