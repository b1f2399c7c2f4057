import { screenFrame, sidesOfPlane, sideVector, toPatient, toScreen, type ScreenPoint } from '@/components/schematic/scene/section-frame';
import { fromWindow, inWindow, windowFrame } from '@/components/schematic/scene/window-frame';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import { AXIS_SIDES, dot } from '@/lib/physics/geometry/vector';
import type { Side } from '@/lib/physics/model/axes';
import type { Case } from '@/lib/physics/model/case';
import { AXIS_WORDS } from '@/lib/presentation/anatomy-words';
import { boxHandles, withBoxHandle } from './box-handles';
import { keepClearOf, sequenceById, type BenchSetting } from './bench-document';
import type { BenchAction, BenchState } from './bench-state';
import { caseOf } from './case-of';
import { withValue } from './reading-edit';
import { nudgedRotation, ROTATION_ID, rotationHandle, rotationTowards } from './rotation-handle';

export type HandleKind = 'fov-edge' | 'fov-rotation' | 'fov-centre' | 'keep-clear-edge' | 'must-stay-edge' | 'extent' | 'lateral-offset';

/** Something on the canvas that can be taken hold of, with the typed field that is its twin. */
export interface BenchHandle {
  /** Stable: "fov-phase-low", "fov-centre", "keep-clear-anterior", "must-stay-left", "extent-left". */
  readonly id: string;
  readonly kind: HandleKind;
  /** What it is, for screen readers and the hint. */
  readonly label: string;
  readonly at: ScreenPoint;
  /** Direction it moves in; absent: both. */
  readonly along?: ScreenPoint;
  /** The figure shown while it is held or focused. */
  readonly figure: string;
  /** The value of the twin field, with its range; absent for the centre, which moves both ways. */
  readonly value?: { readonly now: number; readonly min: number; readonly max: number };
}

/** Beside the furthest point of the body: there the edge of the window often lies. */
const ASIDE_MM = 34;

const MM = (value: number): string => `${Math.round(value)} mm`;

export function benchHandles(question: Case): readonly BenchHandle[] {
  const { prescription } = question;
  const window = windowFrame(prescription);
  const { phaseAxis, readoutAxis } = sectionFrame(prescription);
  const { limits } = question.scanner;
  const [low, high] = [-1, 1] as const;
  const fovEdges = ([['phase', low], ['phase', high], ['readout', low], ['readout', high]] as const).map(
    ([direction, sign]): BenchHandle => {
      const isPhase = direction === 'phase';
      const half = isPhase ? window.halfPhaseMm : window.halfReadoutMm;
      const axis = isPhase ? phaseAxis : readoutAxis;
      return {
        id: `fov-${direction}-${sign < 0 ? 'low' : 'high'}`,
        kind: 'fov-edge',
        label: `FOV edge, ${AXIS_SIDES[axis][sign < 0 ? 0 : 1]}`,
        at: isPhase ? inWindow(window, sign * half, 0) : inWindow(window, 0, sign * half),
        along: isPhase ? window.phase : window.readout,
        figure: `FOV ${AXIS_WORDS[axis]} ${MM(2 * half)}`,
        value: { now: 2 * half, min: limits.fovMinMm, max: limits.fovMaxMm },
      };
    },
  );
  const centre: BenchHandle = {
    id: 'fov-centre',
    kind: 'fov-centre',
    label: 'FOV centre',
    at: window.centre,
    figure: `centre ${prescription.centreMm.map((c) => Math.round(c)).join(', ')} mm`,
  };
  // The last lies on top where handles meet: the window is what is moved most.
  return [...extentHandles(question), ...boxHandles(question.keepClear, prescription), centre, rotationHandle(prescription), ...fovEdges];
}

function extentHandles({ patient, prescription }: Case): BenchHandle[] {
  if (patient.parts) return []; // Outlines replace the body that the extents would build.
  const frame = screenFrame(prescription);
  const value = (side: Side): number => patient.extents[side].value;
  const middle = toScreen(frame, [
    (value('left') - value('right')) / 2,
    (value('posterior') - value('anterior')) / 2,
    (value('superior') - value('inferior')) / 2,
  ]);
  return sidesOfPlane(prescription.plane)
    .filter((side) => side !== 'superior' && side !== 'inferior')
    .map((side): BenchHandle => {
      const direction = toScreen(frame, sideVector(side));
      const along = middle[0] * direction[0] + middle[1] * direction[1];
      const reach = value(side) - along;
      return {
        id: `extent-${side}`,
        kind: 'extent',
        label: `Body extent, ${side}`,
        at: [
          middle[0] + direction[0] * reach - direction[1] * ASIDE_MM,
          middle[1] + direction[1] * reach + direction[0] * ASIDE_MM,
        ],
        along: direction,
        figure: `body ${side} ${MM(value(side))}`,
        value: { now: value(side), min: 0, max: 1000 },
      };
    });
}

/** As far as a patient can lie from the scanner's mid-line, mm. */
export const LATERAL_MAX_MM = 300;

/** In the bore: the patient's mid-line, held where it meets the table. */
export function boreHandles({ patient, scanner }: Pick<Case, 'patient' | 'scanner'>): readonly BenchHandle[] {
  const now = patient.lateralOffsetMm;
  const side = now === 0 ? 'in the middle' : `to the ${now > 0 ? 'left' : 'right'}`;
  return [
    {
      id: 'lateral-offset',
      kind: 'lateral-offset',
      label: 'Patient’s mid-line from the scanner’s, positive to the patient’s left',
      at: [now, scanner.tableBelowCentreMm],
      along: [1, 0],
      figure: now === 0 ? side : `${MM(Math.abs(now))} ${side}`,
      value: { now, min: -LATERAL_MAX_MM, max: LATERAL_MAX_MM },
    },
  ];
}

/** The edit that putting a handle at a point of the picture means; whole millimetres. */
export function moveHandle(
  state: BenchState,
  setting: BenchSetting,
  id: string,
  to: ScreenPoint,
  step?: string,
): BenchAction | null {
  if (id === 'lateral-offset') {
    const lateralOffsetMm = Math.min(LATERAL_MAX_MM, Math.max(-LATERAL_MAX_MM, Math.round(to[0])));
    return { type: 'edit-patient', patch: { lateralOffsetMm }, ...(step === undefined ? {} : { step }) };
  }
  const sequence = sequenceById(state.document, state.activeId);
  const { prescription } = sequence;
  const frame = screenFrame(prescription);
  const window = windowFrame(prescription);
  const withStep = step === undefined ? {} : { step };
  if (id === ROTATION_ID) {
    return { type: 'edit-prescription', patch: { inPlaneRotationDeg: rotationTowards(prescription, to) }, ...withStep };
  }
  if (id === 'fov-centre') {
    const along = dot(frame.normal, prescription.centreMm);
    const centreMm = toPatient(frame, [Math.round(to[0]), Math.round(to[1])], along);
    return { type: 'edit-prescription', patch: { centreMm }, ...withStep };
  }
  if (id.startsWith('fov-')) {
    const [phase, readout] = fromWindow(window, to);
    const isPhase = id.startsWith('fov-phase');
    const sign = id.endsWith('-low') ? -1 : 1;
    const fov = Math.max(state.document.scanner.limits.fovMinMm, Math.round(2 * sign * (isPhase ? phase : readout)));
    return { type: 'edit-prescription', patch: isPhase ? { fovPhaseMm: fov } : { fovReadoutMm: fov }, ...withStep };
  }
  const reachOf = (side: Side): number => {
    const direction = toScreen(frame, sideVector(side));
    return Math.round(to[0] * direction[0] + to[1] * direction[1]);
  };
  const keepClear = withBoxHandle(keepClearOf(state.document, sequence), id, reachOf);
  if (keepClear !== undefined) return keepClear && { type: 'edit-keep-clear', keepClear, ...withStep };
  const side = id.replace(/^extent-/, '') as Side;
  const reading = withValue(state.document.patient.extents[side], Math.max(0, reachOf(side)), setting.today);
  return { type: 'edit-extent', side, reading, ...withStep };
}

/** One arrow key: `byMm` along the key's direction on the screen; null when this handle does not move that way. */
export function nudgeHandle(
  state: BenchState,
  setting: BenchSetting,
  id: string,
  by: ScreenPoint,
  step?: string,
): BenchAction | null {
  const question = caseOf(state.document, setting, sequenceById(state.document, state.activeId));
  const handle = [...benchHandles(question), ...boreHandles(question)].find((each) => each.id === id);
  if (!handle) return null;
  if (id === ROTATION_ID) {
    const inPlaneRotationDeg = nudgedRotation(question.prescription, by);
    return { type: 'edit-prescription', patch: { inPlaneRotationDeg }, ...(step === undefined ? {} : { step }) };
  }
  if (handle.along) {
    const share = by[0] * handle.along[0] + by[1] * handle.along[1];
    if (Math.abs(share) < 1e-6) return null;
  }
  return moveHandle(state, setting, id, [handle.at[0] + by[0], handle.at[1] + by[1]], step);
}
