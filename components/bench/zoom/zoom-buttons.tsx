'use client';

import type { ReactNode } from 'react';
import { MOST_ZOOM } from './zoom';
import type { PictureZoom } from './use-zoom';

/** Under the picture, so that they cover nothing of it; the same as the keys + − 0. */
export function ZoomButtons({ zoom, zoomIn, zoomOut, whole }: Pick<PictureZoom, 'zoom' | 'zoomIn' | 'zoomOut' | 'whole'>) {
  const { factor } = zoom;
  return (
    <div className="flex flex-none rounded border border-line-strong bg-paper" role="group" aria-label="Zoom">
      <ZoomButton name="Zoom out" off={factor <= 1} onPress={zoomOut}>
        <path d="M3 8h10" />
      </ZoomButton>
      <button
        type="button"
        aria-label={`Whole picture, now ${Math.round(100 * factor)} %`}
        onClick={whole}
        className="figures h-7 w-14 border-x border-line text-sm hover:bg-sunk"
      >
        {Math.round(100 * factor)} %
      </button>
      <ZoomButton name="Zoom in" off={factor >= MOST_ZOOM} onPress={zoomIn}>
        <path d="M3 8h10M8 3v10" />
      </ZoomButton>
    </div>
  );
}

function ZoomButton({ name, off, onPress, children }: { name: string; off: boolean; onPress: () => void; children: ReactNode }) {
  return (
    // Not disabled at its end: the focus would be lost under the finger.
    <button
      type="button"
      aria-label={name}
      aria-disabled={off}
      onClick={() => !off && onPress()}
      className="grid size-7 place-items-center hover:bg-sunk aria-disabled:text-ink-soft aria-disabled:opacity-60"
    >
      <svg viewBox="0 0 16 16" aria-hidden="true" className="size-4 fill-none stroke-current stroke-[1.5]">
        {children}
      </svg>
    </button>
  );
}
