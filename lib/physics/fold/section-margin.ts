import type { PerSide, Vec3 } from '../model/axes';
import { SIDES } from '../model/axes';
import { DomainError } from '../model/domain-error';
import type { SectionFrame } from '../geometry/section-frame';

/** Margin towards smaller and larger coordinates of one section axis, mm. */
export type AxisMargin = readonly [towardsLow: number, towardsHigh: number];

/** By how much tissue is dilated along the three section axes. */
export interface SectionMargin {
  readonly readout: AxisMargin;
  readonly phase: AxisMargin;
  readonly slice: AxisMargin;
}

export const NO_MARGIN: SectionMargin = { readout: [0, 0], phase: [0, 0], slice: [0, 0] };

/**
 * The policy's per-side margin along section axes. In an untilted plane each axis takes its own two sides' values; in a
 * tilted one it takes the reach of the per-side box along it (the box's support function), so that tissue which moved by
 * any of the patient-side margins is always covered.
 * @throws DomainError "margin-negative"
 */
export function sectionMargin(frame: SectionFrame, marginMm: PerSide): SectionMargin {
  for (const side of SIDES) {
    if (!(marginMm[side] >= 0))
      throw new DomainError('margin-negative', `marginMm.${side}`, marginMm[side], '≥ 0 mm');
  }
  const towards = (axis: Vec3, sign: 1 | -1): number => {
    const x = axis[0] * sign;
    const y = axis[1] * sign;
    const z = axis[2] * sign;
    return (
      (x > 0 ? x * marginMm.left : -x * marginMm.right) +
      (y > 0 ? y * marginMm.posterior : -y * marginMm.anterior) +
      (z > 0 ? z * marginMm.superior : -z * marginMm.inferior)
    );
  };
  const along = (axis: Vec3): AxisMargin => [towards(axis, -1), towards(axis, 1)];
  return { readout: along(frame.readout), phase: along(frame.phase), slice: along(frame.slice) };
}
