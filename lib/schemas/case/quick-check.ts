import '@/lib/schemas/fields/jitless';
import type * as z from 'zod';
import type { CaseInput } from '@/lib/schemas/case/case-input';
import { choice, quantity, strict } from '@/lib/schemas/fields/fields';

export const QUICK_SEQUENCES = ['echo-train', 'gradient-3d', 'single-shot', 'diffusion', 'balanced'] as const;
export type QuickSequence = (typeof QUICK_SEQUENCES)[number];

/** The four things a quick check asks. Everything else is assumed, and said. */
export const quickCheckForm = strict({
  extentMm: quantity({ min: 50, max: 1000, unit: 'mm', text: 'Patient, edge to edge along phase' }),
  fovMm: quantity({ min: 50, max: 600, unit: 'mm', text: 'FOV along phase' }),
  oversamplingPct: quantity({ min: 0, max: 200, unit: 'percent', text: 'Phase oversampling at present' }),
  sequence: choice(QUICK_SEQUENCES, 'Sequence.'),
});
export type QuickCheckForm = z.output<typeof quickCheckForm>;

interface Preset {
  readonly label: string;
  readonly phase: 'AP' | 'RL';
  readonly prescription: Omit<CaseInput['prescription'], 'fovPhaseMm' | 'fovReadoutMm' | 'phaseOversamplingPct'>;
}

const STACK = { mode: 'stack', slices: 30, thicknessMm: 5, gapMm: 1 } as const;
const AXIAL = { plane: 'axial', phaseAxis: 'AP', readoutMatrix: 320 } as const;

/** Plausible generic values (common practice, no source). */
export const QUICK_PRESETS: Readonly<Record<QuickSequence, Preset>> = {
  'echo-train': {
    label: 'T2 echo-train spin echo, axial', phase: 'AP',
    prescription: { ...AXIAL, family: 'echo-train-spin-echo', slices: STACK, trMs: 4000, teMs: 85, averages: 2, echoTrainLength: 16, echoSpacingMs: 9.5, sliceTimeMs: 130 },
  },
  'gradient-3d': {
    label: 'T1 3D gradient echo, axial', phase: 'AP',
    prescription: {
      ...AXIAL, family: 'gradient-echo-3d', trMs: 4, teMs: 1.7, flipDeg: 10, breathing: 'breath-hold',
      slices: { mode: 'slab', partitions: 48, partitionThicknessMm: 4.5, acquiredPartitions: 60, timeBandwidthProduct: 8 },
    },
  },
  'single-shot': {
    label: 'T2 single-shot, axial', phase: 'AP',
    prescription: { ...AXIAL, family: 'single-shot-echo-train', slices: STACK, trMs: 900, teMs: 90, echoSpacingMs: 4.2, sliceTimeMs: 700, partialFourierPhase: 0.625, breathing: 'breath-hold' },
  },
  diffusion: {
    label: 'Diffusion EPI, axial', phase: 'AP',
    prescription: { ...AXIAL, family: 'echo-planar', readoutMatrix: 120, slices: STACK, trMs: 6000, teMs: 62, echoSpacingMs: 0.6, volumes: 26, partialFourierPhase: 0.75, sliceTimeMs: 150 },
  },
  balanced: {
    label: 'Balanced, coronal', phase: 'RL',
    prescription: {
      plane: 'coronal', phaseAxis: 'RL', readoutMatrix: 256, family: 'balanced', slices: { mode: 'stack', slices: 24, thicknessMm: 6, gapMm: 1 },
      trMs: 3.8, teMs: 1.9, flipDeg: 55, sliceTimeMs: 700, breathing: 'breath-hold',
    },
  },
};

/** A body is about so much wider than deep (our judgement, no source). */
export const BREADTH_PER_DEPTH = 1.4;
/** Along readout nothing wraps, so the FOV there only has to be there. */
export const ASSUMED_READOUT_FOV_MM = 450;

/** The four fields as a case in the check's own form: the engine's answer to it is the answer. */
export function quickCheckCase({ extentMm, fovMm, oversamplingPct, sequence }: QuickCheckForm): CaseInput {
  const { phase, prescription } = QUICK_PRESETS[sequence];
  const size =
    phase === 'AP'
      ? { depthMm: extentMm, breadthMm: Math.round(extentMm * BREADTH_PER_DEPTH) }
      : { breadthMm: extentMm, depthMm: Math.round(extentMm / BREADTH_PER_DEPTH) };
  return {
    // Raised, so that what was typed is all there is along phase.
    patient: { ...size, arms: { position: 'up' } },
    prescription: {
      ...prescription,
      fovPhaseMm: fovMm,
      fovReadoutMm: Math.max(ASSUMED_READOUT_FOV_MM, fovMm),
      phaseOversamplingPct: oversamplingPct,
    } as CaseInput['prescription'],
  };
}
