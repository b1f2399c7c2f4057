import type { PatientBox, RangeMm, Vec3 } from '../model/axes';
import { DomainError } from '../model/domain-error';
import type { KeepClear } from '../model/keep-clear';
import type { Prescription } from '../model/prescription';
import { toMicrometres } from './micrometres';
import { displayedSliceOffsetsMm, sectionFrame } from './section-frame';
import { add, dot, scale } from './vector';

/** A box with its own axes, fixed in the patient: { P : P·axes[i] within rangesMm[i] }. Axes are orthonormal. */
export interface OrientedRegion {
  readonly axes: readonly [Vec3, Vec3, Vec3];
  readonly rangesMm: readonly [RangeMm, RangeMm, RangeMm];
}

/** @throws DomainError "box-empty" when a range is not low < high. */
export function regionOfBox(box: PatientBox): OrientedRegion {
  for (const [argument, range] of Object.entries(box) as [string, RangeMm][]) {
    if (!(range[0] < range[1])) {
      throw new DomainError('box-empty', argument, `${range[0]} to ${range[1]} mm`, 'low < high');
    }
  }
  return {
    axes: [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ],
    rangesMm: [box.xMm, box.yMm, box.zMm],
  };
}

/** The displayed window: FOV in readout and phase, and the displayed slices or partitions with their thickness. */
export function windowRegion(prescription: Prescription): OrientedRegion {
  const frame = sectionFrame(prescription, 0);
  const offsets = displayedSliceOffsetsMm(prescription);
  const { slices } = prescription;
  const half = (slices.mode === 'stack' ? slices.thicknessMm : slices.partitionThicknessMm) / 2;
  const around = (centre: number, length: number): RangeMm => [centre - length / 2, centre + length / 2];
  return {
    axes: [frame.readout, frame.phase, frame.slice],
    rangesMm: [
      around(frame.centreReadoutMm, prescription.fovReadoutMm),
      around(frame.centrePhaseMm, prescription.fovPhaseMm),
      [frame.sliceMm + (offsets[0] ?? 0) - half, frame.sliceMm + (offsets[offsets.length - 1] ?? 0) + half],
    ],
  };
}

/** The keep-clear area as a region fixed in the patient; 'whole-picture' is frozen to `prescription`'s own window. */
export function keepClearRegion(keepClear: KeepClear, prescription: Prescription): OrientedRegion {
  return keepClear.area.kind === 'box' ? regionOfBox(keepClear.area.box) : windowRegion(prescription);
}

/** The eight corners, patient coordinates [mm]. */
export function regionCorners(region: OrientedRegion): Vec3[] {
  const corners: Vec3[] = [];
  for (const a of region.rangesMm[0])
    for (const b of region.rangesMm[1])
      for (const c of region.rangesMm[2])
        corners.push(add(add(scale(region.axes[0], a), scale(region.axes[1], b)), scale(region.axes[2], c)));
  return corners;
}

/** Whether `inner` lies wholly inside `outer`, compared to 1 µm (touching counts as inside). */
export function regionInside(inner: OrientedRegion, outer: OrientedRegion): boolean {
  return regionCorners(inner).every((corner) =>
    outer.axes.every((axis, i) => {
      const at = toMicrometres(dot(corner, axis));
      const [low, high] = outer.rangesMm[i as 0 | 1 | 2];
      return at >= toMicrometres(low) && at <= toMicrometres(high);
    }),
  );
}
