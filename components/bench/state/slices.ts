import type { Prescription } from '@/lib/physics/model/prescription';

/** Positions of the slices, or partitions of the nominal slab, along the slice axis from the centre, mm. */
export function sliceOffsetsMm(prescription: Prescription): readonly number[] {
  const { slices } = prescription;
  const count = slices.mode === 'slab' ? slices.partitions : slices.slices;
  const pitch = slices.mode === 'slab' ? slices.partitionThicknessMm : slices.thicknessMm + slices.gapMm;
  return Array.from({ length: count }, (_, k) => (k - (count - 1) / 2) * pitch);
}

/** The slice shown: the chosen one while it exists, else the middle one. */
export function shownSlice(prescription: Prescription, chosen: number | undefined): number {
  const { slices } = prescription;
  const count = slices.mode === 'slab' ? slices.partitions : slices.slices;
  return chosen !== undefined && chosen >= 0 && chosen < count ? chosen : Math.floor((count - 1) / 2);
}
