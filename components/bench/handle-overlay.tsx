'use client';

import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import type { BoxSize } from '@/components/schematic/canvas/use-box-size';
import { fromPixels, toPixels, type Fit } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { cx } from '@/components/ui/class-names';
import { useBench } from './bench-context';
import { usePlaced } from './use-placed';
import { moveHandle, nudgeHandle, type BenchHandle } from './state/handles';

const ARROWS: Readonly<Record<string, ScreenPoint>> = {
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
};

let gestures = 0;

/**
 * What is taken hold of lies over the canvas as elements of the page: it can be focused, named and stepped by key,
 * and is large enough for a finger, while the canvas only paints.
 */
export function HandleOverlay({
  handles,
  fit,
  size,
  onHold,
}: {
  handles: readonly BenchHandle[];
  fit: Fit;
  size: BoxSize;
  onHold: (id: string | null) => void;
}) {
  return handles.map((handle) => <Handle key={handle.id} handle={handle} fit={fit} size={size} onHold={onHold} />);
}

function Handle({ handle, fit, size, onHold }: { handle: BenchHandle; fit: Fit; size: BoxSize; onHold: (id: string | null) => void }) {
  const { store, setting } = useBench();
  const grab = useRef<{ offset: ScreenPoint; step: string } | null>(null);
  const keyStep = useRef('');
  const [x, y] = toPixels(fit, handle.at);
  const placed = usePlaced<HTMLDivElement>(x, y);

  const pointAt = (event: PointerEvent<HTMLElement>): ScreenPoint => {
    const box = event.currentTarget.parentElement!.getBoundingClientRect();
    return fromPixels(fit, [event.clientX - box.left, event.clientY - box.top]);
  };
  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    if (event.button !== 0) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    const [u, v] = pointAt(event);
    grab.current = { offset: [handle.at[0] - u, handle.at[1] - v], step: `drag ${(gestures += 1)}` };
    onHold(handle.id);
  };
  const onPointerMove = (event: PointerEvent<HTMLElement>) => {
    if (!grab.current) return;
    const [u, v] = pointAt(event);
    const { offset, step } = grab.current;
    const action = moveHandle(store.read(), setting, handle.id, [u + offset[0], v + offset[1]], step);
    if (action) store.dispatch(action);
  };
  const release = () => {
    if (!grab.current) return;
    grab.current = null;
    store.dispatch({ type: 'settle' });
    onHold(null);
  };
  const onKeyDown = (event: KeyboardEvent<HTMLElement>) => {
    const arrow = ARROWS[event.key];
    // With a modifier the arrows move the picture, not what lies on it.
    if (!arrow || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    const by = event.shiftKey ? 10 : 1;
    keyStep.current ||= `keys ${(gestures += 1)}`;
    const action = nudgeHandle(store.read(), setting, handle.id, [arrow[0] * by, arrow[1] * by], keyStep.current);
    if (action) store.dispatch(action);
  };
  const vertical = handle.along && Math.abs(handle.along[1]) > Math.abs(handle.along[0]);
  const cursor = handle.kind === 'fov-rotation' ? 'cursor-grab' : !handle.along ? 'cursor-move' : vertical ? 'cursor-ns-resize' : 'cursor-ew-resize';
  const slider = handle.value && {
    role: 'slider',
    'aria-valuenow': Math.round(handle.value.now),
    'aria-valuemin': handle.value.min,
    'aria-valuemax': handle.value.max,
    'aria-valuetext': handle.figure,
    'aria-orientation': vertical ? ('vertical' as const) : ('horizontal' as const),
  };
  return (
    <div
      ref={placed}
      {...(slider ?? { role: 'button', 'aria-description': 'Arrow keys move it 1 mm, with Shift 10 mm' })}
      tabIndex={0}
      aria-label={slider ? handle.label : `${handle.label}, ${handle.figure}`}
      data-handle={handle.id}
      onPointerDown={onPointerDown}
      onPointerMove={onPointerMove}
      onPointerUp={release}
      onPointerCancel={release}
      onKeyDown={onKeyDown}
      onBlur={() => {
        keyStep.current = '';
        store.dispatch({ type: 'settle' });
      }}
      className={cx('group absolute -m-3 size-6 touch-none rounded-sm outline-offset-0', cursor)}
    >
      <span
        className={cx(
          'figures pointer-events-none absolute z-10 hidden rounded bg-ink px-2 py-0.5 text-sm whitespace-nowrap text-paper group-hover:block group-focus:block',
          // Away from the nearer edges of the picture, which cuts off what lies over them.
          x > size.widthPx / 2 ? 'right-4' : 'left-4',
          y > size.heightPx / 2 ? 'bottom-5' : 'top-5',
        )}
      >
        {handle.figure}
      </span>
    </div>
  );
}
