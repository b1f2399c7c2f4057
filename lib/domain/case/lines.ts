import type { PatientAxis, Plane, Prescription, Scanner } from '@/lib/domain/case/model';
import { acquiredLines, acquiredPartitions, nextAcquiredLines } from '@/lib/physics/fold/acquired-lines';
import type { LineStep } from '@/lib/physics/model/scanner';

/** Acquired lines a request for phase oversampling in percent becomes. @throws DomainError beyond a doubling switch */
export function acquiredLinesFor(linesAcrossFov: number, oversamplingPct: number, step: LineStep): number {
  return acquiredLines(linesAcrossFov, oversamplingPct / 100, step);
}

/** Whole partitions a request for slice oversampling becomes, in the scanner's own step. */
export function acquiredPartitionsFor(partitions: number, oversamplingPct: number, partitionStep: number): number {
  return acquiredPartitions(partitions, oversamplingPct / 100, partitionStep);
}

/**
 * A protocol's sequence as this scanner can take it: the lines it asks for on the scanner's own step (never fewer),
 * and what the scanner says about unfolding when the protocol does not. A request beyond a doubling switch stays as
 * it is; the engine then says why it cannot be scanned.
 */
export function onScanner(prescription: Prescription, scanner: Scanner): Prescription {
  const { linesAcrossFov, acquiredLines: wanted, acceleration } = prescription;
  return {
    ...prescription,
    acquiredLines: nextAcquiredLines(linesAcrossFov, wanted, scanner.lineStep) ?? wanted,
    acceleration: {
      ...acceleration,
      unfolding: acceleration.unfolding === 'unknown' ? scanner.unfolding : acceleration.unfolding,
    },
  };
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
