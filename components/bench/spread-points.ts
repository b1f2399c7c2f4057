import type { ScreenPoint } from '@/components/schematic/scene/section-frame';

/** A target of the page is as wide as this, and needs as much to itself, pixels. */
export const TARGET_PX = 24;
/** What lies just beside is not in the way, however its pixels round; without it a point would never come to rest. */
const ROUNDING_PX = 1e-6;

/** Each point, or the next free place to its right: what lies on one spot can still be told apart by a finger. */
export function spreadPoints(points: readonly ScreenPoint[]): readonly ScreenPoint[] {
  const placed: ScreenPoint[] = [];
  for (const [x, y] of points) {
    let at: ScreenPoint = [x, y];
    const inTheWay = () => placed.filter((other) => Math.hypot(other[0] - at[0], other[1] - at[1]) < TARGET_PX - ROUNDING_PX);
    for (let taken = inTheWay(); taken.length > 0; taken = inTheWay()) {
      at = [Math.max(...taken.map((other) => other[0])) + TARGET_PX, y];
    }
    placed.push(at);
  }
  return placed;
}
