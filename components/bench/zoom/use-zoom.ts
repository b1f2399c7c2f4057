'use client';

import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type PointerEvent, type RefObject } from 'react';
import type { BoxSize } from '@/components/schematic/canvas/use-box-size';
import type { Fit } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { panBy, WHOLE_PICTURE, ZOOM_STEP, zoomBy, zoomedFit, type Zoom } from './zoom';

/** One press of an arrow key with Ctrl, pixels. */
const PAN_PX = 40;
const ARROWS: Readonly<Record<string, ScreenPoint>> = {
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
  ArrowLeft: [1, 0],
  ArrowRight: [-1, 0],
};

export interface PictureZoom {
  readonly fit: Fit | null;
  readonly zoom: Zoom;
  readonly zoomIn: () => void;
  readonly zoomOut: () => void;
  readonly whole: () => void;
  /** For the picture's box: keys, and dragging its ground. */
  readonly boxProps: {
    readonly onKeyDown: (event: KeyboardEvent<HTMLElement>) => void;
    readonly onPointerDown: (event: PointerEvent<HTMLElement>) => void;
    readonly onPointerUp: () => void;
    readonly onPointerCancel: () => void;
  };
  /** True when the move was a pan: whoever follows the pointer has nothing to do then. */
  readonly panned: (event: PointerEvent<HTMLElement>) => boolean;
}

/** Zoom and pan of one picture: wheel, + − 0, Ctrl with arrows, buttons, and dragging the ground when enlarged. */
export function useZoom(box: RefObject<HTMLElement | null>, whole: Fit | null, size: BoxSize | null): PictureZoom {
  const [zoom, setZoom] = useState<Zoom>(WHOLE_PICTURE);
  const grabbed = useRef<ScreenPoint | null>(null);
  const sized = useRef(size);
  useEffect(() => {
    sized.current = size;
  }, [size]);
  const change = (next: (zoom: Zoom, size: BoxSize) => Zoom) =>
    setZoom((now) => (sized.current ? next(now, sized.current) : now));

  // React listens to the wheel passively, which could not keep the page from scrolling with it.
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const onWheel = (event: WheelEvent) => {
      const { scrollHeight, clientHeight } = document.documentElement;
      // Where the page itself scrolls, the wheel is its own unless Ctrl (or a pinch) asks for the picture.
      if (!event.ctrlKey && scrollHeight > clientHeight) return;
      event.preventDefault();
      const edge = element.getBoundingClientRect();
      const at: ScreenPoint = [event.clientX - edge.left, event.clientY - edge.top];
      setZoom((now) => (sized.current ? zoomBy(now, Math.exp(-event.deltaY / 400), sized.current, at) : now));
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    return () => element.removeEventListener('wheel', onWheel);
  }, [box]);

  const fit = useMemo(() => (whole && size ? zoomedFit(whole, zoom, size) : null), [whole, zoom, size]);
  const zoomIn = () => change((now, at) => zoomBy(now, ZOOM_STEP, at));
  const zoomOut = () => change((now, at) => zoomBy(now, 1 / ZOOM_STEP, at));
  const all = () => setZoom(WHOLE_PICTURE);
  const release = () => {
    grabbed.current = null;
  };
  return {
    fit,
    zoom,
    zoomIn,
    zoomOut,
    whole: all,
    boxProps: {
      onKeyDown(event) {
        const arrow = ARROWS[event.key];
        const own = event.ctrlKey || event.metaKey;
        if (arrow && (own || event.target === event.currentTarget)) change((now, at) => panBy(now, [arrow[0] * PAN_PX, arrow[1] * PAN_PX], at));
        else if (own || event.altKey) return;
        else if (event.key === '+' || event.key === '=') zoomIn();
        else if (event.key === '-' || event.key === '−') zoomOut();
        else if (event.key === '0') all();
        else return;
        event.preventDefault();
      },
      onPointerDown(event) {
        // Handles and pieces have the pointer to themselves.
        if (zoom.factor === 1 || event.button !== 0 || !(event.target instanceof HTMLCanvasElement)) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        grabbed.current = [event.clientX, event.clientY];
      },
      onPointerUp: release,
      onPointerCancel: release,
    },
    panned(event) {
      const from = grabbed.current;
      if (!from) return false;
      const to: ScreenPoint = [event.clientX, event.clientY];
      grabbed.current = to;
      change((now, at) => panBy(now, [to[0] - from[0], to[1] - from[1]], at));
      return true;
    },
  };
}
