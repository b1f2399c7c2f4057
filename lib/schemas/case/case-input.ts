import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { keepClearShape, patientBoxSchema } from '@/lib/schemas/case/keep-clear';
import type { SolidPart } from '@/lib/domain/case/model';
import {
  ARM_POSITIONS, boxRange, partShape, patientShape, READING_SOURCES, TOO_MANY_POINTS, withinOutlinePoints,
} from '@/lib/schemas/case/patient';
import { geometryShape, marginShape, policyShape, swapShape, tissueT1Shape, weightsShape } from '@/lib/schemas/case/policy';
import {
  accelerationShape, presaturationShape, prescriptionShape, slabShape, stackShape,
} from '@/lib/schemas/case/prescription';
import { scannerLimitsShape, scannerShape } from '@/lib/schemas/case/scanner';
import { choice, day, quantity, refused, strict, words } from '@/lib/schemas/fields/fields';

/** Everything a case can leave out, with what stands in for it. */
export const CASE_DEFAULTS = {
  patient: {
    region: 'abdomen', position: 'head-first-supine', lateralOffsetMm: 0, isocentreZMm: 0,
    reachMm: 250, breathHoldS: 15, breathPeriodS: 4,
    arms: { position: 'down', breadthMm: 110, depthMm: 120, gapMm: 10 },
  },
  prescription: {
    name: 'sequence', family: 'gradient-echo', trajectory: 'cartesian', plane: 'axial', readoutMatrix: 256,
    trMs: 500, teMs: 10, flipDeg: 90, averages: 1, echoSpacingMs: 0, bandwidthHzPerPixel: 300, coil: 'body array',
  },
  scanner: {
    name: 'scanner', fieldStrengthT: 1.5, boreDiameterMm: 700, tableBelowCentreMm: 170, anteriorCoilMm: 30,
    tissueReachMm: 250, respiratoryWindow: 0.4,
  },
} as const;

/** Keeps each field's own description and adds the default to it. */
function orElse<T extends z.ZodType>(schema: T, value: z.input<T>) {
  return schema.default(value as never).describe(schema.description ?? '');
}

/** Reading in the check's form: a bare number is measured, without spread. */
function looseReading(value: z.ZodNumber, text: string) {
  const unit = /\[([^\]]+)\]/.exec(value.description ?? '')?.[1] ?? '1';
  const spread = quantity({ min: 0, max: 200, unit: unit as 'mm', text: 'One standard deviation; needed for anything not measured' });
  return z
    .union(
      [
        value,
        strict({
          value,
          source: choice(READING_SOURCES, 'How the value was got.').default('measured'),
          takenOn: day('Day the value was taken, YYYY-MM-DD.').optional(),
          spread: spread.optional(),
        }),
      ],
      { error: refused('a number, or an object with value, source, takenOn and spread') },
    )
    .superRefine((reading, context) => {
      if (typeof reading === 'number' || reading.spread !== undefined) return;
      if (['measured', 'localiser', 'policy-default'].includes(reading.source)) return;
      context.addIssue({
        code: 'custom', path: ['spread'],
        message: `left out for a value that is ${reading.source}; allowed: one standard deviation in ${unit}`,
      });
    })
    .describe(text);
}

const extentValue = patientShape.extents.shape.right.shape.value;
const side = (name: string) =>
  looseReading(extentValue, `Extent from the origin to the ${name} end [mm], 0 to 1000 mm.`).optional();

export const patientInput = strict(
  {
    region: orElse(patientShape.region, CASE_DEFAULTS.patient.region),
    extents: strict(
      {
        right: side('right'), left: side('left'), anterior: side('anterior'), posterior: side('posterior'),
        superior: side('superior'), inferior: side('inferior'),
      },
      'Extents each side of the origin. Give these, or breadthMm and depthMm, or parts. ' +
        `Superior and inferior left out: ${CASE_DEFAULTS.patient.reachMm} mm.`,
    ).optional(),
    breadthMm: quantity({ min: 1, max: 2000, unit: 'mm', text: 'Whole right–left breadth, centred; instead of extents right and left' }).optional(),
    depthMm: quantity({ min: 1, max: 2000, unit: 'mm', text: 'Whole anterior–posterior depth, centred; instead of extents anterior and posterior' }).optional(),
    arms: strict({
      position: orElse(choice(ARM_POSITIONS, 'Where the arms are.'), CASE_DEFAULTS.patient.arms.position),
      breadthMm: orElse(patientShape.arms.shape.breadthMm, CASE_DEFAULTS.patient.arms.breadthMm),
      depthMm: orElse(patientShape.arms.shape.depthMm, CASE_DEFAULTS.patient.arms.depthMm),
      gapMm: orElse(patientShape.arms.shape.gapMm, CASE_DEFAULTS.patient.arms.gapMm),
    }).prefault({}).describe('Arms; left out: at the side, the cautious assumption.'),
    weightKg: looseReading(quantity({ min: 2, max: 500, unit: 'kg', text: 'Weight' }), 'Body weight [kg], 2 to 500 kg.').optional(),
    heightCm: looseReading(quantity({ min: 40, max: 250, unit: 'cm', text: 'Height' }), 'Height [cm], 40 to 250 cm.').optional(),
    sex: patientShape.sex,
    breathHoldS: orElse(
      looseReading(quantity({ min: 0, max: 60, unit: 's', text: 'Breath-hold' }), 'Longest breath-hold [s], 0 to 60 s.'),
      { value: CASE_DEFAULTS.patient.breathHoldS, source: 'policy-default' },
    ),
    breathPeriodS: orElse(
      looseReading(quantity({ min: 1, max: 15, unit: 's', text: 'Breath period' }), 'Breath to breath [s], 1 to 15 s.'),
      { value: CASE_DEFAULTS.patient.breathPeriodS, source: 'policy-default' },
    ),
    position: orElse(patientShape.position, CASE_DEFAULTS.patient.position),
    pairedSide: patientShape.pairedSide,
    legGapMm: patientShape.legGapMm,
    lateralOffsetMm: orElse(patientShape.lateralOffsetMm, 0),
    isocentreZMm: orElse(patientShape.isocentreZMm, 0),
    parts: z
      .array(strict({
        ...partShape,
        kind: orElse(partShape.kind, 'trunk'),
        signalWeight: orElse(partShape.signalWeight, 1),
        estimated: orElse(partShape.estimated, false),
      }))
      .min(1)
      .max(40)
      .refine((parts) => withinOutlinePoints(parts as readonly SolidPart[]), { error: TOO_MANY_POINTS })
      .describe('The body as ellipses (elliptic cylinders), ellipsoids or outlines (240 points in all); replaces the one built from extents and arms, whole.')
      .optional(),
  },
  'The patient.',
);

const loosePartialFourier = (schema: z.ZodNumber) => orElse(schema, 1);

export const slabInput = strict({
  ...slabShape,
  acquiredPartitions: slabShape.acquiredPartitions.optional(),
  sliceOversamplingPct: quantity({ min: 0, max: 500, unit: 'percent', text: 'Slice oversampling; instead of acquiredPartitions, rounded up to the scanner’s step' }).optional(),
  selective: orElse(slabShape.selective, true),
  droppedPartitionsPerEnd: orElse(slabShape.droppedPartitionsPerEnd, 0),
});

export const prescriptionInput = strict(
  {
    ...prescriptionShape,
    name: orElse(prescriptionShape.name, CASE_DEFAULTS.prescription.name),
    family: orElse(prescriptionShape.family, CASE_DEFAULTS.prescription.family),
    trajectory: orElse(prescriptionShape.trajectory, CASE_DEFAULTS.prescription.trajectory),
    plane: orElse(prescriptionShape.plane, CASE_DEFAULTS.prescription.plane),
    tiltAboutReadoutDeg: orElse(prescriptionShape.tiltAboutReadoutDeg, 0),
    tiltAboutPhaseDeg: orElse(prescriptionShape.tiltAboutPhaseDeg, 0),
    inPlaneRotationDeg: orElse(prescriptionShape.inPlaneRotationDeg, 0),
    centreMm: orElse(prescriptionShape.centreMm, [0, 0, 0]),
    phaseAxis: prescriptionShape.phaseAxis
      .describe('Patient axis of the phase direction: RL, AP or SI, in the plane. Left out: AP in axial and sagittal, RL in coronal.')
      .optional(),
    fovPhaseMm: prescriptionShape.fovPhaseMm.optional(),
    percentPhaseFieldOfView: quantity({ min: 5, max: 400, unit: 'percent', text: 'Percent Phase Field of View: phase FOV as a percentage of readout FOV; instead of fovPhaseMm' }).optional(),
    linesAcrossFov: prescriptionShape.linesAcrossFov.optional(),
    percentSampling: quantity({ min: 5, max: 400, unit: 'percent', text: 'Percent Sampling: lines as a percentage of those of a square pixel; instead of linesAcrossFov. Both left out: 100' }).optional(),
    readoutMatrix: orElse(prescriptionShape.readoutMatrix, CASE_DEFAULTS.prescription.readoutMatrix),
    acquiredLines: prescriptionShape.acquiredLines.optional(),
    phaseOversamplingPct: quantity({ min: 0, max: 500, unit: 'percent', text: 'Phase oversampling; instead of acquiredLines, rounded up to the scanner’s step. Both left out: 0' }).optional(),
    slices: z
      .discriminatedUnion('mode', [
        strict({
          ...stackShape,
          slices: orElse(stackShape.slices, 1),
          thicknessMm: orElse(stackShape.thicknessMm, 5),
          gapMm: orElse(stackShape.gapMm, 0),
        }),
        slabInput,
      ], { error: refused('slices whose mode is stack or slab') })
      .describe('Stack of slices or 3D slab; left out for a 2D family: one slice of 5 mm.')
      .optional(),
    trMs: orElse(prescriptionShape.trMs, CASE_DEFAULTS.prescription.trMs),
    teMs: orElse(prescriptionShape.teMs, CASE_DEFAULTS.prescription.teMs),
    flipDeg: orElse(prescriptionShape.flipDeg, CASE_DEFAULTS.prescription.flipDeg),
    averages: orElse(prescriptionShape.averages, 1),
    partialFourierPhase: loosePartialFourier(prescriptionShape.partialFourierPhase),
    partialFourierSlice: loosePartialFourier(prescriptionShape.partialFourierSlice),
    partialFourierFill: orElse(prescriptionShape.partialFourierFill, 'conjugate'),
    echoTrainLength: orElse(prescriptionShape.echoTrainLength, 1),
    echoSpacingMs: orElse(prescriptionShape.echoSpacingMs, 0),
    shots: orElse(prescriptionShape.shots, 1),
    volumes: orElse(prescriptionShape.volumes, 1),
    bandwidthHzPerPixel: orElse(prescriptionShape.bandwidthHzPerPixel, CASE_DEFAULTS.prescription.bandwidthHzPerPixel),
    sliceTimeMs: prescriptionShape.sliceTimeMs
      .describe('Time one slice takes inside TR [ms], 0 to 60000 ms; left out: all slices just fit one TR.')
      .optional(),
    preparationMs: orElse(prescriptionShape.preparationMs, 0),
    segments: orElse(prescriptionShape.segments, 0),
    fatSuppressed: orElse(prescriptionShape.fatSuppressed, false),
    breathing: orElse(prescriptionShape.breathing, 'free'),
    breathsPerTr: orElse(prescriptionShape.breathsPerTr, 1),
    acceleration: strict({
      ...accelerationShape,
      factorPhase: orElse(accelerationShape.factorPhase, 1),
      factorSlice: orElse(accelerationShape.factorSlice, 1),
      unfolding: accelerationShape.unfolding.describe('How the scan is unfolded; left out: what the scanner says.').optional(),
      referenceLines: orElse(accelerationShape.referenceLines, 0),
      referencePartitions: orElse(accelerationShape.referencePartitions, 0),
      referenceInImage: orElse(accelerationShape.referenceInImage, true),
      calibrationS: orElse(accelerationShape.calibrationS, 0),
    }).prefault({}).describe('Parallel imaging; left out: none.'),
    presaturation: z
      .array(strict({
        ...presaturationShape,
        nominalFlipDeg: orElse(presaturationShape.nominalFlipDeg, 90),
        delayMs: orElse(presaturationShape.delayMs, 10),
      }))
      .max(6)
      .default([])
      .describe('Presaturation bands; left out: none.'),
    coil: orElse(prescriptionShape.coil, CASE_DEFAULTS.prescription.coil),
  },
  'One sequence.',
);

const sideDistance = (name: string) =>
  quantity({ min: -1000, max: 1000, unit: 'mm', text: `Distance from the origin to the ${name} edge` }).optional();

export const boxInput = strict(
  {
    xMm: boxRange('From right (negative) to left [mm].').optional(),
    yMm: boxRange('From anterior (negative) to posterior [mm].').optional(),
    zMm: boxRange('From inferior (negative) to superior [mm].').optional(),
    right: sideDistance('right'), left: sideDistance('left'),
    anterior: sideDistance('anterior'), posterior: sideDistance('posterior'),
    superior: sideDistance('superior'), inferior: sideDistance('inferior'),
  },
  'A box in the patient, by ranges (xMm, yMm, zMm) or by the distance of its sides from the origin. ' +
    'What is left out ends where the displayed picture ends.',
);

export const keepClearInput = strict(
  {
    area: z
      .discriminatedUnion('kind', [
        strict({ kind: z.literal('whole-picture').describe('All that is displayed.') }),
        strict({ kind: z.literal('box'), box: boxInput, label: words(60, 'What the box holds.').optional() }),
      ], { error: refused('an area whose kind is whole-picture or box') })
      .default({ kind: 'whole-picture' })
      .describe('What must stay free of fold; left out: the whole picture.'),
    mustStayDisplayed: z.union([boxInput, patientBoxSchema]).describe('Anatomy that must stay displayed; left out: the area alone.').optional(),
    followsWindow: orElse(keepClearShape.followsWindow, false),
  },
  'The keep-clear area.',
);

const limits = scannerLimitsShape;
export const scannerInput = strict(
  {
    ...scannerShape,
    name: orElse(scannerShape.name, CASE_DEFAULTS.scanner.name),
    fieldStrengthT: orElse(scannerShape.fieldStrengthT, CASE_DEFAULTS.scanner.fieldStrengthT),
    boreDiameterMm: orElse(scannerShape.boreDiameterMm, CASE_DEFAULTS.scanner.boreDiameterMm),
    tableBelowCentreMm: orElse(scannerShape.tableBelowCentreMm, CASE_DEFAULTS.scanner.tableBelowCentreMm),
    anteriorCoilMm: orElse(scannerShape.anteriorCoilMm, CASE_DEFAULTS.scanner.anteriorCoilMm),
    lineStep: orElse(scannerShape.lineStep, { kind: 'line' }),
    oversamplingForm: scannerShape.oversamplingForm
      .describe('How this scanner takes phase oversampling; left out: percent, or a doubling switch with the doubling step.')
      .optional(),
    sliceOversamplingForm: orElse(scannerShape.sliceOversamplingForm, 'percent'),
    partitionStep: orElse(scannerShape.partitionStep, 1),
    phaseFovMayExceedReadoutFov: orElse(scannerShape.phaseFovMayExceedReadoutFov, false),
    unfolding: orElse(scannerShape.unfolding, 'unknown'),
    tissueReachMm: orElse(scannerShape.tissueReachMm, CASE_DEFAULTS.scanner.tissueReachMm),
    respiratoryWindow: orElse(scannerShape.respiratoryWindow, CASE_DEFAULTS.scanner.respiratoryWindow),
    limits: strict({
      fovMinMm: orElse(limits.fovMinMm, 10),
      fovMaxMm: orElse(limits.fovMaxMm, 600),
      usableFovMm: orElse(limits.usableFovMm, [600, 600, 600]),
      matrixMax: orElse(limits.matrixMax, 1024),
      acquiredLinesMax: orElse(limits.acquiredLinesMax, 2048),
      phaseOversamplingMaxPct: orElse(limits.phaseOversamplingMaxPct, 200),
      sliceOversamplingMaxPct: orElse(limits.sliceOversamplingMaxPct, 200),
      accelerationPhaseMax: orElse(limits.accelerationPhaseMax, 4),
      accelerationSliceMax: orElse(limits.accelerationSliceMax, 3),
      partialFourierMin: orElse(limits.partialFourierMin, 0.625),
      averagesMax: orElse(limits.averagesMax, 16),
      echoTrainMax: orElse(limits.echoTrainMax, 400),
      tableLimitKg: orElse(limits.tableLimitKg, 250),
    }).prefault({}).describe('Hard limits; left out: wide generic ones.'),
  },
  'The scanner; left out: a generic one that takes any whole number of lines.',
);

export const policyInput = strict(
  {
    version: policyShape.version.optional(),
    marginMm: z
      .union([
        quantity({ min: 0, max: 100, unit: 'mm', text: 'The same safety margin on every side' }),
        strict(marginShape).partial(),
      ], { error: refused('a number from 0 to 100 mm, or an object of sides') })
      .describe('Safety margin: dilation of tissue a side [mm], one number for all sides or by side.')
      .optional(),
    tissueTolerance: policyShape.tissueTolerance.optional(),
    slabTolerance: policyShape.slabTolerance.optional(),
    sureAt: policyShape.sureAt.optional(),
    unknownTimeBandwidthProduct: policyShape.unknownTimeBandwidthProduct.optional(),
    presaturationB1Scale: policyShape.presaturationB1Scale,
    tissueT1Ms: strict(tissueT1Shape).partial().describe('T1 for spoiled slab profiles [ms].').optional(),
    geometryFactorByOverlap: strict(geometryShape).partial().describe('Geometry factor range by overlap count.').optional(),
    strictBreathHold: policyShape.strictBreathHold.optional(),
    tolerateFoldOutsidePct: policyShape.tolerateFoldOutsidePct.optional(),
    readingExpiryDays: policyShape.readingExpiryDays.optional(),
    signOffAlways: policyShape.signOffAlways.optional(),
    weights: strict({ ...weightsShape, swap: strict(swapShape).partial().describe('Swapping the phase direction, by body part [points].') })
      .partial()
      .describe('Cost points; 1 point is as bad as 1 % more scan time.')
      .optional(),
  },
  'Site policy; what is left out comes from the standard policy.',
);

export const caseInput = strict(
  {
    patient: patientInput,
    prescription: prescriptionInput,
    keepClear: keepClearInput.prefault({}).describe('The keep-clear area; left out: the whole picture.'),
    scanner: scannerInput.prefault({}).describe('The scanner; left out: a generic one.'),
    policy: policyInput.prefault({}).describe('Site policy; left out: the standard one.'),
  },
  'A case: one patient, one sequence, what must stay free of fold, one scanner, one policy.',
);

export type CaseInput = z.input<typeof caseInput>;
export type ParsedCaseInput = z.output<typeof caseInput>;
