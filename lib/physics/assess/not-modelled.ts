import type { Reason } from '../model/assessment';
import type { Prescription, Trajectory } from '../model/prescription';

const TRAJECTORY_WORDS: Readonly<Record<Exclude<Trajectory, 'cartesian'>, string>> = {
  radial: 'Radial sampling streaks instead of folding',
  spiral: 'Spiral sampling blurs and rings instead of folding',
  'rotating-blade': 'Rotating-blade sampling folds differently in every blade',
  'simultaneous-multi-slice': 'Slices excited together mix with one another before they fold',
  'outer-volume-suppressed':
    'A small FOV with outer-volume suppression depends on how well the suppression works',
};

/** Why this prescription is answered "not modelled"; never read as "no fold". Undefined: it is modelled. */
export function notModelledReason(p: Prescription): Reason | undefined {
  if (p.trajectory === 'cartesian') return undefined;
  return {
    code: `trajectory-${p.trajectory}`,
    text: `${TRAJECTORY_WORDS[p.trajectory]}: the model holds for Cartesian sampling only and says nothing about fold here.`,
  };
}
