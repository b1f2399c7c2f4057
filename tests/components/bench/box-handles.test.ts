import { describe, expect, it } from 'vitest';
import { startBench } from '@/components/bench/state/bench-state';
import { caseOf } from '@/components/bench/state/case-of';
import { benchHandles, moveHandle, nudgeHandle } from '@/components/bench/state/handles';
import { reduceBench } from '@/components/bench/state/reduce-bench';
import { edgeOf } from '@/components/bench/state/window-box';
import { sidesOfPlane } from '@/components/schematic/scene/section-frame';
import type { PatientBox, Side } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { Plane } from '@/lib/physics/model/prescription';
import { benchDocument } from '@/tests/support/bench-documents';
import { typicalPrescription } from '@/tests/support/physics-cases';

const setting = { policy: DEFAULT_POLICY, today: '2026-03-02' };
const BOX: PatientBox = { xMm: [-180, 60], yMm: [-130, 90], zMm: [-80, 70] };

const benchOf = (plane: Plane, keepClear: KeepClear = { ...benchDocument().keepClear, mustStayDisplayed: BOX }) => {
  const prescription = typicalPrescription({ plane, phaseAxis: plane === 'axial' ? 'AP' : 'SI' });
  return startBench(benchDocument({ keepClear, sequences: [{ id: 'a', prescription, adopted: [] }] }), 'a', null);
};
type State = ReturnType<typeof benchOf>;
const handles = (state: State) => benchHandles(caseOf(state.document, setting, state.document.sequences[0]!, state.sureAt));
const mustStay = (state: State) => state.document.keepClear.mustStayDisplayed!;

describe.each(['axial', 'coronal', 'sagittal'] as const)('the box that must stay displayed, %s', (plane) => {
  const start = benchOf(plane);

  it('is held at its four edges in the plane, with the figure of the typed field', () => {
    const own = handles(start).filter(({ kind }) => kind === 'must-stay-edge');
    expect(own.map(({ id }) => id)).toEqual(sidesOfPlane(plane).map((side) => `must-stay-${side}`));
    for (const { id, value } of own) expect(value?.now).toBe(edgeOf(BOX, id.slice('must-stay-'.length) as Side));
  });

  it('moves the edge that is held and no other, by pointer and by key, and leaves the keep-clear area', () => {
    for (const side of sidesOfPlane(plane)) {
      const id = `must-stay-${side}`;
      const { at, along } = handles(start).find((each) => each.id === id)!;
      const out = (by: number) => [along![0] * by, along![1] * by] as const;
      const [x, y] = out(12.4);
      const dragged = reduceBench(start, moveHandle(start, setting, id, [at[0] + x, at[1] + y], 'drag')!);
      const stepped = reduceBench(start, nudgeHandle(start, setting, id, out(10))!);
      expect(edgeOf(mustStay(dragged), side) - edgeOf(BOX, side), `${id} dragged`).toBe(12);
      expect(edgeOf(mustStay(stepped), side) - edgeOf(BOX, side), `${id} stepped`).toBe(10);
      for (const other of (['right', 'left', 'anterior', 'posterior', 'superior', 'inferior'] as const).filter((each) => each !== side)) {
        expect(edgeOf(mustStay(dragged), other)).toBe(edgeOf(BOX, other));
      }
      expect(dragged.document.keepClear.area).toBe(start.document.keepClear.area);
    }
  });
});

describe('boxes on one picture', () => {
  it('keeps the handles of both apart where one begins as the other', () => {
    const { keepClear } = benchDocument();
    if (keepClear.area.kind !== 'box') throw new Error('The typical keep-clear area is a box.');
    const places = handles(benchOf('axial', { ...keepClear, mustStayDisplayed: keepClear.area.box }))
      .filter(({ kind }) => kind === 'must-stay-edge' || kind === 'keep-clear-edge')
      .map(({ at }) => at);
    expect(places).toHaveLength(8);
    for (const [i, a] of places.entries()) {
      // A handle is 24 pixels wide, and a pixel of the bench about a millimetre.
      for (const b of places.slice(i + 1)) expect(Math.hypot(a[0] - b[0], a[1] - b[1])).toBeGreaterThan(24);
    }
  });

  it('has no handle, and takes no edit, for a box that is not there', () => {
    const without = benchOf('axial', benchDocument().keepClear);
    expect(handles(without).some(({ kind }) => kind === 'must-stay-edge')).toBe(false);
    expect(moveHandle(without, setting, 'must-stay-left', [10, 0])).toBeNull();
  });

  it('calls a preset that was dragged an own box', () => {
    const start = benchOf('axial');
    const dragged = reduceBench(start, moveHandle(start, setting, 'keep-clear-left', [99, 0])!);
    expect(dragged.document.keepClear.area).toMatchObject({ kind: 'box', label: 'own box', box: { xMm: [expect.any(Number), 99] } });
  });
});
