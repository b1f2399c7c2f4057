import type { PatientAxis, Side } from '@/lib/physics/model/axes';
import type { ArmPosition, BodyRegion, ReadingSource } from '@/lib/physics/model/patient';
import type { Plane, SequenceFamily } from '@/lib/physics/model/prescription';

export const AXIS_WORDS: Readonly<Record<PatientAxis, string>> = { RL: 'R–L', AP: 'A–P', SI: 'S–I' };

export const AXIS_NAMES: Readonly<Record<PatientAxis, string>> = {
  RL: 'right–left',
  AP: 'anterior–posterior',
  SI: 'superior–inferior',
};

export const SIDE_LETTERS: Readonly<Record<Side, string>> = {
  right: 'R',
  left: 'L',
  anterior: 'A',
  posterior: 'P',
  superior: 'S',
  inferior: 'I',
};

export const PLANE_WORDS: Readonly<Record<Plane, string>> = {
  axial: 'axial',
  coronal: 'coronal',
  sagittal: 'sagittal',
};

export const ARM_WORDS: Readonly<Record<ArmPosition, string>> = {
  up: 'up',
  down: 'down',
  'cannot-be-raised': 'cannot be raised',
};

export const FAMILY_WORDS: Readonly<Record<SequenceFamily, string>> = {
  'spin-echo': 'spin echo',
  'gradient-echo': 'gradient echo',
  'echo-train-spin-echo': 'echo-train spin echo',
  'single-shot-echo-train': 'single-shot echo train',
  'echo-planar': 'echo-planar (EPI)',
  balanced: 'balanced',
  'gradient-echo-3d': 'gradient echo 3D',
  'echo-train-spin-echo-3d': 'echo-train spin echo 3D',
};

export const REGION_WORDS: Readonly<Record<BodyRegion, string>> = {
  abdomen: 'abdomen',
  pelvis: 'pelvis',
  chest: 'chest',
  head: 'head',
  shoulder: 'shoulder',
  hip: 'hip',
  knee: 'knee',
  breast: 'breast',
};

export const SOURCE_WORDS: Readonly<Record<ReadingSource, string>> = {
  measured: 'measured',
  localiser: 'read off the localiser',
  reported: 'told by the patient',
  'girth-and-depth': 'worked out from girth and depth',
  girth: 'worked out from girth',
  'weight-and-height': 'estimated from weight and height',
  population: 'taken from population figures',
  'policy-default': 'site policy default',
};

/** Only a tape, callipers or the localiser count as measured; everything else is drawn dotted. */
export function isMeasured(source: ReadingSource): boolean {
  return source === 'measured' || source === 'localiser';
}
