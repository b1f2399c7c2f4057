import { screenFrame, sidesOfPlane, sideVector, toScreen, type ScreenPoint } from '@/components/schematic/scene/section-frame';
import type { PatientBox, Side } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { BenchHandle } from './handles';
import { edgeOf, withEdge } from './window-box';

/** The boxes that are drawn in the patient and taken hold of by their edges. */
const BOXES = {
  'keep-clear': { label: 'Keep-clear area', figure: 'keep-clear', place: 0 },
  // A quarter along its edges: it often begins where the keep-clear area lies, whose handles stay free.
  'must-stay': { label: 'Must stay displayed', figure: 'displayed to', place: 0.25 },
} as const;

type BoxKind = keyof typeof BOXES;

export const BOX_EDGE_MAX_MM = 400;

const boxOf = ({ area, mustStayDisplayed }: KeepClear, kind: BoxKind): PatientBox | undefined =>
  kind === 'must-stay' ? mustStayDisplayed : area.kind === 'box' ? area.box : undefined;

export function boxHandles(keepClear: KeepClear, prescription: Prescription): readonly BenchHandle[] {
  return (['must-stay', 'keep-clear'] as const).flatMap((kind) => {
    const box = boxOf(keepClear, kind);
    return box ? edgeHandles(kind, box, prescription) : [];
  });
}

function edgeHandles(kind: BoxKind, box: PatientBox, prescription: Prescription): BenchHandle[] {
  const frame = screenFrame(prescription);
  const { label, figure, place } = BOXES[kind];
  const on = (x: number, y: number, z: number): ScreenPoint => toScreen(frame, [x, y, z]);
  const middle = on(mean(box.xMm), mean(box.yMm), mean(box.zMm));
  const corner = on(box.xMm[1], box.yMm[1], box.zMm[1]);
  return sidesOfPlane(prescription.plane).map((side): BenchHandle => {
    const direction = toScreen(frame, sideVector(side));
    const reach = edgeOf(box, side);
    const out = reach - (middle[0] * direction[0] + middle[1] * direction[1]);
    const along: ScreenPoint = [-direction[1], direction[0]];
    const half = (corner[0] - middle[0]) * along[0] + (corner[1] - middle[1]) * along[1];
    const aside = place * 2 * Math.abs(half);
    return {
      id: `${kind}-${side}`,
      kind: `${kind}-edge`,
      label: `${label}, ${side} edge`,
      at: [middle[0] + direction[0] * out + along[0] * aside, middle[1] + direction[1] * out + along[1] * aside],
      along: direction,
      figure: `${figure} ${side} ${Math.round(reach)} mm`,
      value: { now: reach, min: -BOX_EDGE_MAX_MM, max: BOX_EDGE_MAX_MM },
    };
  });
}

/** The keep-clear record with one edge put to a reach, whole mm; undefined when this is no handle of a box, null when the box is not there. */
export function withBoxHandle(
  keepClear: KeepClear,
  id: string,
  reachOf: (side: Side) => number,
): KeepClear | null | undefined {
  const [, kind, side] = /^(keep-clear|must-stay)-(\w+)$/.exec(id) ?? [];
  if (!kind || !side) return undefined;
  const box = boxOf(keepClear, kind as BoxKind);
  if (!box) return null;
  const next = withEdge(box, side as Side, reachOf(side as Side));
  if (kind === 'must-stay') return { ...keepClear, mustStayDisplayed: next };
  return keepClear.area.kind === 'box' ? { ...keepClear, area: { ...keepClear.area, box: next, label: 'own box' } } : null;
}

function mean([low, high]: readonly [number, number]): number {
  return (low + high) / 2;
}
