'use client';

import type { PatientBox, Side } from '@/lib/physics/model/axes';
import { PlainNumber } from './bench-number';
import { BOX_EDGE_MAX_MM } from './state/box-handles';
import { edgeOf, withEdge } from './state/window-box';

const NAMES: Readonly<Record<Side, string>> = {
  anterior: 'Anterior', posterior: 'Posterior', right: 'Right', left: 'Left', superior: 'Superior', inferior: 'Inferior',
};

/** All six sides, those of the plane that is shown first. */
export function sidesBeginningWith(inPlane: readonly Side[]): readonly Side[] {
  return [...inPlane, ...(Object.keys(NAMES) as Side[]).filter((side) => !inPlane.includes(side))];
}

/** A box by its six edges, each from the origin towards its side. */
export function BoxEdges({
  name,
  box,
  sides,
  onEdit,
}: {
  name: string;
  box: PatientBox;
  sides: readonly Side[];
  onEdit: (box: PatientBox, step: string) => void;
}) {
  return sides.map((side) => (
    <PlainNumber
      key={side}
      name={`${name}.${side}`}
      label={NAMES[side]}
      value={Math.round(edgeOf(box, side) * 10) / 10}
      unit="mm"
      min={-BOX_EDGE_MAX_MM}
      max={BOX_EDGE_MAX_MM}
      onEdit={(value, step) => {
        if (value === null || !Number.isFinite(value) || Math.abs(value) > BOX_EDGE_MAX_MM) return;
        onEdit(withEdge(box, side, value), step);
      }}
    />
  ));
}
