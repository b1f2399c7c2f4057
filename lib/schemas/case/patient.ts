import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { PartShape, Patient, Reading, Side, SolidPart } from '@/lib/domain/case/model';
import { choice, day, flag, quantity, range, refused, strict, words } from '@/lib/schemas/fields/fields';

type ShapeOf<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

export const READING_SOURCES = [
  'measured', 'localiser', 'reported', 'girth-and-depth', 'girth', 'weight-and-height', 'population', 'policy-default',
] as const;

export const REGIONS = ['abdomen', 'pelvis', 'chest', 'head', 'shoulder', 'hip', 'knee', 'breast'] as const;
export const ARM_POSITIONS = ['down', 'up', 'cannot-be-raised'] as const;
export const PATIENT_POSITIONS = [
  'head-first-supine', 'feet-first-supine', 'head-first-prone', 'feet-first-prone',
] as const;

const position = { min: -1500, max: 1500, unit: 'mm' as const };

export const vec3Schema = (text: string) =>
  z
    .tuple(
      [
        quantity({ ...position, text: 'x, to the patient’s left' }),
        quantity({ ...position, text: 'y, posterior' }),
        quantity({ ...position, text: 'z, superior' }),
      ],
      { error: refused('three numbers, x y z in mm') },
    )
    .describe(text);

/** A reading in the unit its field says, with how it was got. */
export function readingSchema(value: z.ZodNumber, spreadMax: number, text: string) {
  const unit = /\[([^\]]+)\]/.exec(value.description ?? '')?.[1] ?? '1';
  return strict(
    {
      value,
      source: choice(READING_SOURCES, 'How the value was got; only measured and localiser count as measured.'),
      takenOn: day('Day the value was taken, YYYY-MM-DD.').optional(),
      spread: quantity({
        min: 0, max: spreadMax, unit: unit as 'mm', text: 'One standard deviation of the value',
      }),
    } satisfies ShapeOf<Reading>,
    text,
  );
}

const extent = (side: Side) =>
  quantity({ min: 0, max: 1000, unit: 'mm', text: `Extent from the origin to the ${side} end of the body part` });

export const extentsShape = {
  right: readingSchema(extent('right'), 200, 'Extent to the patient’s right.'),
  left: readingSchema(extent('left'), 200, 'Extent to the patient’s left.'),
  anterior: readingSchema(extent('anterior'), 200, 'Extent to the front.'),
  posterior: readingSchema(extent('posterior'), 200, 'Extent to the back.'),
  superior: readingSchema(extent('superior'), 200, 'Extent towards the head.'),
  inferior: readingSchema(extent('inferior'), 200, 'Extent towards the feet.'),
} satisfies ShapeOf<Record<Side, Reading>>;

const semiAxis = (text: string) => quantity({ min: 0.1, max: 1000, unit: 'mm', text });
const alongSchema = choice(['x', 'y', 'z'], 'Patient axis the prism runs along: x left, y posterior, z superior.');
const fromMm = quantity({ ...position, text: 'Lower end along the axis; left out: as far as coil and magnet see' });
const toMm = quantity({ ...position, text: 'Upper end along the axis; left out: as far as coil and magnet see' });

const outlinePoint = z.tuple([
  quantity({ ...position, text: 'First of the two patient axes across the prism' }),
  quantity({ ...position, text: 'Second of the two patient axes across the prism' }),
]);

type ShapeOfType<T extends PartShape['type']> = ShapeOf<Extract<PartShape, { type: T }>>;

export const partShapeSchema = z
  .discriminatedUnion(
    'type',
    [
      strict({
        type: z.literal('elliptic-cylinder'),
        along: alongSchema,
        centreMm: vec3Schema('Centre, patient coordinates [mm].'),
        semiAxesMm: z
          .tuple([semiAxis('First semi-axis'), semiAxis('Second semi-axis')])
          .describe('Semi-axes on the two axes across the cylinder, in the order x, y, z [mm].'),
        rotationDeg: quantity({ min: -360, max: 360, unit: 'degrees', text: 'Rotation about the axis, right-handed' })
          .optional(),
        fromMm: fromMm.optional(),
        toMm: toMm.optional(),
      } satisfies ShapeOfType<'elliptic-cylinder'>),
      strict({
        type: z.literal('ellipsoid'),
        centreMm: vec3Schema('Centre, patient coordinates [mm].'),
        semiAxesMm: z
          .tuple([semiAxis('Semi-axis along x'), semiAxis('Semi-axis along y'), semiAxis('Semi-axis along z')])
          .describe('Semi-axes along x, y and z [mm].'),
      } satisfies ShapeOfType<'ellipsoid'>),
      strict({
        type: z.literal('outline-prism'),
        along: alongSchema,
        rings: z
          .array(z.array(outlinePoint).min(3).max(2000))
          .min(1)
          .max(50)
          .describe('Closed rings of points [mm], even-odd rule: a ring inside another is a hole.'),
        fromMm: fromMm.optional(),
        toMm: toMm.optional(),
      } satisfies ShapeOfType<'outline-prism'>),
    ],
    { error: refused('a shape whose type is elliptic-cylinder, ellipsoid or outline-prism') },
  )
  .refine((shape) => !('fromMm' in shape) || (shape.fromMm ?? -Infinity) < (shape.toMm ?? Infinity), {
    error: 'fromMm must be below toMm',
    path: ['toMm'],
  });

export const partShape = {
  name: words(40, 'Unique in its body, shown to people: "trunk", "right arm".'),
  kind: choice(['trunk', 'arm', 'head', 'nose', 'breast', 'leg', 'other'], 'What the part is.'),
  shape: partShapeSchema.describe('Elliptic cylinder, ellipsoid or outline prism [mm].'),
  signalWeight: quantity({ min: 0, max: 10, unit: '1', text: 'Signal relative to trunk tissue; unknown is 1' }),
  estimated: flag('True when the part was not measured.'),
} satisfies ShapeOf<SolidPart>;

/** The engine compares every edge with every other; an outline of 240 points keeps a body of 500 mm within 1 mm. */
export const OUTLINE_POINTS_MAX = 240;

/** Refuses a body whose outlines hold more points than can be answered while someone waits. */
export function withinOutlinePoints(parts: readonly { readonly shape: PartShape }[]): boolean {
  const points = parts.map(({ shape }) => (shape.type === 'outline-prism' ? shape.rings.flat().length : 0));
  return points.reduce((sum, each) => sum + each, 0) <= OUTLINE_POINTS_MAX;
}
export const TOO_MANY_POINTS = `more outline points than fit; allowed: ${OUTLINE_POINTS_MAX} in all parts together, thin the outlines`;

export const patientShape = {
  region: choice(REGIONS, 'Body part under question.'),
  extents: strict(extentsShape, 'Extent of the body part each side of the origin [mm].'),
  arms: strict(
    {
      position: choice(ARM_POSITIONS, 'Where the arms are; cannot-be-raised keeps them down and rules raising out.'),
      breadthMm: quantity({ min: 20, max: 300, unit: 'mm', text: 'Right–left breadth of one arm' }),
      depthMm: quantity({ min: 20, max: 300, unit: 'mm', text: 'Anterior–posterior depth of one arm' }),
      gapMm: quantity({ min: 0, max: 300, unit: 'mm', text: 'Gap between trunk and arm' }),
    } satisfies ShapeOf<Patient['arms']>,
    'Arms.',
  ),
  weightKg: readingSchema(quantity({ min: 2, max: 500, unit: 'kg', text: 'Body weight' }), 100, 'Weight.').optional(),
  heightCm: readingSchema(quantity({ min: 40, max: 250, unit: 'cm', text: 'Height' }), 50, 'Height.').optional(),
  sex: choice(['female', 'male'], 'Only picks the regression a size is estimated from.').optional(),
  breathHoldS: readingSchema(
    quantity({ min: 0, max: 60, unit: 's', text: 'Longest breath-hold the patient can do' }), 30, 'Breath-hold.',
  ),
  breathPeriodS: readingSchema(
    quantity({ min: 1, max: 15, unit: 's', text: 'Time from breath to breath' }), 10, 'Breath period.',
  ),
  position: choice(PATIENT_POSITIONS, 'How the patient lies.'),
  pairedSide: choice(['right', 'left'], 'Which of a pair is imaged (knee); left out: not known, the other one is assumed on either side.')
    .optional(),
  legGapMm: quantity({ min: 0, max: 500, unit: 'mm', text: 'Gap between the knees; left out: 20' }).optional(),
  lateralOffsetMm: quantity({
    min: -300, max: 300, unit: 'mm', text: 'Patient’s mid-line from the scanner’s mid-line, positive to the patient’s left',
  }),
  isocentreZMm: quantity({ ...position, text: 'z of the magnet’s isocentre in patient coordinates' }),
  parts: z
    .array(strict(partShape))
    .min(1)
    .max(40)
    .refine((parts) => new Set(parts.map((part) => part.name)).size === parts.length, {
      error: 'every part needs a name of its own',
    })
    .refine(withinOutlinePoints, { error: TOO_MANY_POINTS })
    .describe('Replaces the body built from the extents, whole.')
    .optional(),
} satisfies ShapeOf<Patient>;

export const patientSchema = strict(patientShape, 'The patient, as the engine takes it.');

export const boxRange = (text: string) => range({ ...position, text: 'Position' }, text);
