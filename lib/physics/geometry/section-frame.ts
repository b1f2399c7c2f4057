import type { PatientAxis, Vec3 } from '../model/axes';
import { DomainError } from '../model/domain-error';
import type { Plane, Prescription } from '../model/prescription';
import { add, AXIS_VECTOR, dot, rotateAbout, scale } from './vector';

/**
 * A section's own axes. Section coordinates of a patient point P are the plain projections
 * (readout, phase, slice) = (P·readout, P·phase, P·slice): a rotation of patient coordinates without an offset, so the
 * body stands still when the FOV centre moves. The FOV centre lies at (centreReadoutMm, centrePhaseMm).
 */
export interface SectionFrame {
  /** Centre of the displayed picture in patient coordinates, mm: the FOV centre moved by the slice offset. */
  readonly originMm: Vec3;
  readonly readout: Vec3;
  readonly phase: Vec3;
  readonly slice: Vec3;
  /** Patient axes these stood for before tilts and rotation. */
  readonly readoutAxis: PatientAxis;
  readonly phaseAxis: PatientAxis;
  readonly sliceAxis: PatientAxis;
  /** Section coordinates of originMm. */
  readonly centreReadoutMm: number;
  readonly centrePhaseMm: number;
  readonly sliceMm: number;
}

/** The two patient axes that lie in a plane, in x, y, z order, and the one across it. */
export const PLANE_AXES: Readonly<Record<Plane, readonly [PatientAxis, PatientAxis, PatientAxis]>> = {
  axial: ['RL', 'AP', 'SI'],
  coronal: ['RL', 'SI', 'AP'],
  sagittal: ['AP', 'SI', 'RL'],
};

type FramedPrescription = Pick<
  Prescription,
  'plane' | 'phaseAxis' | 'centreMm' | 'tiltAboutReadoutDeg' | 'tiltAboutPhaseDeg' | 'inPlaneRotationDeg'
>;

/**
 * Frame of the section `sliceOffsetMm` [mm] from the FOV centre along the slice axis.
 *
 * Before tilts all three axes are positive patient axes. The plane is then turned about its in-plane axis that comes
 * first in x, y, z order, next about the (turned) other one, last in itself about its normal; all right-handed.
 * The order does not depend on which axis carries phase: swapping phase and readout together with their tilts
 * keeps the same plane.
 * @throws DomainError "phase-axis-not-in-plane"
 */
export function sectionFrame(prescription: FramedPrescription, sliceOffsetMm = 0): SectionFrame {
  const [firstAxis, secondAxis, sliceAxis] = PLANE_AXES[prescription.plane];
  const { phaseAxis } = prescription;
  if (phaseAxis !== firstAxis && phaseAxis !== secondAxis) {
    throw new DomainError('phase-axis-not-in-plane', 'phaseAxis', phaseAxis, `${firstAxis} or ${secondAxis}`);
  }
  const phaseIsFirst = phaseAxis === firstAxis;
  const tiltFirst = phaseIsFirst ? prescription.tiltAboutPhaseDeg : prescription.tiltAboutReadoutDeg;
  const tiltSecond = phaseIsFirst ? prescription.tiltAboutReadoutDeg : prescription.tiltAboutPhaseDeg;

  let first = AXIS_VECTOR[firstAxis];
  let second = rotateAbout(AXIS_VECTOR[secondAxis], first, tiltFirst);
  let slice = rotateAbout(AXIS_VECTOR[sliceAxis], first, tiltFirst);
  first = rotateAbout(first, second, tiltSecond);
  slice = rotateAbout(slice, second, tiltSecond);
  first = rotateAbout(first, slice, prescription.inPlaneRotationDeg);
  second = rotateAbout(second, slice, prescription.inPlaneRotationDeg);

  const phase = phaseIsFirst ? first : second;
  const readout = phaseIsFirst ? second : first;
  const originMm = add(prescription.centreMm, scale(slice, sliceOffsetMm));
  return {
    originMm,
    readout,
    phase,
    slice,
    readoutAxis: phaseIsFirst ? secondAxis : firstAxis,
    phaseAxis,
    sliceAxis,
    centreReadoutMm: dot(originMm, readout),
    centrePhaseMm: dot(originMm, phase),
    sliceMm: dot(originMm, slice),
  };
}

/** Patient point [mm] → (readout, phase, slice) [mm]. */
export function toSection(frame: SectionFrame, pointMm: Vec3): Vec3 {
  return [dot(pointMm, frame.readout), dot(pointMm, frame.phase), dot(pointMm, frame.slice)];
}

/** (readout, phase) [mm] in this section (or a given slice coordinate) → patient point [mm]. */
export function toPatient(
  frame: SectionFrame,
  readoutMm: number,
  phaseMm: number,
  sliceMm: number = frame.sliceMm,
): Vec3 {
  return add(add(scale(frame.readout, readoutMm), scale(frame.phase, phaseMm)), scale(frame.slice, sliceMm));
}

/**
 * Offsets of slice or partition centres from the FOV centre along the slice axis, ascending [mm].
 * A stack is centred on the FOV centre; a slab's N_z partitions fill its nominal thickness.
 */
export function sliceOffsetsMm(prescription: Pick<Prescription, 'slices'>): number[] {
  const { slices } = prescription;
  const count = slices.mode === 'stack' ? slices.slices : slices.partitions;
  const pitch = slices.mode === 'stack' ? slices.thicknessMm + slices.gapMm : slices.partitionThicknessMm;
  return Array.from({ length: count }, (_, i) => (i - (count - 1) / 2) * pitch);
}

/** As sliceOffsetsMm, without the end partitions a plan gives up. */
export function displayedSliceOffsetsMm(prescription: Pick<Prescription, 'slices'>): number[] {
  const offsets = sliceOffsetsMm(prescription);
  if (prescription.slices.mode === 'stack') return offsets;
  const dropped = prescription.slices.droppedPartitionsPerEnd;
  return offsets.slice(dropped, offsets.length - dropped);
}
