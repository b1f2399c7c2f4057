'use client';

import type { RefObject } from 'react';
import { useBoxSize } from '@/components/schematic/canvas/use-box-size';
import type { Size } from './shown-scene';

/** A note of a scene is 14 units high; on the page it is to be as high as the text around it. */
const NOTE_UNITS = 15;

/** Wider than this the letters of a section stand far from it. */
const WIDEST = 2;

/**
 * Units across a picture that fills its box, so that its letters are as large as the page's text whatever the screen.
 * The size given stands until the box is laid out.
 */
export function usePictureSize(box: RefObject<HTMLElement | null>, before: Size, widest = WIDEST): Size {
  const measured = useBoxSize(box);
  if (!measured || !box.current || measured.heightPx < 40) return before;
  const unitPx = Number.parseFloat(getComputedStyle(box.current).fontSize) / NOTE_UNITS;
  const heightPx = Math.round(measured.heightPx / unitPx);
  return { widthPx: Math.min(Math.round(measured.widthPx / unitPx), Math.round(widest * heightPx)), heightPx };
}
