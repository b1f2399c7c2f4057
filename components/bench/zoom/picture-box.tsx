'use client';

import type { PointerEvent, ReactNode, RefObject } from 'react';
import { cx } from '@/components/ui/class-names';
import type { PictureZoom } from './use-zoom';

/** As high as the column leaves it; where the page scrolls instead, of one height in every view. */
const BOX = 'relative h-80 overflow-hidden -outline-offset-2 select-none sm:h-[26rem] lg:h-96 xl:h-auto xl:min-h-80 xl:flex-1';

/** The box of a picture that can be zoomed and moved, by pointer, fingers and keys. */
export function PictureBox({
  box,
  picture,
  label,
  describedBy,
  busy,
  className,
  children,
  onPointerDown,
  onPointerMove,
  onPointerLeave,
}: {
  box: RefObject<HTMLDivElement | null>;
  picture: PictureZoom;
  label: string;
  describedBy: string;
  busy?: boolean;
  className?: string;
  children: ReactNode;
  /** Comes first; true when it took the pointer for itself. */
  onPointerDown?: (event: PointerEvent<HTMLDivElement>) => boolean;
  /** Moves that are not the picture's own. */
  onPointerMove?: (event: PointerEvent<HTMLDivElement>) => void;
  onPointerLeave?: () => void;
}) {
  const { boxProps, panned, zoom } = picture;
  return (
    <div
      ref={box}
      role="group"
      aria-label={label}
      aria-describedby={describedBy}
      aria-busy={busy}
      tabIndex={0}
      aria-keyshortcuts="+ - 0 Control+ArrowUp Control+ArrowDown Control+ArrowLeft Control+ArrowRight"
      {...boxProps}
      onPointerDown={(event) => {
        if (!onPointerDown?.(event)) boxProps.onPointerDown(event);
      }}
      onPointerMove={(event) => {
        if (!panned(event)) onPointerMove?.(event);
      }}
      onPointerLeave={onPointerLeave}
      className={cx(BOX, zoom.factor === 1 ? 'touch-pan-y' : 'cursor-grab touch-none active:cursor-grabbing', className)}
    >
      {children}
    </div>
  );
}
