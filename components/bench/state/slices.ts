import { displayedSliceOffsetsMm } from '@/lib/physics/geometry/section-frame';
import type { Prescription } from '@/lib/physics/model/prescription';

/** The slice shown: the chosen one while it exists, else the middle one; its offset from the FOV centre, mm. */
export function shownSlice(
  prescription: Prescription,
  chosen: number | undefined,
): { readonly index: number; readonly count: number; readonly offsetMm: number } {
  const offsets = displayedSliceOffsetsMm(prescription);
  const count = offsets.length;
  const index = chosen !== undefined && chosen >= 0 && chosen < count ? chosen : Math.floor((count - 1) / 2);
  return { index, count, offsetMm: offsets[index] ?? 0 };
}
