import type { SectionFrame } from '../geometry/section-frame';
import { PLANE_AXES } from '../geometry/section-frame';
import type { PatientAxis } from '../model/axes';
import type { Prescription } from '../model/prescription';

/** Sampled picture: one line of `columns` phase pixels a readout row. */
export interface Grid {
  readonly rows: number;
  readonly columns: number;
  readonly lines: readonly Float64Array[];
}

export interface Picture {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly values: Float32Array;
  readonly horizontalAxis: PatientAxis;
  readonly verticalAxis: PatientAxis;
}

/** Value between pixel centres, linear both ways; the border pixel goes on outside. */
function sample(grid: Grid, row: number, column: number): number {
  const r = Math.min(grid.rows - 1, Math.max(0, row));
  const c = Math.min(grid.columns - 1, Math.max(0, column));
  const r0 = Math.floor(r);
  const c0 = Math.floor(c);
  const r1 = Math.min(grid.rows - 1, r0 + 1);
  const c1 = Math.min(grid.columns - 1, c0 + 1);
  const top = grid.lines[r0]!;
  const bottom = grid.lines[r1]!;
  const upper = top[c0]! + (top[c1]! - top[c0]!) * (c - c0);
  const lower = bottom[c0]! + (bottom[c1]! - bottom[c0]!) * (c - c0);
  return upper + (lower - upper) * (r - r0);
}

/**
 * The sampled picture at the asked size, turned as the trade looks at it: the plane's first patient axis from left to
 * right, the second from top to bottom, superior on top.
 */
export function resample(grid: Grid, { phaseAxis }: SectionFrame, p: Prescription, sizePx: number): Picture {
  const [horizontalAxis, verticalAxis] = PLANE_AXES[p.plane];
  const phaseRunsAcross = phaseAxis === horizontalAxis;
  const acrossMm = phaseRunsAcross ? p.fovPhaseMm : p.fovReadoutMm;
  const downMm = phaseRunsAcross ? p.fovReadoutMm : p.fovPhaseMm;
  const scale = sizePx / Math.max(acrossMm, downMm);
  const widthPx = Math.max(1, Math.round(acrossMm * scale));
  const heightPx = Math.max(1, Math.round(downMm * scale));
  const superiorOnTop = verticalAxis === 'SI';
  const values = new Float32Array(widthPx * heightPx);
  for (let y = 0; y < heightPx; y++) {
    const down = (y + 0.5) / heightPx;
    const v = superiorOnTop ? 1 - down : down;
    for (let x = 0; x < widthPx; x++) {
      const u = (x + 0.5) / widthPx;
      const [phase, readout] = phaseRunsAcross ? [u, v] : [v, u];
      values[y * widthPx + x] = sample(grid, readout * grid.rows - 0.5, phase * grid.columns - 0.5);
    }
  }
  return { widthPx, heightPx, values, horizontalAxis, verticalAxis };
}
