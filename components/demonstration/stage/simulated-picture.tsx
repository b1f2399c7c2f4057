'use client';

import { useMemo } from 'react';
import { pictureBounds, pictureBox } from '@/components/bench/picture/picture-layout';
import { pictureScene } from '@/components/schematic/scene/picture-scene';
import { fitScene, toPixels } from '@/components/schematic/scene/scene';
import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { cx } from '@/components/ui/class-names';
import type { Case } from '@/lib/physics/model/case';
import { greyImageHref } from './grey-image';
import { useSimulated } from './picture-engine';
import type { Size } from './shown-scene';

/** The simulated picture of one slice or partition, painted as SVG, with letters and the keep-clear area over it. */
export function SimulatedPicture({
  question,
  sliceOffsetMm,
  size,
  label,
  sizePx = 256,
  className,
}: {
  question: Case;
  sliceOffsetMm: number;
  size: Size;
  label: string;
  sizePx?: number;
  className?: string;
}) {
  const { answer } = useSimulated(question, sliceOffsetMm, sizePx);
  // What is painted belongs to the question it was worked out for, even while a newer one is on its way.
  const shown = answer?.job.question ?? question;
  const { prescription, keepClear } = shown;
  const bounds = useMemo(() => pictureBounds(prescription, undefined), [prescription]);
  const scene = useMemo(() => pictureScene({ prescription, keepClear, now: pictureBox(prescription), bounds }), [prescription, keepClear, bounds]);
  const result = answer?.result;
  const href = useMemo(
    () => (result && !('refusal' in result) ? greyImageHref(result.levels, result.widthPx, result.heightPx) : null),
    [result],
  );
  const fit = fitScene(bounds, size.widthPx, size.heightPx);
  const box = pictureBox(prescription);
  const [left, top] = toPixels(fit, [box.left, box.top]);
  const [right, bottom] = toPixels(fit, [box.right, box.bottom]);
  return (
    <div className={cx('relative', className)} data-simulated={href ? answer?.job.sliceOffsetMm : undefined}>
      <svg viewBox={`0 0 ${size.widthPx} ${size.heightPx}`} aria-hidden="true" className="absolute inset-0 size-full">
        {href && <image href={href} x={left} y={top} width={right - left} height={bottom - top} preserveAspectRatio="none" />}
      </svg>
      <SceneSvg scene={scene} label={label} {...size} className="relative block size-full" />
      {result && 'refusal' in result && <p className="absolute inset-x-4 top-4 text-ink-soft">{result.refusal}</p>}
    </div>
  );
}
