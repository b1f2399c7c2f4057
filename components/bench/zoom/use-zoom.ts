'use client';

import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type PointerEvent, type RefObject } from 'react';
import type { BoxSize } from '@/components/schematic/canvas/use-box-size';
import type { Fit } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { panBy, pinchBy, WHOLE_PICTURE, ZOOM_STEP, zoomBy, zoomedFit, type Fingers, type Zoom } from './zoom';

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
  /** For the picture's box: keys, one pointer that drags the ground, two that pinch. */
  readonly boxProps: {
    readonly onKeyDown: (event: KeyboardEvent<HTMLElement>) => void;
    readonly onPointerDown: (event: PointerEvent<HTMLElement>) => void;
    readonly onPointerUp: (event: PointerEvent<HTMLElement>) => void;
    readonly onPointerCancel: (event: PointerEvent<HTMLElement>) => void;
  };
  /** True when the move was the picture's own: whoever follows the pointer has nothing to do then. */
  readonly panned: (event: PointerEvent<HTMLElement>) => boolean;
}

/**
 * Zoom and pan of one picture, the same in every view: wheel, pinch, + − 0, Ctrl with arrows, buttons, and dragging
 * the ground when enlarged. Handles and other things that lie over the picture keep the pointer to themselves.
 */
export function useZoom(box: RefObject<HTMLElement | null>, whole: Fit | null, size: BoxSize | null): PictureZoom {
  const [zoom, setZoom] = useState<Zoom>(WHOLE_PICTURE);
  const fingers = useRef(new Map<number, ScreenPoint>());
  const sized = useRef(size);
  useEffect(() => {
    sized.current = size;
  }, [size]);
  const change = (next: (zoom: Zoom, size: BoxSize) => Zoom) =>
    setZoom((now) => (sized.current ? next(now, sized.current) : now));

  // React listens to wheel and touch passively, which could not keep the page from scrolling or growing with them.
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
    const onTouchMove = (event: TouchEvent) => {
      if (event.touches.length > 1 && event.cancelable) event.preventDefault();
    };
    element.addEventListener('wheel', onWheel, { passive: false });
    element.addEventListener('touchmove', onTouchMove, { passive: false });
    return () => {
      element.removeEventListener('wheel', onWheel);
      element.removeEventListener('touchmove', onTouchMove);
    };
  }, [box]);

  const fit = useMemo(() => (whole && size ? zoomedFit(whole, zoom, size) : null), [whole, zoom, size]);
  const zoomIn = () => change((now, at) => zoomBy(now, ZOOM_STEP, at));
  const zoomOut = () => change((now, at) => zoomBy(now, 1 / ZOOM_STEP, at));
  const all = () => setZoom(WHOLE_PICTURE);
  const lift = (event: PointerEvent<HTMLElement>) => void fingers.current.delete(event.pointerId);
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
        if (event.button !== 0 || !isGround(event)) return;
        // A third finger is one too many; one that lies there alone has nothing to drag while the picture is whole.
        if (fingers.current.size > 1 || (event.pointerType === 'mouse' && zoom.factor === 1)) return;
        fingers.current.set(event.pointerId, [event.clientX, event.clientY]);
        if (zoom.factor === 1 && fingers.current.size === 1) return;
        for (const id of fingers.current.keys()) event.currentTarget.setPointerCapture(id);
      },
      onPointerUp: lift,
      onPointerCancel: lift,
    },
    panned(event) {
      const before = fingers.current.get(event.pointerId);
      if (!before) return false;
      const from = [...fingers.current.values()];
      fingers.current.set(event.pointerId, [event.clientX, event.clientY]);
      const to = [...fingers.current.values()];
      const edge = event.currentTarget.getBoundingClientRect();
      const inBox = ([x, y]: ScreenPoint): ScreenPoint => [x - edge.left, y - edge.top];
      if (from.length === 2) {
        change((now, at) => pinchBy(now, from.map(inBox) as unknown as Fingers, to.map(inBox) as unknown as Fingers, at));
        return true;
      }
      if (zoom.factor === 1) return false;
      change((now, at) => panBy(now, [event.clientX - before[0], event.clientY - before[1]], at));
      return true;
    },
  };
}

/** The painted picture itself, not something that lies over it to be taken hold of. */
function isGround({ target, currentTarget }: PointerEvent<HTMLElement>): boolean {
  return target === currentTarget || target instanceof HTMLCanvasElement;
}
