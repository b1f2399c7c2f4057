/** A bench of three sequences over one patient, for tests of the bench's own state. */
import type { BenchDocument } from '@/components/bench/state/bench-document';
import { slabOf, typicalPatient, typicalPrescription, typicalScanner } from './physics-cases';

export function benchDocument(overrides: Partial<BenchDocument> = {}): BenchDocument {
  return {
    patient: typicalPatient(),
    keepClear: {
      area: { kind: 'box', box: { xMm: [-190, 60], yMm: [-140, 95], zMm: [-60, 60] }, label: 'liver' },
      followsWindow: false,
    },
    scanner: typicalScanner(),
    sequences: [
      { id: 'a', prescription: typicalPrescription(), adopted: [] },
      {
        id: 'b',
        prescription: typicalPrescription({ name: 'T1 3D gradient echo', family: 'gradient-echo-3d', slices: slabOf() }),
        adopted: [],
      },
      {
        id: 'c',
        prescription: typicalPrescription({ name: 'Balanced', family: 'balanced', plane: 'coronal', phaseAxis: 'RL' }),
        adopted: [],
      },
    ],
    ...overrides,
  };
}
