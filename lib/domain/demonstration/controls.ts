import type { Case, Prescription } from '@/lib/domain/case/model';
import { acquiredLinesFor, acquiredPartitionsFor, axesOfPlane } from '@/lib/domain/case/lines';
import type { Slab } from '@/lib/physics/model/prescription';
import { timeBandwidthProductOf } from '@/lib/physics/slab/assess-slab';
import type { ControlId } from './scene';

interface Labelled {
  readonly label: string;
}

/** A number that is moved: a slider and a typed twin. */
export interface NumberControl extends Labelled {
  readonly kind: 'number';
  readonly unit: string;
  readonly min: number;
  readonly max: number;
  readonly step: number;
  readonly read: (question: Case) => number;
  readonly write: (question: Case, value: number) => Case;
}

/** One of a few words. */
export interface ChoiceControl extends Labelled {
  readonly kind: 'choice';
  readonly options: (question: Case) => readonly { readonly value: string; readonly label: string }[];
  readonly read: (question: Case) => string;
  readonly write: (question: Case, value: string) => Case;
}

export type Control = NumberControl | ChoiceControl;

const prescribed = (question: Case, patch: Partial<Prescription>): Case => ({
  ...question,
  prescription: { ...question.prescription, ...patch },
});

const slabOf = ({ prescription: { slices } }: Case): Slab | null => (slices.mode === 'slab' ? slices : null);

function slabbed(question: Case, change: (slab: Slab) => Slab): Case {
  const slab = slabOf(question);
  return slab ? prescribed(question, { slices: change(slab) }) : question;
}

/** Exact, for what is worked out from it; shown it is rounded to 0.1 %. */
const exactPercent = (acquired: number, nominal: number): number => (acquired / nominal - 1) * 100;
const percentOf = (acquired: number, nominal: number): number => Math.round(exactPercent(acquired, nominal) * 10) / 10;

/** Lines follow the FOV at the same pixel, and keep the oversampling asked for. */
function withPhaseFov(question: Case, fovPhaseMm: number): Case {
  const p = question.prescription;
  const linesAcrossFov = Math.max(16, Math.round((fovPhaseMm * p.linesAcrossFov) / p.fovPhaseMm));
  const acquiredLines = acquiredLinesFor(linesAcrossFov, exactPercent(p.acquiredLines, p.linesAcrossFov), question.scanner.lineStep);
  return prescribed(question, { fovPhaseMm, linesAcrossFov, acquiredLines });
}

/** Each axis keeps its own pixel and its own FOV; the lines follow. */
function withPhaseAlong(question: Case, axis: string): Case {
  const p = question.prescription;
  const wanted = axesOfPlane(p.plane).find((each) => each === axis);
  if (!wanted || wanted === p.phaseAxis) return question;
  const linesAcrossFov = p.readoutMatrix;
  const oversampling = exactPercent(p.acquiredLines, p.linesAcrossFov);
  return prescribed(question, {
    phaseAxis: wanted,
    fovPhaseMm: p.fovReadoutMm,
    fovReadoutMm: p.fovPhaseMm,
    linesAcrossFov,
    readoutMatrix: p.linesAcrossFov,
    acquiredLines: acquiredLinesFor(linesAcrossFov, oversampling, question.scanner.lineStep),
  });
}

/** The same slab in other partitions, or another slab of the same partitions; slice oversampling stays as asked. */
function withPartitions(question: Case, change: (slab: Slab) => Pick<Slab, 'partitions' | 'partitionThicknessMm'>): Case {
  return slabbed(question, (slab) => {
    const next = { ...slab, ...change(slab) };
    const oversampling = exactPercent(slab.acquiredPartitions, slab.partitions);
    return { ...next, acquiredPartitions: acquiredPartitionsFor(next.partitions, oversampling, question.scanner.partitionStep) };
  });
}

const slabMm = (slab: Slab): number => Math.round(slab.partitions * slab.partitionThicknessMm);

export const CONTROLS: Readonly<Record<ControlId, Control>> = {
  'phase-oversampling': {
    kind: 'number', label: 'Phase oversampling', unit: '%', min: 0, max: 100, step: 1,
    read: ({ prescription: p }) => percentOf(p.acquiredLines, p.linesAcrossFov),
    write: (question, value) =>
      prescribed(question, { acquiredLines: acquiredLinesFor(question.prescription.linesAcrossFov, value, question.scanner.lineStep) }),
  },
  'phase-fov': {
    kind: 'number', label: 'Phase FOV', unit: 'mm', min: 150, max: 500, step: 5,
    read: ({ prescription }) => prescription.fovPhaseMm,
    write: withPhaseFov,
  },
  'phase-direction': {
    kind: 'choice', label: 'Phase direction',
    options: ({ prescription }) => axesOfPlane(prescription.plane).map((axis) => ({ value: axis, label: `${axis[0]}–${axis[1]}` })),
    read: ({ prescription }) => prescription.phaseAxis,
    write: withPhaseAlong,
  },
  averages: {
    kind: 'number', label: 'Averages', unit: '', min: 1, max: 4, step: 1,
    read: ({ prescription }) => prescription.averages,
    write: (question, averages) => prescribed(question, { averages }),
  },
  depth: {
    kind: 'number', label: 'Depth of the body, A–P', unit: 'mm', min: 150, max: 450, step: 10,
    read: ({ patient: { extents } }) => extents.anterior.value + extents.posterior.value,
    write: (question, value) => {
      const { extents } = question.patient;
      const half = { value: value / 2 };
      return {
        ...question,
        patient: {
          ...question.patient,
          extents: { ...extents, anterior: { ...extents.anterior, ...half }, posterior: { ...extents.posterior, ...half } },
        },
      };
    },
  },
  arms: {
    kind: 'choice', label: 'Arms',
    options: () => [{ value: 'down', label: 'down' }, { value: 'up', label: 'up' }],
    read: ({ patient }) => (patient.arms.position === 'up' ? 'up' : 'down'),
    write: (question, value) => ({
      ...question,
      patient: { ...question.patient, arms: { ...question.patient.arms, position: value === 'up' ? 'up' : 'down' } },
    }),
  },
  offset: {
    kind: 'number', label: 'FOV centre, to the patient’s left', unit: 'mm', min: -150, max: 150, step: 5,
    read: ({ prescription }) => prescription.centreMm[0],
    write: (question, value) => {
      const [, y, z] = question.prescription.centreMm;
      return prescribed(question, { centreMm: [value, y, z] });
    },
  },
  unfolding: {
    kind: 'choice', label: 'Accelerated scan unfolded',
    options: () => [
      { value: 'image-domain-grid-ends', label: 'in the image' },
      { value: 'k-space-self-calibrating', label: 'in k-space' },
    ],
    read: ({ prescription }) => (prescription.acceleration.unfolding === 'k-space-self-calibrating' ? 'k-space-self-calibrating' : 'image-domain-grid-ends'),
    write: (question, value) =>
      prescribed(question, {
        acceleration: {
          ...question.prescription.acceleration,
          unfolding: value === 'k-space-self-calibrating' ? 'k-space-self-calibrating' : 'image-domain-grid-ends',
        },
      }),
  },
  'slab-thickness': {
    kind: 'number', label: 'Slab thickness', unit: 'mm', min: 40, max: 320, step: 4,
    read: (question) => { const slab = slabOf(question); return slab ? slabMm(slab) : 0; },
    write: (question, value) =>
      withPartitions(question, ({ partitions }) => ({ partitions, partitionThicknessMm: Math.round((value / partitions) * 1000) / 1000 })),
  },
  partitions: {
    kind: 'number', label: 'Partitions', unit: '', min: 8, max: 96, step: 2,
    read: (question) => slabOf(question)?.partitions ?? 0,
    write: (question, partitions) =>
      withPartitions(question, (slab) => ({
        partitions,
        partitionThicknessMm: Math.round(((slab.partitions * slab.partitionThicknessMm) / partitions) * 1000) / 1000,
      })),
  },
  'slice-oversampling': {
    kind: 'number', label: 'Slice oversampling', unit: '%', min: 0, max: 100, step: 1,
    read: (question) => { const slab = slabOf(question); return slab ? percentOf(slab.acquiredPartitions, slab.partitions) : 0; },
    write: (question, value) =>
      slabbed(question, (slab) => ({
        ...slab,
        acquiredPartitions: acquiredPartitionsFor(slab.partitions, value, question.scanner.partitionStep),
      })),
  },
  'pulse-sharpness': {
    kind: 'number', label: 'Pulse sharpness (TBW)', unit: '', min: 2, max: 16, step: 0.5,
    read: (question) => { const slab = slabOf(question); return slab ? timeBandwidthProductOf(slab, question.policy) : 0; },
    write: (question, value) => slabbed(question, (slab) => ({ ...slab, timeBandwidthProduct: value })),
  },
  flip: {
    kind: 'number', label: 'Flip angle', unit: '°', min: 2, max: 60, step: 1,
    read: ({ prescription }) => prescription.flipDeg,
    write: (question, flipDeg) => prescribed(question, { flipDeg }),
  },
  selective: {
    kind: 'choice', label: 'Slab pulse',
    options: () => [{ value: 'selective', label: 'selective' }, { value: 'non-selective', label: 'non-selective' }],
    read: (question) => (slabOf(question)?.selective === false ? 'non-selective' : 'selective'),
    write: (question, value) => slabbed(question, (slab) => ({ ...slab, selective: value === 'selective' })),
  },
};

const SLAB_ONLY: ReadonlySet<ControlId> = new Set([
  'slab-thickness', 'partitions', 'slice-oversampling', 'pulse-sharpness', 'flip', 'selective',
]);

/** Whether moving it would change anything in this case. */
export function applies(id: ControlId, question: Case): boolean {
  const { prescription, patient } = question;
  const { slices } = prescription;
  if (SLAB_ONLY.has(id)) {
    if (slices.mode !== 'slab') return false;
    if (id === 'pulse-sharpness') return slices.selective;
    // An echo train is excited at 90°, whatever its refocusing flip.
    if (id === 'flip') return slices.selective && prescription.family === 'gradient-echo-3d';
    return true;
  }
  if (id === 'unfolding') return prescription.acceleration.factorPhase > 1 || prescription.acceleration.factorSlice > 1;
  if (id === 'arms') return patient.arms.position !== 'cannot-be-raised' && patient.region !== 'head' && patient.region !== 'knee';
  return true;
}
