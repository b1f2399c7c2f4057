import type { Prescription } from '@/lib/physics/model/prescription';
import type { Scanner } from '@/lib/physics/model/scanner';
import { factorGiving, percentGiving } from './oversampling-form';

type SamplingScanner = Pick<Scanner, 'lineStep' | 'oversamplingForm' | 'sliceOversamplingForm'>;

/** A setting as one number to type, in the scanner's own form. */
export interface SettingNumber {
  readonly kind: 'number' | 'switch';
  readonly value: number;
  readonly unit: string;
  readonly min: number;
  readonly max: number;
}

/** The planned phase oversampling as this scanner's form holds it; a switch is 0 or 1. */
export function phaseSettingNumber(prescription: Prescription, scanner: SamplingScanner): SettingNumber {
  const { linesAcrossFov: lines, acquiredLines: acquired, fovPhaseMm } = prescription;
  switch (scanner.oversamplingForm) {
    case 'percent':
      return { kind: 'number', value: Number(percentGiving(lines, acquired, scanner.lineStep)), unit: '%', min: 0, max: 500 };
    case 'factor':
      return { kind: 'number', value: Number(factorGiving(lines, acquired, scanner.lineStep)), unit: 'factor', min: 1, max: 6 };
    case 'doubling-switch':
    case 'doubling-switch-halved-averages':
      return { kind: 'switch', value: acquired > lines ? 1 : 0, unit: '', min: 0, max: 1 };
    case 'mm-per-side':
      return { kind: 'number', value: tenth((((acquired - lines) * fovPhaseMm) / lines) / 2), unit: 'mm a side', min: 0, max: 1000 };
  }
}

/** The same for the slice direction of a slab; absent for a stack. */
export function sliceSettingNumber(prescription: Prescription, scanner: SamplingScanner): SettingNumber | undefined {
  if (prescription.slices.mode !== 'slab') return undefined;
  const { partitions, acquiredPartitions } = prescription.slices;
  const step = { kind: 'line' } as const;
  switch (scanner.sliceOversamplingForm) {
    case 'percent':
      return { kind: 'number', value: Number(percentGiving(partitions, acquiredPartitions, step)), unit: '%', min: 0, max: 500 };
    case 'factor':
      return { kind: 'number', value: Number(factorGiving(partitions, acquiredPartitions, step)), unit: 'factor', min: 1, max: 6 };
    case 'whole-partitions':
      return { kind: 'number', value: acquiredPartitions - partitions, unit: 'partitions more', min: 0, max: 512 };
  }
}

function tenth(value: number): number {
  return Math.round(value * 10) / 10;
}
