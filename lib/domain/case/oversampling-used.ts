import { acquiredLinesFor, acquiredPartitionsFor } from '@/lib/domain/case/lines';
import type { Prescription, Scanner } from '@/lib/domain/case/model';

type SamplingScanner = Pick<Scanner, 'lineStep' | 'oversamplingForm' | 'partitionStep' | 'sliceOversamplingForm'>;

/**
 * Lines a setting in the scanner's own form acquires: a percent, a factor, 0 or 1 for a doubling switch, mm a side.
 * @throws DomainError beyond what the scanner's step can give
 */
export function linesOfSetting(prescription: Prescription, scanner: SamplingScanner, setting: number): number {
  const { linesAcrossFov, fovPhaseMm } = prescription;
  switch (scanner.oversamplingForm) {
    case 'percent':
      return acquiredLinesFor(linesAcrossFov, setting, scanner.lineStep);
    case 'factor':
      // A factor is typed to five decimals; the percent it stands for is not to be off by the last bit.
      return acquiredLinesFor(linesAcrossFov, Math.round((setting - 1) * 1e7) / 1e5, scanner.lineStep);
    case 'doubling-switch':
    case 'doubling-switch-halved-averages':
      return setting === 0 ? linesAcrossFov : 2 * linesAcrossFov;
    case 'mm-per-side':
      return acquiredLinesFor(linesAcrossFov, ((2 * setting) / fovPhaseMm) * 100, scanner.lineStep);
  }
}

/** Partitions a slice setting acquires: a percent, a factor, or partitions more. Undefined for a stack. */
export function partitionsOfSetting(prescription: Prescription, scanner: SamplingScanner, setting: number): number | undefined {
  const { slices } = prescription;
  if (slices.mode !== 'slab') return undefined;
  switch (scanner.sliceOversamplingForm) {
    case 'percent':
      return acquiredPartitionsFor(slices.partitions, setting, scanner.partitionStep);
    case 'factor':
      return acquiredPartitionsFor(slices.partitions, Math.round((setting - 1) * 1e7) / 1e5, scanner.partitionStep);
    case 'whole-partitions':
      return slices.partitions + Math.round(setting);
  }
}
