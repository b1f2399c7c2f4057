import type { DefaultValues } from 'react-hook-form';
import type { ScannerForm } from '@/lib/schemas/scanner';

/**
 * Where a new scanner starts. What is peculiar to the machine (field, opening, table, largest FOV) is left blank,
 * so that nobody saves a figure nobody looked up; the rest starts from common figures that the form asks to check.
 */
export const NEW_SCANNER: DefaultValues<ScannerForm> = {
  scanner: {
    name: '',
    lineStep: { kind: 'line' },
    oversamplingForm: 'percent',
    sliceOversamplingForm: 'percent',
    partitionStep: 1,
    phaseFovMayExceedReadoutFov: false,
    unfolding: 'unknown',
    tissueReachMm: 250,
    respiratoryWindow: 0.4,
    limits: {
      fovMinMm: 50,
      // Three empty fields, each with its own message, instead of one missing list.
      usableFovMm: [null, null, null] as never,
      matrixMax: 512,
      acquiredLinesMax: 1024,
      phaseOversamplingMaxPct: 100,
      sliceOversamplingMaxPct: 100,
      accelerationPhaseMax: 3,
      accelerationSliceMax: 2,
      partialFourierMin: 0.6,
      averagesMax: 8,
      echoTrainMax: 256,
    },
  },
  limitsOwner: '',
  limitsCheckedOn: '',
  note: '',
};
