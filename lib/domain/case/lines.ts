import type { LineStep, PatientAxis, Plane } from '@/lib/domain/case/model';

/** Rounding noise of N·(1 + s): 7 % of 300 is 321.00000000000006 in binary and must stay 321. */
const LINE_NOISE = 1e-9;

/**
 * Acquired lines a request for phase oversampling becomes: ⌈N(1 + s) − 1e-9⌉, then up to the scanner's own step.
 * A doubling switch knows only N and 2N.
 */
export function acquiredLinesFor(linesAcrossFov: number, oversamplingPct: number, step: LineStep): number {
  const asked = Math.ceil(linesAcrossFov * (1 + oversamplingPct / 100) - LINE_NOISE);
  switch (step.kind) {
    case 'line':
      return asked;
    case 'even-lines':
      return asked + (asked % 2);
    case 'percent': {
      const steps = Math.ceil(oversamplingPct / step.percent - LINE_NOISE);
      return Math.ceil(linesAcrossFov * (1 + (steps * step.percent) / 100) - LINE_NOISE);
    }
    case 'doubling':
      return asked <= linesAcrossFov ? linesAcrossFov : 2 * linesAcrossFov;
  }
}

/** Whole partitions a request for slice oversampling becomes, in the scanner's own step. */
export function acquiredPartitionsFor(partitions: number, oversamplingPct: number, partitionStep: number): number {
  const extra = Math.ceil((partitions * oversamplingPct) / 100 - LINE_NOISE);
  return partitions + Math.ceil(extra / partitionStep) * partitionStep;
}

/** The two patient axes a plane shows. */
export function axesOfPlane(plane: Plane): readonly [PatientAxis, PatientAxis] {
  switch (plane) {
    case 'axial':
      return ['RL', 'AP'];
    case 'coronal':
      return ['RL', 'SI'];
    case 'sagittal':
      return ['AP', 'SI'];
  }
}

/** The patient axis a plane is stacked along. */
export function sliceAxisOf(plane: Plane): PatientAxis {
  return plane === 'axial' ? 'SI' : plane === 'coronal' ? 'AP' : 'RL';
}
