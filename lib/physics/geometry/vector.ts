import type { PatientAxis, Side, Vec3 } from '../model/axes';

export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const scale = (a: Vec3, k: number): Vec3 => [a[0] * k, a[1] * k, a[2] * k];
export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** Cosine and sine of an angle in degrees; multiples of 90° are exact, so that an untilted plane stays untilted. */
export function cosSin(degrees: number): readonly [number, number] {
  const turns = ((degrees % 360) + 360) % 360;
  if (turns === 0) return [1, 0];
  if (turns === 90) return [0, 1];
  if (turns === 180) return [-1, 0];
  if (turns === 270) return [0, -1];
  const radians = (turns * Math.PI) / 180;
  return [Math.cos(radians), Math.sin(radians)];
}

/** Right-handed rotation of v about the unit vector `axis` (Rodrigues). */
export function rotateAbout(v: Vec3, axis: Vec3, degrees: number): Vec3 {
  if (degrees === 0) return v;
  const [c, s] = cosSin(degrees);
  const along = dot(axis, v) * (1 - c);
  const perpendicular = cross(axis, v);
  return [
    v[0] * c + perpendicular[0] * s + axis[0] * along,
    v[1] * c + perpendicular[1] * s + axis[1] * along,
    v[2] * c + perpendicular[2] * s + axis[2] * along,
  ];
}

/** Positive unit vector of a patient axis (LPS: left, posterior, superior are positive). */
export const AXIS_VECTOR: Readonly<Record<PatientAxis, Vec3>> = {
  RL: [1, 0, 0],
  AP: [0, 1, 0],
  SI: [0, 0, 1],
};

/** The sides at the negative and positive end of a patient axis. */
export const AXIS_SIDES: Readonly<Record<PatientAxis, readonly [Side, Side]>> = {
  RL: ['right', 'left'],
  AP: ['anterior', 'posterior'],
  SI: ['inferior', 'superior'],
};
