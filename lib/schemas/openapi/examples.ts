import { toCase, type CaseInput } from '@/lib/schemas/case';
import type * as z from 'zod';
import type { createBookingInput } from '@/lib/schemas/booking';
import type { savePlanBody } from '@/lib/schemas/plan';
import type { addReadingsBody } from '@/lib/schemas/size-reading';

interface Example<T> {
  readonly summary: string;
  readonly value: T;
}

/** The worked case: 274 lines are enough on a one-line grid; covering the whole body would take 291. */
const WORKED: CaseInput = {
  patient: { breadthMm: 480, depthMm: 340, arms: { position: 'up' } },
  prescription: { phaseAxis: 'AP', fovPhaseMm: 300, fovReadoutMm: 480, linesAcrossFov: 256 },
  policy: { marginMm: 0 },
};

const PARTS: CaseInput = {
  patient: {
    parts: [
      { name: 'trunk', kind: 'trunk', shape: { type: 'elliptic-cylinder', along: 'z', centreMm: [0, 0, 0], semiAxesMm: [180, 120] } },
      { name: 'left arm', kind: 'arm', shape: { type: 'elliptic-cylinder', along: 'z', centreMm: [225, 0, 0], semiAxesMm: [40, 40] } },
      { name: 'right arm', kind: 'arm', shape: { type: 'outline-prism', along: 'z', rings: [[[-260, -40], [-190, -40], [-190, 40], [-260, 40]]] } },
    ],
  },
  prescription: { phaseAxis: 'RL', fovReadoutMm: 400, percentPhaseFieldOfView: 90, percentSampling: 100, phaseOversamplingPct: 5 },
  keepClear: { area: { kind: 'box', label: 'spine', box: { right: 60, left: 60 } } },
};

const SLAB: CaseInput = {
  patient: {
    breadthMm: 455,
    depthMm: 310,
    weightKg: { value: 131, source: 'reported', spread: 3 },
    breathHoldS: { value: 16, source: 'reported', spread: 2 },
  },
  prescription: {
    name: 'T1 3D gradient echo', family: 'gradient-echo-3d', fovReadoutMm: 420, percentPhaseFieldOfView: 80, readoutMatrix: 288,
    slices: { mode: 'slab', partitions: 48, partitionThicknessMm: 4.5, sliceOversamplingPct: 10, timeBandwidthProduct: 8, pulseDurationMs: 1.2 },
    trMs: 3.6, teMs: 1.6, flipDeg: 10, partialFourierSlice: 0.75, bandwidthHzPerPixel: 500, fatSuppressed: true,
    breathing: 'breath-hold', acceleration: { factorPhase: 2, referenceLines: 24, unfolding: 'image-domain-grid-ends' },
  },
  keepClear: { area: { kind: 'box', label: 'liver', box: { right: 180, left: 80, anterior: 125, posterior: 95, superior: 85, inferior: 85 } } },
  scanner: { fieldStrengthT: 3, partitionStep: 2, lineStep: { kind: 'even-lines' }, oversamplingForm: 'factor' },
  policy: { sureAt: 0.9, strictBreathHold: true, weights: { timePct: 1.5 } },
};

export const CHECK_EXAMPLES = {
  worked: { summary: 'A body of 480 × 340 mm in a 300 mm FOV', value: WORKED },
  parts: { summary: 'A body given as ellipses and an outline, FOV and lines as percentages', value: PARTS },
  slab: { summary: 'A 3D slab in one breath-hold on a scanner with its own step', value: SLAB },
} satisfies Record<string, Example<CaseInput>>;

/** Ids of the demo site; another site has its own. */
export const DEMO = {
  scannerId: '37d37f65-b523-89b6-a0b1-dd3558cc20a8', protocolId: '3707b722-d822-8b67-a8ba-7af46b7f0a5c',
} as const;

export const NEW_BOOKING_EXAMPLES = {
  booking: {
    summary: 'A booking of the demo site',
    value: { accession: 'HB-4711', scheduledAt: '2026-12-03T10:40:00+01:00', slotMinutes: 45, scannerId: DEMO.scannerId, protocolId: DEMO.protocolId },
  },
} satisfies Record<string, Example<z.input<typeof createBookingInput>>>;

export const NEW_READING_EXAMPLES = {
  localiser: {
    summary: 'Breadth and depth as the localiser shows them',
    value: {
      readings: [
        { quantity: 'breadth-mm', value: 474, source: 'localiser', spread: 2, takenOn: '2026-04-30' },
        { quantity: 'depth-mm', value: 338, source: 'localiser', spread: 2, takenOn: '2026-04-30' },
      ],
    },
  },
} satisfies Record<string, Example<z.input<typeof addReadingsBody>>>;

function planOf(input: CaseInput): z.input<typeof savePlanBody> {
  const { patient, keepClear, prescription } = toCase(input);
  return {
    expectedVersion: 0,
    plan: {
      bookingId: null, scannerId: DEMO.scannerId, scannerVersion: 1, protocolId: null, protocolVersion: 0, policyVersion: 1,
      patient: patient as never, keepClear: keepClear as never,
      sequences: [{ id: 'only', prescription: prescription as never, adopted: [] }],
      note: 'Agreed at the morning meeting.',
    },
  };
}

export const SAVE_PLAN_EXAMPLES = {
  plan: { summary: 'A plan of one sequence without a booking', value: planOf(WORKED) },
} satisfies Record<string, Example<z.input<typeof savePlanBody>>>;

export const START_IMPORT_EXAMPLES = {
  csv: { summary: 'Rows read from a CSV file', value: { id: '6a1c2f0e-5b7d-4c1e-9a34-2f60c1d7e8b9', format: 'csv' } },
} as const;
