import { SIDES } from '../model/axes';
import type { Patient, PartShape, Reading, SolidPart } from '../model/patient';
import { requireBetween, requireOneOf, requireThat } from './require';

const REGIONS = ['abdomen', 'pelvis', 'chest', 'head', 'shoulder', 'hip', 'knee', 'breast'];
const POSITIONS = ['head-first-supine', 'feet-first-supine', 'head-first-prone', 'feet-first-prone'];
const ARM_POSITIONS = ['down', 'up', 'cannot-be-raised'];
const KINDS = ['trunk', 'arm', 'head', 'nose', 'breast', 'leg', 'other'];

function validateReading(argument: string, reading: Reading, low: number, high: number, unit: string): void {
  requireBetween(`${argument}.value`, reading.value, low, high, unit);
  requireBetween(`${argument}.spread`, reading.spread, 0, high, unit);
}

function validateShape(argument: string, shape: PartShape): void {
  if (shape.type === 'outline-prism') {
    requireThat(
      shape.rings.length > 0,
      'no-outline',
      `${argument}.rings`,
      'no ring',
      'at least one closed ring',
    );
    shape.rings.forEach((ring, index) => {
      const name = `${argument}.rings[${index}]`;
      requireThat(ring.length >= 3, 'outline-too-short', name, `${ring.length} points`, 'at least 3 points');
      for (const point of ring) {
        requireBetween(name, point[0], -2000, 2000, 'mm');
        requireBetween(name, point[1], -2000, 2000, 'mm');
      }
    });
  } else {
    shape.centreMm.forEach((value) => requireBetween(`${argument}.centreMm`, value, -2000, 2000, 'mm'));
    for (const semiAxis of shape.semiAxesMm)
      requireBetween(`${argument}.semiAxesMm`, semiAxis, 0.1, 2000, 'mm');
  }
  if (shape.type === 'ellipsoid') return;
  requireOneOf(`${argument}.along`, shape.along, ['x', 'y', 'z']);
  const from = shape.fromMm ?? -Infinity;
  const to = shape.toMm ?? Infinity;
  requireThat(from <= to, 'range-reversed', `${argument}.fromMm`, from, `at most toMm (${to})`);
}

function validatePart(argument: string, part: SolidPart): void {
  requireThat(part.name.trim() !== '', 'no-name', `${argument}.name`, 'nothing', 'a name');
  requireOneOf(`${argument}.kind`, part.kind, KINDS);
  requireBetween(`${argument}.signalWeight`, part.signalWeight, 0, 100, '');
  validateShape(`${argument}.shape`, part.shape);
}

/**
 * Checks every number of a patient against its domain.
 * @throws DomainError naming the argument (`patient.extents.anterior.value`), the value and the allowed range.
 */
export function validatePatient(patient: Patient): void {
  requireOneOf('patient.region', patient.region, REGIONS);
  requireOneOf('patient.position', patient.position, POSITIONS);
  for (const side of SIDES) validateReading(`patient.extents.${side}`, patient.extents[side], 0, 1500, 'mm');
  const { arms } = patient;
  requireOneOf('patient.arms.position', arms.position, ARM_POSITIONS);
  requireBetween('patient.arms.breadthMm', arms.breadthMm, 0, 400, 'mm');
  requireBetween('patient.arms.depthMm', arms.depthMm, 0, 400, 'mm');
  requireBetween('patient.arms.gapMm', arms.gapMm, 0, 400, 'mm');
  if (patient.weightKg !== undefined) validateReading('patient.weightKg', patient.weightKg, 1, 600, 'kg');
  if (patient.heightCm !== undefined) validateReading('patient.heightCm', patient.heightCm, 30, 260, 'cm');
  validateReading('patient.breathHoldS', patient.breathHoldS, 0, 120, 's');
  validateReading('patient.breathPeriodS', patient.breathPeriodS, 1, 20, 's');
  requireBetween('patient.lateralOffsetMm', patient.lateralOffsetMm, -500, 500, 'mm');
  requireBetween('patient.isocentreZMm', patient.isocentreZMm, -2000, 2000, 'mm');
  if (patient.parts === undefined) return;
  patient.parts.forEach((part, index) => validatePart(`patient.parts[${index}]`, part));
  const names = new Set(patient.parts.map((part) => part.name));
  requireThat(
    names.size === patient.parts.length,
    'name-repeated',
    'patient.parts',
    'a repeated name',
    'one name a part',
  );
}
