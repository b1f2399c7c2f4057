/**
 * Prescriptions posed to the toolbox. Its Shepp-Logan phantom fills ±0.46 (first axis) and ±0.345 (second axis) of the
 * reference field F0, so a body of half-extents (a along the first axis) has F0 = a / 0.46.
 */
export interface BartPrescription {
  readonly name: string;
  /** Phase along the phantom's long axis (half-extent 0.46 F0) or its short one (0.345 F0). */
  readonly phaseAlong: 'long' | 'short';
  /** Half-extent of the long axis, mm; the short one is 0.75 of it. */
  readonly longHalfMm: number;
  /** Body centre along phase, mm, from the FOV centre. */
  readonly shiftMm: number;
  readonly fovMm: number;
  readonly lines: number;
  /** Keep-clear interval along phase, mm from the FOV centre, inside ±fov/2. */
  readonly keepClearMm: readonly [number, number];
}

export const LONG_SHARE = 0.46;
export const SHORT_SHARE = 0.345;

export const BART_PRESCRIPTIONS: readonly BartPrescription[] = [
  { name: 'long axis, a little small', phaseAlong: 'long', longHalfMm: 230, shiftMm: 0, fovMm: 400, lines: 200, keepClearMm: [-200, 200] },
  { name: 'long axis, much too small', phaseAlong: 'long', longHalfMm: 230, shiftMm: 0, fovMm: 300, lines: 192, keepClearMm: [-150, 150] },
  { name: 'long axis, large habitus', phaseAlong: 'long', longHalfMm: 270, shiftMm: 0, fovMm: 380, lines: 256, keepClearMm: [-190, 190] },
  { name: 'short axis, a little small', phaseAlong: 'short', longHalfMm: 240, shiftMm: 0, fovMm: 300, lines: 256, keepClearMm: [-150, 150] },
  { name: 'short axis, rectangular', phaseAlong: 'short', longHalfMm: 260, shiftMm: 0, fovMm: 280, lines: 224, keepClearMm: [-140, 140] },
  { name: 'short axis, covered', phaseAlong: 'short', longHalfMm: 200, shiftMm: 0, fovMm: 320, lines: 256, keepClearMm: [-160, 160] },
  { name: 'long axis, off centre', phaseAlong: 'long', longHalfMm: 210, shiftMm: 30, fovMm: 360, lines: 240, keepClearMm: [-180, 180] },
  { name: 'short axis, off centre', phaseAlong: 'short', longHalfMm: 230, shiftMm: -25, fovMm: 290, lines: 232, keepClearMm: [-145, 145] },
  { name: 'long axis, central keep-clear', phaseAlong: 'long', longHalfMm: 250, shiftMm: 0, fovMm: 340, lines: 272, keepClearMm: [-90, 90] },
  { name: 'long axis, one-sided keep-clear', phaseAlong: 'long', longHalfMm: 240, shiftMm: 0, fovMm: 340, lines: 272, keepClearMm: [-170, 20] },
  { name: 'short axis, one-sided keep-clear, off centre', phaseAlong: 'short', longHalfMm: 280, shiftMm: 20, fovMm: 300, lines: 240, keepClearMm: [-40, 150] },
  { name: 'long axis, second order reaches', phaseAlong: 'long', longHalfMm: 300, shiftMm: 40, fovMm: 200, lines: 160, keepClearMm: [-100, 100] },
  { name: 'limb-like, small field', phaseAlong: 'long', longHalfMm: 75, shiftMm: 18, fovMm: 120, lines: 192, keepClearMm: [-60, 60] },
];
