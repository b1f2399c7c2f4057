import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { Assessment, Case, Reason, Remedy, RemedyNotPossible } from '@/lib/domain/case/model';
import type { CheckAnswer } from '@/lib/schemas/case/check-answer';
import { caseSchema } from '@/lib/schemas/case/case-schema';
import { ARM_POSITIONS } from '@/lib/schemas/case/patient';
import { AXES, prescriptionSchema, SIDE_NAMES } from '@/lib/schemas/case/prescription';

type ShapeOf<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

const mm = (text: string) => z.number().describe(`${text} [mm].`);
const share = (text: string) => z.number().describe(`${text} [1].`);
const seconds = (text: string) => z.number().describe(`${text} [s].`);
const whole = (text: string) => z.int().describe(text);
const pair = z.tuple([z.number(), z.number()]);

export const VERDICTS = [
  'no-fold-expected', 'fold-outside-keep-clear', 'fold-in-keep-clear', 'cannot-be-scanned', 'not-modelled',
] as const;

export const reasonSchema = z.strictObject({
  code: z.string().describe('For programs.'),
  text: z.string().describe('For people.'),
} satisfies ShapeOf<Reason>);

const samplingSchema = z.strictObject({
  acquiredLines: whole('Lines acquired.'),
  acquiredWidthMm: mm('Acquired width along phase'),
  phaseOversampling: share('Effective phase oversampling'),
  acquiredPartitions: whole('Partitions acquired.').optional(),
  acquiredSlabMm: mm('Acquired width along slice').optional(),
  sliceOversampling: share('Effective slice oversampling').optional(),
} satisfies ShapeOf<NonNullable<Assessment['sampling']>>);

const widthSchema = z.strictObject({
  forbiddenMm: z.array(pair).describe('Open intervals of acquired widths that fold into the keep-clear area [mm].'),
  firstCleanMm: mm('Smallest width that is enough'),
  alwaysCleanMm: mm('From here on every width is enough'),
  firstCleanLines: whole('The same on the scanner’s step; left out beyond its maximum.').optional(),
  alwaysCleanLines: whole('The same on the scanner’s step; left out beyond its maximum.').optional(),
  coverBodyMm: mm('Width that covers the whole body, for comparison'),
  coverBodyLines: whole('Lines that cover the whole body.'),
} satisfies ShapeOf<NonNullable<Assessment['width']>>);

const foldSchema = z.strictObject({
  inKeepClear: z.boolean(),
  outsideKeepClear: z.boolean(),
  depthWithMarginMm: mm('Deepest reach into the keep-clear area along phase, with margin'),
  depthMm: mm('The same without margin'),
  displayedAreaMm2: z.number().describe('Displayed area under fold [mm²].'),
  keepClearAreaMm2: z.number().describe('Keep-clear area under fold [mm²].'),
  displayedShare: share('Share of the displayed area'),
  keepClearShare: share('Share of the keep-clear area'),
  from: z
    .strictObject({
      part: z.string(), side: z.enum(SIDE_NAMES), order: z.number().describe('Widths travelled; a fraction for a ghost of unfolding.'), distanceMm: mm('Distance travelled'),
      fatDisplacedMm: mm('EPI: it is fat, displaced by so much along phase before it folded').optional(),
    })
    .describe('Where the deepest intruder comes from.')
    .optional(),
  placeUncertain: z.boolean().describe('Tissue beyond the usable FOV folds at an uncertain place.'),
  ghosts: z.boolean().describe('Ghosts of image-domain unfolding reach the keep-clear area.'),
} satisfies ShapeOf<NonNullable<Assessment['fold']>>);

const partitionSchema = z.strictObject({
  index: z.int(),
  offsetMm: mm('Centre from the slab centre'),
  signal: share('Own signal relative to the slab centre'),
  alias: share('Signal that wraps onto it'),
  state: z.enum(['clean', 'contaminated']),
  dim: z.boolean(),
  bright: z.boolean(),
  inKeepClear: z.boolean(),
} satisfies ShapeOf<NonNullable<Assessment['slab']>['partitions'][number]>);

const slabSchema = z.strictObject({
  timeBandwidthProduct: z.number(),
  profileKind: z.enum(['single-pulse', 'spoiled', 'non-selective']),
  skirtShareLow: share('Skirt beyond the low end, share of the slab'),
  skirtShareHigh: share('Skirt beyond the high end, share of the slab'),
  fatShiftShare: share('Shift of fat’s slab, share of the slab').optional(),
  partitions: z.array(partitionSchema),
  contaminated: whole('Contaminated partitions.'),
  contaminatedInKeepClear: whole('Of them, in the keep-clear area.'),
  smallestCleanPartitions: whole('First number of acquired partitions that leaves the keep-clear area clean.').optional(),
} satisfies ShapeOf<NonNullable<Assessment['slab']>>);

const timeSchema = z.strictObject({
  scanS: seconds('Scan time'),
  scanRangeS: pair.describe('Range of a triggered scan [s].').optional(),
  shots: whole('Shots.'),
  acquiredViews: whole('Lines, or lines × partitions, that are read.'),
  batches: whole('Slice batches.'),
  breathHolds: whole('Breath-holds.'),
  longestHoldS: seconds('Longest breath-hold'),
  trainMs: z.number().describe('Echo train [ms].').optional(),
  minimumTeMs: z.number().describe('Shortest TE the train allows [ms].').optional(),
  displacementPer100HzMm: mm('Displacement along phase at 100 Hz off resonance').optional(),
} satisfies ShapeOf<NonNullable<Assessment['time']>>);

const detailSchema = z.strictObject({
  voxelMm: z.tuple([z.number(), z.number(), z.number()]).describe('Voxel: readout, phase, slice [mm].'),
  snr: z.number().describe('SNR in arbitrary units: only ratios mean anything.'),
  snrRange: pair.describe('SNR range where the geometry factor is one.'),
} satisfies ShapeOf<NonNullable<Assessment['detail']>>);

export const assessmentShape = {
  engineVersion: z.string(),
  policyVersion: z.int(),
  verdict: z.enum(VERDICTS),
  reasons: z.array(reasonSchema).describe('The deciding one first.'),
  assumptions: z
    .array(z.strictObject({ field: z.string(), used: z.string(), text: z.string() }))
    .describe('What stood in for something unknown.'),
  phaseAxis: z.enum(AXES),
  readoutAxis: z.enum(AXES),
  sampling: samplingSchema.optional(),
  width: widthSchema.optional(),
  fold: foldSchema.optional(),
  slab: slabSchema.optional(),
  time: timeSchema.optional(),
  detail: detailSchema.optional(),
} satisfies ShapeOf<Assessment>;
export const assessmentSchema = z.strictObject(assessmentShape);

const remedyKind = z.enum([
  'phase-oversampling', 'slice-oversampling', 'swap', 'larger-fov-same-matrix', 'larger-fov-same-voxel', 'recentre',
  'arms-up', 'presaturation', 'drop-end-partitions', 'enlarge-slab', 'sharper-pulse', 'coil-elements',
  'regroup-breath-holds',
]);
const paybackKind = z.enum(['fewer-averages', 'more-acceleration', 'partial-fourier']);

export const remedySchema = z.strictObject({
  key: z.string(),
  changes: z.array(remedyKind),
  payback: paybackKind.optional(),
  sentence: z.string().describe('As a radiographer would say it.'),
  prescription: prescriptionSchema.describe('The whole sequence after the remedy.'),
  arms: z.enum(ARM_POSITIONS),
  assessment: assessmentSchema,
  costTenths: z.int().describe('Cost in tenths of a point.'),
  terms: z.array(
    z.strictObject({
      kind: z.enum(['time', 'snr', 'voxel', 'breath-hold', 'side-effects', 'effort', 'leftover-fold']),
      tenths: z.int(),
      text: z.string(),
    }),
  ),
  sideEffects: z.array(z.string()),
  dominated: z.boolean().describe('Another remedy is at least as good in everything.'),
  physicalActions: z.int(),
} satisfies ShapeOf<Remedy>);

export const remedyNotPossibleSchema = z.strictObject({
  key: z.string(),
  changes: z.array(remedyKind),
  payback: paybackKind.optional(),
  reason: reasonSchema,
} satisfies ShapeOf<RemedyNotPossible>);

export const checkAnswerSchema = z.strictObject({
  engineVersion: z.string(),
  inputHash: z.string().describe('SHA-256 of the completed case.'),
  assessment: assessmentSchema,
  remedies: z.array(remedySchema).describe('Cheapest first.'),
  notPossible: z.array(remedyNotPossibleSchema),
  candidates: z.int().describe('Combinations that were worked out.'),
  case: caseSchema.describe('The case with everything that was left out filled in.') as z.ZodType<Case>,
} satisfies ShapeOf<CheckAnswer>);
