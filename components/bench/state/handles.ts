import type { Side } from '@/lib/physics/model/axes';
import { fromWindow, inWindow, windowFrame } from '@/components/schematic/scene/window-frame';
import { dot, frameOf, sidesOfAxis, sideVector, toPatient, toScreen, type ScreenPoint } from '@/components/schematic/scene/section-frame';
import { AXIS_WORDS } from '@/lib/presentation/anatomy-words';
import { keepClearOf, sequenceById, type BenchSetting } from './bench-document';
import type { BenchAction, BenchState } from './bench-state';
import { withValue } from './reading-edit';
import { edgeOf, withEdge } from './window-box';

export type HandleKind = 'fov-edge' | 'fov-centre' | 'keep-clear-edge' | 'extent';

/** Something on the canvas that can be taken hold of, with the typed field that is its twin. */
export interface BenchHandle {
  /** Stable: "fov-phase-low", "fov-centre", "keep-clear-anterior", "extent-left". */
  readonly id: string;
  readonly kind: HandleKind;
  /** What it is, for screen readers and the hint. */
  readonly label: string;
  readonly at: ScreenPoint;
  /** Direction it moves in; absent: both. */
  readonly along?: ScreenPoint;
  /** The figure shown while it is held or focused. */
  readonly figure: string;
}

const MM = (value: number): string => `${Math.round(value)} mm`;

export function benchHandles(state: BenchState): readonly BenchHandle[] {
  const sequence = sequenceById(state.document, state.activeId);
  const { prescription } = sequence;
  const window = windowFrame(prescription);
  const [low, high] = [-1, 1] as const;
  const fovEdges = ([['phase', low], ['phase', high], ['readout', low], ['readout', high]] as const).map(
    ([direction, sign]): BenchHandle => {
      const isPhase = direction === 'phase';
      const half = isPhase ? window.halfPhaseMm : window.halfReadoutMm;
      const axis = isPhase ? prescription.phaseAxis : readoutAxisOf(state);
      return {
        id: `fov-${direction}-${sign < 0 ? 'low' : 'high'}`,
        kind: 'fov-edge',
        label: `FOV edge, ${edgeSide(state, direction, sign)}`,
        at: isPhase ? inWindow(window, sign * half, 0) : inWindow(window, 0, sign * half),
        along: isPhase ? window.phase : window.readout,
        figure: `FOV ${AXIS_WORDS[axis]} ${MM(2 * half)}`,
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
  return [...fovEdges, centre, ...keepClearHandles(state), ...extentHandles(state)];
}

function keepClearHandles(state: BenchState): BenchHandle[] {
  const sequence = sequenceById(state.document, state.activeId);
  const keepClear = keepClearOf(state.document, sequence);
  if (keepClear.area.kind !== 'box') return [];
  const frame = frameOf(sequence.prescription.plane);
  const { box } = keepClear.area;
  const middle = toScreen(frame, [mean(box.xMm), mean(box.yMm), mean(box.zMm)]);
  return Object.values(frame.sides).map((side): BenchHandle => {
    const direction = toScreen(frame, sideVector(side));
    const reach = edgeOf(box, side);
    const along = middle[0] * direction[0] + middle[1] * direction[1];
    return {
      id: `keep-clear-${side}`,
      kind: 'keep-clear-edge',
      label: `Keep-clear area, ${side} edge`,
      at: [middle[0] + direction[0] * (reach - along), middle[1] + direction[1] * (reach - along)],
      along: direction,
      figure: `keep-clear ${side} ${MM(reach)}`,
    };
  });
}

function extentHandles(state: BenchState): BenchHandle[] {
  const { patient } = state.document;
  if (patient.parts) return []; // Outlines replace the body that the extents would build.
  const frame = frameOf(sequenceById(state.document, state.activeId).prescription.plane);
  const value = (side: Side): number => patient.extents[side].value;
  const middle = toScreen(frame, [
    (value('left') - value('right')) / 2,
    (value('posterior') - value('anterior')) / 2,
    (value('superior') - value('inferior')) / 2,
  ]);
  return Object.values(frame.sides)
    .filter((side) => side !== 'superior' && side !== 'inferior')
    .map((side): BenchHandle => {
      const direction = toScreen(frame, sideVector(side));
      const along = middle[0] * direction[0] + middle[1] * direction[1];
      const reach = value(side) - along;
      return {
        id: `extent-${side}`,
        kind: 'extent',
        label: `Body extent, ${side}`,
        at: [middle[0] + direction[0] * reach, middle[1] + direction[1] * reach],
        along: direction,
        figure: `body ${side} ${MM(value(side))}`,
      };
    });
}

/** The edit that putting a handle at a point of the picture means; whole millimetres. */
export function moveHandle(
  state: BenchState,
  setting: BenchSetting,
  id: string,
  to: ScreenPoint,
  step?: string,
): BenchAction | null {
  const sequence = sequenceById(state.document, state.activeId);
  const { prescription } = sequence;
  const frame = frameOf(prescription.plane);
  const window = windowFrame(prescription);
  const withStep = step === undefined ? {} : { step };
  if (id === 'fov-centre') {
    const along = dot(frame.normal, prescription.centreMm);
    const [x, y, z] = toPatient(frame, [Math.round(to[0]), Math.round(to[1])], along);
    return { type: 'edit-prescription', patch: { centreMm: [zero(x), zero(y), zero(z)] }, ...withStep };
  }
  if (id.startsWith('fov-')) {
    const [phase, readout] = fromWindow(window, to);
    const isPhase = id.startsWith('fov-phase');
    const sign = id.endsWith('-low') ? -1 : 1;
    const fov = Math.max(state.document.scanner.limits.fovMinMm, Math.round(2 * sign * (isPhase ? phase : readout)));
    return { type: 'edit-prescription', patch: isPhase ? { fovPhaseMm: fov } : { fovReadoutMm: fov }, ...withStep };
  }
  const side = id.replace(/^(keep-clear|extent)-/, '') as Side;
  const direction = toScreen(frame, sideVector(side));
  const reach = Math.round(to[0] * direction[0] + to[1] * direction[1]);
  if (id.startsWith('keep-clear-')) {
    const keepClear = keepClearOf(state.document, sequence);
    if (keepClear.area.kind !== 'box') return null;
    const area = { ...keepClear.area, box: withEdge(keepClear.area.box, side, reach) };
    return { type: 'edit-keep-clear', keepClear: { ...keepClear, area }, ...withStep };
  }
  const reading = withValue(state.document.patient.extents[side], Math.max(0, reach), setting.today);
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
  const handle = benchHandles(state).find((each) => each.id === id);
  if (!handle) return null;
  if (handle.along) {
    const share = by[0] * handle.along[0] + by[1] * handle.along[1];
    if (Math.abs(share) < 1e-6) return null;
  }
  return moveHandle(state, setting, id, [handle.at[0] + by[0], handle.at[1] + by[1]], step);
}

function readoutAxisOf(state: BenchState) {
  const { prescription } = sequenceById(state.document, state.activeId);
  const axes = { axial: ['RL', 'AP'], coronal: ['RL', 'SI'], sagittal: ['AP', 'SI'] } as const;
  const [first, second] = axes[prescription.plane];
  return prescription.phaseAxis === first ? second : first;
}

/** Side of the patient an edge of the window lies on; the window's low end is where its unit vector comes from. */
function edgeSide(state: BenchState, direction: 'phase' | 'readout', sign: -1 | 1): Side {
  const { prescription } = sequenceById(state.document, state.activeId);
  const window = windowFrame(prescription);
  const unit = direction === 'phase' ? window.phase : window.readout;
  const axis = direction === 'phase' ? prescription.phaseAxis : readoutAxisOf(state);
  const [negative, positive] = sidesOfAxis(axis);
  const towards = toScreen(frameOf(prescription.plane), sideVector(positive));
  const same = unit[0] * towards[0] + unit[1] * towards[1] > 0;
  return (sign > 0) === same ? positive : negative;
}

function mean([low, high]: readonly [number, number]): number {
  return (low + high) / 2;
}

/** −0 would be stored and shown as a different number from 0. */
function zero(value: number): number {
  return value === 0 ? 0 : value;
}
