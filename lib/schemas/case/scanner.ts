import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { CoilDescription, CoilElement, Scanner, ScannerLimits } from '@/lib/domain/case/model';
import { UNFOLDINGS } from '@/lib/schemas/case/prescription';
import { choice, count, flag, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';

type ShapeOf<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

const usable = (text: string) => quantity({ min: 50, max: 1000, unit: 'mm', text });

export const scannerLimitsShape = {
  fovMinMm: quantity({ min: 5, max: 500, unit: 'mm', text: 'Smallest FOV' }),
  fovMaxMm: quantity({ min: 50, max: 1000, unit: 'mm', text: 'Largest FOV that can be entered' }),
  usableFovMm: z
    .tuple([usable('Across the bore, right–left'), usable('Across the bore, up–down'), usable('Along the bore')], {
      error: refused('three numbers in mm: right–left, up–down, along the bore'),
    })
    .describe('Usable imaging volume, mm: right–left, up–down, along the bore.'),
  matrixMax: count({ min: 64, max: 4096, text: 'Largest matrix' }),
  acquiredLinesMax: count({ min: 64, max: 8192, unit: 'lines', text: 'Most lines that can be acquired' }),
  phaseOversamplingMaxPct: quantity({ min: 0, max: 500, unit: 'percent', text: 'Largest phase oversampling' }),
  sliceOversamplingMaxPct: quantity({ min: 0, max: 500, unit: 'percent', text: 'Largest slice oversampling' }),
  accelerationPhaseMax: quantity({ min: 1, max: 12, unit: '1', text: 'Largest acceleration factor along phase' }),
  accelerationSliceMax: quantity({ min: 1, max: 8, unit: '1', text: 'Largest acceleration factor along slice' }),
  partialFourierMin: quantity({ min: 0.51, max: 1, unit: '1', text: 'Smallest partial Fourier fraction' }),
  averagesMax: count({ min: 1, max: 64, text: 'Most averages' }),
  echoTrainMax: count({ min: 1, max: 1024, text: 'Longest echo train' }),
  tableLimitKg: quantity({ min: 50, max: 500, unit: 'kg', text: 'Table load limit' }),
} satisfies ShapeOf<ScannerLimits>;

export const lineStepSchema = z
  .discriminatedUnion(
    'kind',
    [
      strict({ kind: z.literal('line').describe('Any whole number of lines.') }),
      strict({ kind: z.literal('even-lines').describe('Even numbers of lines.') }),
      strict({
        kind: z.literal('percent').describe('Whole steps of a percentage of the lines across the FOV.'),
        percent: quantity({ min: 0.1, max: 100, unit: 'percent', text: 'Size of one step' }),
      }),
      strict({ kind: z.literal('doubling').describe('Only none or twice.') }),
    ],
    { error: refused('a step whose kind is line, even-lines, percent or doubling') },
  )
  .describe('The scanner’s own grid of acquired lines; requests are rounded up to it.');

const seen = (text: string) => quantity({ min: -1000, max: 1000, unit: 'mm', text });

export const coilElementShape = {
  name: words(60, 'The element.'),
  seesFromMm: seen('Sees tissue from here along the bore, from the isocentre'),
  seesToMm: seen('Sees tissue up to here along the bore, from the isocentre'),
} satisfies ShapeOf<CoilElement>;

export const coilSchema = strict(
  {
    name: words(60, 'The coil, as prescriptions name it.'),
    elements: z
      .array(strict(coilElementShape))
      .min(1)
      .max(64)
      .describe('Elements from feet to head.'),
  } satisfies ShapeOf<CoilDescription>,
  'A receive coil whose elements the site has described.',
);

export const scannerShape = {
  name: words(60, 'The site’s own name for the scanner.'),
  fieldStrengthT: quantity({ min: 0.05, max: 12, unit: 'T', text: 'Field strength' }),
  boreDiameterMm: quantity({ min: 300, max: 1200, unit: 'mm', text: 'Diameter of the opening' }),
  tableBelowCentreMm: quantity({ min: 0, max: 500, unit: 'mm', text: 'Table, pad compressed, below the opening’s centre' }),
  anteriorCoilMm: quantity({ min: 0, max: 150, unit: 'mm', text: 'Room the anterior coil takes above the patient' }),
  lineStep: lineStepSchema,
  oversamplingForm: choice(
    ['percent', 'factor', 'doubling-switch', 'doubling-switch-halved-averages', 'mm-per-side'],
    'How this scanner takes phase oversampling.',
  ),
  sliceOversamplingForm: choice(['percent', 'factor', 'whole-partitions'], 'How this scanner takes slice oversampling.'),
  partitionStep: count({ min: 1, max: 64, unit: 'partitions', text: 'Partitions the scanner adds at a time' }),
  phaseFovMayExceedReadoutFov: flag('The phase FOV may exceed the readout FOV.'),
  unfolding: choice(UNFOLDINGS, 'How accelerated scans are unfolded when the protocol does not say.'),
  tissueReachMm: quantity({ min: 50, max: 1000, unit: 'mm', text: 'Tissue is seen this far either side of the isocentre along the bore' }),
  respiratoryWindow: quantity({ min: 0.05, max: 1, unit: '1', text: 'Share of a breath in which a triggered scan may acquire' }),
  limits: strict(scannerLimitsShape, 'Hard limits.'),
  coils: z
    .array(coilSchema)
    .max(16)
    .describe('Coils whose elements are described; of any other coil no element can be left out.')
    .optional(),
} satisfies ShapeOf<Scanner>;

/** Rules that hold between fields. */
export function refineScanner(value: Scanner, report: (path: string[], message: string) => void): void {
  if (value.limits.fovMinMm >= value.limits.fovMaxMm) {
    report(['limits', 'fovMinMm'], `${value.limits.fovMinMm} given; allowed: below the largest FOV, ${value.limits.fovMaxMm} mm`);
  }
  if (value.tableBelowCentreMm >= value.boreDiameterMm / 2) {
    report(['tableBelowCentreMm'], `${value.tableBelowCentreMm} given; allowed: below half the opening, ${value.boreDiameterMm / 2} mm`);
  }
  (value.coils ?? []).forEach((coil, c) => {
    coil.elements.forEach(({ seesFromMm, seesToMm }, e) => {
      if (seesFromMm >= seesToMm) {
        report(['coils', String(c), 'elements', String(e), 'seesFromMm'], `${seesFromMm} given; allowed: below where the element ends, ${seesToMm} mm`);
      }
    });
  });
  const doubling = value.oversamplingForm.startsWith('doubling-switch');
  if (doubling !== (value.lineStep.kind === 'doubling')) {
    report(['oversamplingForm'], `${value.oversamplingForm} given with the line step ${value.lineStep.kind}; allowed: a doubling switch with the doubling step, and only together`);
  }
}

export const scannerSchema = strict(scannerShape, 'One scanner, as the engine takes it.').superRefine(
  (value, context) => refineScanner(value, (path, message) => context.addIssue({ code: 'custom', path, message })),
);
