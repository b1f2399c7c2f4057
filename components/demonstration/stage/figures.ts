import type { Assessment } from '@/lib/physics/model/assessment';
import type { Prescription } from '@/lib/physics/model/prescription';
import { formatClock } from '@/lib/presentation/duration';
import { voxelFigure } from '@/lib/presentation/assessment-figures';

/** The numbers beside a scene; those that are numbers move from scene to scene. */
export interface Figures {
  readonly scanS: number;
  readonly phaseOversampling: number;
  readonly lines: number;
  readonly foldCm2: number;
  readonly sliceOversampling?: number;
  readonly contaminated?: number;
}

export function figuresOf(assessment: Assessment): Figures {
  const { time, sampling, fold, slab } = assessment;
  return {
    scanS: time?.scanS ?? 0,
    phaseOversampling: (sampling?.phaseOversampling ?? 0) * 100,
    lines: sampling?.acquiredLines ?? 0,
    foldCm2: (fold?.displayedAreaMm2 ?? 0) / 100,
    ...(slab ? { contaminated: slab.contaminated, sliceOversampling: (sampling?.sliceOversampling ?? 0) * 100 } : {}),
  };
}

export function mixFigures(from: Figures, to: Figures, t: number): Figures {
  const entries = Object.entries(to) as [keyof Figures, number][];
  return Object.fromEntries(entries.map(([key, value]) => [key, (from[key] ?? value) + (value - (from[key] ?? value)) * t])) as unknown as Figures;
}

export interface FigureLine {
  readonly key: string;
  readonly label: string;
  readonly value: string;
}

const percent = (value: number): string => `${Math.round(value * 10) / 10} %`;

export function figureLines(figures: Figures, assessment: Assessment, prescription: Prescription): readonly FigureLine[] {
  const { contaminated, sliceOversampling } = figures;
  const partitions = prescription.slices.mode === 'slab' ? prescription.slices.partitions : 0;
  return [
    ...(contaminated !== undefined
      ? [{ key: 'contaminated', label: 'Partitions with wrap', value: `${Math.round(contaminated)} of ${partitions}` }]
      : []),
    ...(sliceOversampling !== undefined ? [{ key: 'slice-oversampling', label: 'Slice oversampling', value: percent(sliceOversampling) }] : []),
    { key: 'phase-oversampling', label: 'Phase oversampling', value: percent(figures.phaseOversampling) },
    { key: 'lines', label: 'Lines acquired', value: String(Math.round(figures.lines)) },
    { key: 'fold', label: 'Fold in the worst slice', value: figures.foldCm2 < 0.05 ? 'none' : `${Math.round(figures.foldCm2 * 10) / 10} cm²` },
    { key: 'time', label: 'Scan time', value: assessment.time ? formatClock(figures.scanS) : 'none' },
    { key: 'voxel', label: 'Voxel, mm', value: voxelFigure(assessment) },
  ];
}
