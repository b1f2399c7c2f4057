import type { Prescription, SequenceFamily } from '@/lib/physics/model/prescription';
import { AXIS_WORDS, FAMILY_WORDS, PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import { TRAJECTORY_WORDS } from '@/lib/presentation/setup-words';

/** Which groups of numbers mean something for a family; the rest keeps its neutral value and is not asked for. */
export interface FamilyFields {
  readonly slab: boolean;
  readonly train: boolean;
  readonly echoPlanar: boolean;
  /** Slices share one TR, so the time one slice takes decides how many fit. */
  readonly interleaved: boolean;
}

const INTERLEAVED: readonly SequenceFamily[] = ['spin-echo', 'gradient-echo', 'echo-train-spin-echo'];

export function familyFields(family: SequenceFamily): FamilyFields {
  return {
    slab: family.endsWith('-3d'),
    train: ['echo-train-spin-echo', 'single-shot-echo-train', 'echo-train-spin-echo-3d'].includes(family),
    echoPlanar: family === 'echo-planar',
    interleaved: INTERLEAVED.includes(family),
  };
}

export const BREATHING_WORDS: Readonly<Record<Prescription['breathing'], string>> = {
  free: 'free breathing',
  'breath-hold': 'in breath-holds',
  triggered: 'triggered by breathing',
};

export const FILL_WORDS: Readonly<Record<Prescription['partialFourierFill'], string>> = {
  conjugate: 'by conjugate synthesis',
  'zero-filled': 'with zeros',
};

/** While a form is being filled any number may still be missing. */
export type Partially<T> = {
  readonly [K in keyof T]?: T[K] extends object ? Partially<T[K]> | null : T[K] | null;
};
type Draft = Partially<Prescription>;

const say = (value: unknown): string =>
  typeof value === 'number' && Number.isFinite(value) ? String(Math.round(value * 100) / 100) : '–';

export function kindSummary(draft: Draft): string {
  const plane = draft.plane ? PLANE_WORDS[draft.plane] : '–';
  const phase = draft.phaseAxis ? `phase ${AXIS_WORDS[draft.phaseAxis]}` : '–';
  const way =
    draft.trajectory && draft.trajectory !== 'cartesian' ? `, ${TRAJECTORY_WORDS[draft.trajectory]}` : '';
  return `${draft.family ? FAMILY_WORDS[draft.family] : '–'}, ${plane}, ${phase}${way}`;
}

/** What is acquired along phase: "274 lines, 7.03 % oversampling, 321 mm". */
export function acquiredSummary(draft: Draft): string | undefined {
  const { acquiredLines: acquired, linesAcrossFov: lines, fovPhaseMm: fov } = draft;
  if (!acquired || !lines || !fov || acquired < lines) return undefined;
  return `${say((acquired / lines - 1) * 100)} % oversampling, ${say((acquired * fov) / lines)} mm acquired`;
}

export function windowSummary(draft: Draft): string {
  const size = `${say(draft.fovPhaseMm)} × ${say(draft.fovReadoutMm)} mm`;
  const matrix = `${say(draft.linesAcrossFov)} × ${say(draft.readoutMatrix)}`;
  return `${size}, ${matrix}, ${acquiredSummary(draft) ?? 'lines to be given'}`;
}

export function slicesSummary(draft: Draft): string {
  const slices = draft.slices as Partially<Record<string, number | string>> | null | undefined;
  if (!slices) return '–';
  return slices.mode === 'slab'
    ? `${say(slices.partitions)} partitions of ${say(slices.partitionThicknessMm)} mm, ${say(slices.acquiredPartitions)} acquired`
    : `${say(slices.slices)} slices of ${say(slices.thicknessMm)} mm, gap ${say(slices.gapMm)} mm`;
}

export function timingSummary(draft: Draft): string {
  const train =
    draft.echoTrainLength && draft.echoTrainLength > 1 ? `, train of ${say(draft.echoTrainLength)}` : '';
  return `TR ${say(draft.trMs)} ms, TE ${say(draft.teMs)} ms, ${say(draft.averages)} ${draft.averages === 1 ? 'average' : 'averages'}${train}`;
}

export function breathingSummary(draft: Draft): string {
  const words = draft.breathing ? BREATHING_WORDS[draft.breathing] : '–';
  return draft.breathing === 'triggered' ? `${words}, ${say(draft.breathsPerTr)} breaths a TR` : words;
}

export function savingSummary(draft: Draft): string {
  const r = draft.acceleration?.factorPhase;
  const rz = draft.acceleration?.factorSlice;
  const factor = (r ?? 1) > 1 || (rz ?? 1) > 1 ? `accelerated ${say(r)} × ${say(rz)}` : 'not accelerated';
  const partial =
    (draft.partialFourierPhase ?? 1) < 1 ? `partial Fourier ${say(draft.partialFourierPhase)}` : 'all lines';
  return `${factor}, ${partial}`;
}

/** One line that tells a sequence from its neighbours. */
export function sequenceSummary(draft: Draft): string {
  return `${kindSummary(draft)} · ${windowSummary(draft)}`;
}
