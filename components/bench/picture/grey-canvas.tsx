'use client';

import { useLayoutEffect, useRef } from 'react';
import { toPixels, type Bounds, type Fit } from '@/components/schematic/scene/scene';
import type { GreyPicture } from './painted-picture';

/** One simulated picture where it lies in the body; placed and cut through the CSSOM, as the page's policy asks. */
export function GreyCanvas({
  picture,
  box,
  fit,
  cut,
  name,
}: {
  picture: GreyPicture;
  /** On the screen, mm. */
  box: Bounds;
  fit: Fit;
  /** Only what lies right of this place is shown, mm; absent: all. */
  cut?: number;
  name: 'now' | 'tried';
}) {
  const canvas = useRef<HTMLCanvasElement>(null);
  useLayoutEffect(() => {
    const context = canvas.current?.getContext('2d');
    if (!context) return;
    const { widthPx, heightPx, levels } = picture;
    const pixels = context.createImageData(widthPx, heightPx);
    levels.forEach((level, i) => {
      pixels.data[4 * i] = pixels.data[4 * i + 1] = pixels.data[4 * i + 2] = level;
      pixels.data[4 * i + 3] = 255;
    });
    context.putImageData(pixels, 0, 0);
  }, [picture]);
  useLayoutEffect(() => {
    const style = canvas.current?.style;
    if (!style) return;
    const [left, top] = toPixels(fit, [box.left, box.top]);
    const [right, bottom] = toPixels(fit, [box.right, box.bottom]);
    style.setProperty('left', `${left}px`);
    style.setProperty('top', `${top}px`);
    style.setProperty('width', `${right - left}px`);
    style.setProperty('height', `${bottom - top}px`);
    if (cut === undefined) style.removeProperty('clip-path');
    else style.setProperty('clip-path', `inset(0 0 0 ${Math.max(0, toPixels(fit, [cut, 0])[0] - left)}px)`);
  }, [box, fit, cut]);
  return (
    <canvas
      ref={canvas}
      width={picture.widthPx}
      height={picture.heightPx}
      data-picture={name}
      aria-hidden="true"
      className="absolute"
    />
  );
}
