import type { Fit } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import type { BoxSize } from '@/components/schematic/canvas/use-box-size';

/** How a picture is looked at: times its fitted size, and how far its middle is moved from the box's, pixels. */
export interface Zoom {
  readonly factor: number;
  readonly movedPx: ScreenPoint;
}

/** Where two fingers lie, pixels of the box. */
export type Fingers = readonly [ScreenPoint, ScreenPoint];

export const WHOLE_PICTURE: Zoom = { factor: 1, movedPx: [0, 0] };
export const MOST_ZOOM = 8;
/** One press of a key or button. */
export const ZOOM_STEP = 1.25;

/** The whole picture's fit, enlarged about the middle of its box and moved. */
export function zoomedFit(fit: Fit, { factor, movedPx }: Zoom, { widthPx, heightPx }: BoxSize): Fit {
  return {
    scale: fit.scale * factor,
    x: (fit.x - widthPx / 2) * factor + widthPx / 2 + movedPx[0],
    y: (fit.y - heightPx / 2) * factor + heightPx / 2 + movedPx[1],
  };
}

/** Enlarged by a factor; what lies under the given pixel of the box (its middle, unless given) stays there. */
export function zoomBy(zoom: Zoom, by: number, size: BoxSize, atPx?: ScreenPoint): Zoom {
  const factor = Math.min(MOST_ZOOM, Math.max(1, zoom.factor * by));
  const ratio = factor / zoom.factor;
  const middle: ScreenPoint = [size.widthPx / 2, size.heightPx / 2];
  const at = atPx ?? middle;
  const moved = (i: 0 | 1): number => (at[i] - middle[i]) * (1 - ratio) + zoom.movedPx[i] * ratio;
  return kept({ factor, movedPx: [moved(0), moved(1)] }, size);
}

export function panBy(zoom: Zoom, [dx, dy]: ScreenPoint, size: BoxSize): Zoom {
  return kept({ ...zoom, movedPx: [zoom.movedPx[0] + dx, zoom.movedPx[1] + dy] }, size);
}

/** Two fingers: what lies between them stays there, enlarged as they part and moved as they move. */
export function pinchBy(zoom: Zoom, from: Fingers, to: Fingers, size: BoxSize): Zoom {
  const apart = ([a, b]: Fingers): number => Math.max(1, Math.hypot(a[0] - b[0], a[1] - b[1]));
  const between = ([a, b]: Fingers): ScreenPoint => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
  const [x, y] = between(from);
  const [nextX, nextY] = between(to);
  return panBy(zoomBy(zoom, apart(to) / apart(from), size, [x, y]), [nextX - x, nextY - y], size);
}

/** The picture never leaves its box: an edge of it goes to the box's edge, not further. */
function kept({ factor, movedPx }: Zoom, { widthPx, heightPx }: BoxSize): Zoom {
  const within = (moved: number, length: number): number => {
    const most = ((factor - 1) * length) / 2;
    return Math.min(most, Math.max(-most, moved)) || 0;
  };
  return { factor, movedPx: [within(movedPx[0], widthPx), within(movedPx[1], heightPx)] };
}
