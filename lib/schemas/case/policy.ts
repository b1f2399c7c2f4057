import '@/lib/schemas/fields/jitless';
import type * as z from 'zod';
import type { CostWeights, PerSide, SitePolicy } from '@/lib/domain/case/model';
import { count, flag, quantity, range, strict } from '@/lib/schemas/fields/fields';

type ShapeOf<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

const margin = (side: string) => quantity({ min: 0, max: 100, unit: 'mm', text: `Safety margin, ${side}` });
const points = (text: string) => quantity({ min: 0, max: 1000, unit: 'points', text });

export const marginShape = {
  right: margin('right'),
  left: margin('left'),
  anterior: margin('anterior'),
  posterior: margin('posterior'),
  superior: margin('superior'),
  inferior: margin('inferior'),
} satisfies ShapeOf<PerSide>;

export const swapShape = {
  abdomen: points('Swapping the phase direction in the abdomen'),
  pelvis: points('Swapping the phase direction in the pelvis'),
  chest: points('Swapping the phase direction in the chest'),
  head: points('Swapping the phase direction in the head'),
  shoulder: points('Swapping the phase direction in the shoulder'),
  hip: points('Swapping the phase direction in the hip'),
  knee: points('Swapping the phase direction in the knee'),
  breast: points('Swapping the phase direction in the breast'),
} satisfies ShapeOf<CostWeights['swap']>;

export const weightsShape = {
  timePct: points('Each 1 % more scan time'),
  snrLostPct: points('Each 1 % of SNR lost'),
  voxelPct: points('Each 1 % of voxel volume gained'),
  breathHoldS: points('Each second of breath-hold beyond the patient’s limit'),
  extraBreathHold: points('Each further breath-hold'),
  foldDisplayedPct: points('Each 1 % of the displayed area still under fold'),
  foldKeepClearPct: points('Each 1 % of the keep-clear area still under fold'),
  swap: strict(swapShape, 'Swapping the phase direction, by body part [points].'),
  presaturationBand: points('Each presaturation band'),
  edit: points('Each value changed at the scanner'),
  recentre: points('Recentring'),
  armsUp: points('Raising the arms'),
  reposition: points('Repositioning the patient'),
  coilElements: points('Choosing coil elements'),
  fewerAverages: points('Each average given up'),
  moreAcceleration: points('Each step of acceleration added'),
  partialFourier: points('Each step of partial Fourier added'),
  coverageMm: points('Each mm of coverage given up'),
  trainPct: points('Each 1 % longer echo train or displacement'),
} satisfies ShapeOf<CostWeights>;

const geometryRange = (m: number) =>
  range({ min: 1, max: 20, unit: '1', text: 'Geometry factor' }, `Range where ${m} aliases overlap.`);

export const geometryShape = {
  '2': geometryRange(2),
  '3': geometryRange(3),
  '4': geometryRange(4),
} satisfies ShapeOf<SitePolicy['geometryFactorByOverlap']>;

const t1 = (text: string) => quantity({ min: 10, max: 10000, unit: 'ms', text });
export const tissueT1Shape = {
  parenchyma: t1('T1 of the organ under question'),
  fat: t1('T1 of fat'),
} satisfies ShapeOf<SitePolicy['tissueT1Ms']>;

export const policyShape = {
  version: count({ min: 0, max: 1_000_000, text: 'Version of the policy; 0 is the standard one of a new site' }),
  marginMm: strict(marginShape, 'Safety margin each side: breathing moves the front wall most [mm].'),
  tissueTolerance: quantity({ min: 0, max: 1, unit: '1', text: 'Tissue lighter than this share of trunk signal does not count' }),
  slabTolerance: quantity({ min: 0.001, max: 1, unit: '1', text: 'A partition is contaminated above this share of plateau' }),
  sureAt: quantity({ min: 0.5, max: 0.999, unit: '1', text: 'How sure a verdict must be' }),
  unknownTimeBandwidthProduct: quantity({ min: 1, max: 40, unit: '1', text: 'Cautious time-bandwidth product used when the slab pulse is unknown' }),
  presaturationB1Scale: quantity({ min: 0.3, max: 2, unit: '1', text: 'True over nominal flip of presaturation bands, as measured; left out: not measured, 0.8' })
    .optional(),
  tissueT1Ms: strict(tissueT1Shape, 'T1 used for spoiled slab profiles [ms].'),
  geometryFactorByOverlap: strict(geometryShape, 'Geometry factor range by the number of overlapping aliases.'),
  strictBreathHold: flag('A hold beyond the patient’s limit rules a remedy out instead of costing points.'),
  tolerateFoldOutsidePct: quantity({
    min: 0, max: 100, unit: 'percent', text: 'Largest share of the picture that may stay under fold outside the keep-clear area',
  }),
  readingExpiryDays: count({ min: 1, max: 3650, unit: 'days', text: 'A size reading older than this is asked for again' }),
  signOffAlways: flag('Every plan needs a radiologist’s sign-off, not only those with fold left in the keep-clear area.'),
  weights: strict(weightsShape, 'Cost points; 1 point is as bad as 1 % more scan time.'),
} satisfies ShapeOf<SitePolicy>;

export const policySchema = strict(policyShape, 'Site policy, as the engine takes it.');
