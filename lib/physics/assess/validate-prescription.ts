import { PLANE_AXES } from '../geometry/section-frame';
import type { Side } from '../model/axes';
import type { Acceleration, Prescription, PresaturationBand, Slab } from '../model/prescription';
import { SIDES } from '../model/axes';
import { requireBetween, requireOneOf, requireThat, requireWhole } from './require';

const FAMILIES = [
  'spin-echo',
  'gradient-echo',
  'echo-train-spin-echo',
  'single-shot-echo-train',
  'echo-planar',
  'balanced',
  'gradient-echo-3d',
  'echo-train-spin-echo-3d',
];
const TRAJECTORIES = [
  'cartesian',
  'radial',
  'spiral',
  'rotating-blade',
  'simultaneous-multi-slice',
  'outer-volume-suppressed',
];
const UNFOLDINGS = ['k-space-self-calibrating', 'image-domain-grid-ends', 'image-domain-beyond', 'unknown'];

function validateSlab(slab: Slab): void {
  const at = 'prescription.slices';
  requireWhole(`${at}.partitions`, slab.partitions, 1, 2048);
  requireBetween(`${at}.partitionThicknessMm`, slab.partitionThicknessMm, 0.1, 100, 'mm');
  requireWhole(`${at}.acquiredPartitions`, slab.acquiredPartitions, slab.partitions, 4096);
  if (slab.timeBandwidthProduct !== undefined) {
    requireBetween(`${at}.timeBandwidthProduct`, slab.timeBandwidthProduct, 1, 64, '');
  }
  if (slab.pulseDurationMs !== undefined)
    requireBetween(`${at}.pulseDurationMs`, slab.pulseDurationMs, 0.01, 50, 'ms');
  requireWhole(
    `${at}.droppedPartitionsPerEnd`,
    slab.droppedPartitionsPerEnd,
    0,
    Math.floor((slab.partitions - 1) / 2),
  );
}

function validateAcceleration(acceleration: Acceleration, p: Prescription): void {
  const at = 'prescription.acceleration';
  requireBetween(`${at}.factorPhase`, acceleration.factorPhase, 1, 16, '');
  requireBetween(`${at}.factorSlice`, acceleration.factorSlice, 1, 16, '');
  requireOneOf(`${at}.unfolding`, acceleration.unfolding, UNFOLDINGS);
  requireWhole(`${at}.referenceLines`, acceleration.referenceLines, 0, 1024);
  requireWhole(`${at}.referencePartitions`, acceleration.referencePartitions, 0, 1024);
  requireBetween(`${at}.calibrationS`, acceleration.calibrationS, 0, 600, 's');
  if (acceleration.geometryFactor !== undefined)
    requireBetween(`${at}.geometryFactor`, acceleration.geometryFactor, 1, 20, '');
  requireThat(
    acceleration.factorSlice === 1 || p.slices.mode === 'slab',
    'slice-acceleration-of-a-stack',
    `${at}.factorSlice`,
    acceleration.factorSlice,
    '1 for a stack of slices',
  );
}

function validateBand(band: PresaturationBand, index: number): void {
  const at = `prescription.presaturation[${index}]`;
  requireOneOf(`${at}.side`, band.side, SIDES as readonly Side[]);
  requireBetween(`${at}.innerEdgeMm`, band.innerEdgeMm, -1000, 2000, 'mm');
  requireBetween(`${at}.thicknessMm`, band.thicknessMm, 1, 2000, 'mm');
  requireBetween(`${at}.nominalFlipDeg`, band.nominalFlipDeg, 1, 180, 'degrees');
  requireBetween(`${at}.delayMs`, band.delayMs, 0, 1000, 'ms');
}

function validateTiming(p: Prescription): void {
  requireBetween('prescription.trMs', p.trMs, 0.5, 60_000, 'ms');
  requireBetween('prescription.teMs', p.teMs, 0, 10_000, 'ms');
  requireBetween('prescription.flipDeg', p.flipDeg, 0.1, 180, 'degrees');
  requireWhole('prescription.averages', p.averages, 1, 256);
  requireBetween('prescription.partialFourierPhase', p.partialFourierPhase, 0.501, 1, '');
  requireBetween('prescription.partialFourierSlice', p.partialFourierSlice, 0.501, 1, '');
  requireOneOf('prescription.partialFourierFill', p.partialFourierFill, ['conjugate', 'zero-filled']);
  requireWhole('prescription.echoTrainLength', p.echoTrainLength, 1, 4096);
  requireBetween('prescription.echoSpacingMs', p.echoSpacingMs, 0, 1000, 'ms');
  requireWhole('prescription.shots', p.shots, 1, 1024);
  if (p.fatDisplacedTowards !== undefined)
    requireOneOf('prescription.fatDisplacedTowards', p.fatDisplacedTowards, ['low-end', 'high-end']);
  requireWhole('prescription.volumes', p.volumes, 1, 10_000);
  requireBetween('prescription.bandwidthHzPerPixel', p.bandwidthHzPerPixel, 1, 20_000, 'Hz');
  requireBetween('prescription.sliceTimeMs', p.sliceTimeMs, 0, 60_000, 'ms');
  requireBetween('prescription.preparationMs', p.preparationMs, 0, 60_000, 'ms');
  requireWhole('prescription.segments', p.segments, 0, 10_000);
  requireOneOf('prescription.breathing', p.breathing, ['free', 'breath-hold', 'triggered']);
  if (p.breathing === 'triggered') requireWhole('prescription.breathsPerTr', p.breathsPerTr, 1, 10);
}

/**
 * Checks every number of a prescription against its domain (not against the scanner: those are hard limits).
 * @throws DomainError naming the argument, the value and the allowed range.
 */
export function validatePrescription(p: Prescription): void {
  requireOneOf('prescription.family', p.family, FAMILIES);
  requireOneOf('prescription.trajectory', p.trajectory, TRAJECTORIES);
  requireOneOf('prescription.plane', p.plane, ['axial', 'coronal', 'sagittal']);
  requireOneOf('prescription.phaseAxis', p.phaseAxis, PLANE_AXES[p.plane].slice(0, 2));
  requireBetween('prescription.tiltAboutReadoutDeg', p.tiltAboutReadoutDeg, -90, 90, 'degrees');
  requireBetween('prescription.tiltAboutPhaseDeg', p.tiltAboutPhaseDeg, -90, 90, 'degrees');
  requireBetween('prescription.inPlaneRotationDeg', p.inPlaneRotationDeg, -180, 180, 'degrees');
  p.centreMm.forEach((value) => requireBetween('prescription.centreMm', value, -2000, 2000, 'mm'));
  requireBetween('prescription.fovPhaseMm', p.fovPhaseMm, 1, 2000, 'mm');
  requireBetween('prescription.fovReadoutMm', p.fovReadoutMm, 1, 2000, 'mm');
  requireWhole('prescription.linesAcrossFov', p.linesAcrossFov, 8, 4096);
  requireWhole('prescription.readoutMatrix', p.readoutMatrix, 8, 4096);
  requireWhole('prescription.acquiredLines', p.acquiredLines, p.linesAcrossFov, 16_384);
  if (p.slices.mode === 'slab') validateSlab(p.slices);
  else {
    requireOneOf('prescription.slices.mode', p.slices.mode, ['stack', 'slab']);
    requireWhole('prescription.slices.slices', p.slices.slices, 1, 1024);
    requireBetween('prescription.slices.thicknessMm', p.slices.thicknessMm, 0.1, 500, 'mm');
    requireBetween('prescription.slices.gapMm', p.slices.gapMm, -200, 500, 'mm');
  }
  requireThat(
    p.family.endsWith('-3d') === (p.slices.mode === 'slab'),
    'slices-do-not-fit-family',
    'prescription.slices.mode',
    p.slices.mode,
    p.family.endsWith('-3d') ? 'slab for a 3D family' : 'stack for a 2D family',
  );
  validateTiming(p);
  validateAcceleration(p.acceleration, p);
  p.presaturation.forEach(validateBand);
}
