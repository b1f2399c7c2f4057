import { describe, expect, it } from 'vitest';
import { benchHandles, moveHandle, nudgeHandle } from '@/components/bench/state/handles';
import { startBench } from '@/components/bench/state/bench-state';
import { reduceBench } from '@/components/bench/state/reduce-bench';
import { ROTATION_ID } from '@/components/bench/state/rotation-handle';
import { caseOf } from '@/components/bench/state/case-of';
import { sequenceById, type BenchSetting } from '@/components/bench/state/bench-document';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { PatientAxis } from '@/lib/physics/model/axes';
import type { Plane } from '@/lib/physics/model/prescription';
import { benchDocument } from '@/tests/support/bench-documents';
import { typicalPrescription } from '@/tests/support/physics-cases';

const setting: BenchSetting = { policy: DEFAULT_POLICY, today: '2026-03-02' };

const PLANES: readonly (readonly [Plane, PatientAxis])[] = [
  ['axial', 'AP'], ['axial', 'RL'], ['coronal', 'RL'], ['coronal', 'SI'], ['sagittal', 'AP'], ['sagittal', 'SI'],
];

describe.each(PLANES)('the rotation handle, %s with phase %s', (plane, phaseAxis) => {
  const benchAt = (inPlaneRotationDeg: number) => {
    const prescription = typicalPrescription({ plane, phaseAxis, inPlaneRotationDeg });
    return startBench(benchDocument({ sequences: [{ id: 'a', prescription, adopted: [] }] }), 'a', null);
  };
  const handleOf = (state: ReturnType<typeof benchAt>) =>
    benchHandles(caseOf(state.document, setting, sequenceById(state.document, 'a'), state.sureAt)).find(({ id }) => id === ROTATION_ID)!;
  const rotationOf = (state: ReturnType<typeof benchAt>) => sequenceById(state.document, 'a').prescription.inPlaneRotationDeg;

  it('lies at the top right corner of the straight window', () => {
    const { at } = handleOf(benchAt(0));
    expect(at[0]).toBeGreaterThan(0);
    expect(at[1]).toBeLessThan(0);
  });

  it('put where another rotation has it gives that rotation', () => {
    for (const wanted of [-90, -37, 0, 12, 90]) {
      const from = benchAt(5);
      const to = handleOf(benchAt(wanted)).at;
      expect(rotationOf(reduceBench(from, moveHandle(from, setting, ROTATION_ID, to)!)), String(wanted)).toBe(wanted);
    }
  });

  it('turns clockwise by 1° with the right arrow, and stops at 90°', () => {
    const from = benchAt(0);
    const turned = reduceBench(from, nudgeHandle(from, setting, ROTATION_ID, [1, 0])!);
    const [a, b] = [handleOf(from).at, handleOf(turned).at];
    expect(Math.abs(rotationOf(turned))).toBe(1);
    expect(a[0] * b[1] - a[1] * b[0]).toBeGreaterThan(0);
    const end = benchAt(90 * Math.sign(rotationOf(turned)));
    expect(rotationOf(reduceBench(end, nudgeHandle(end, setting, ROTATION_ID, [10, 0])!))).toBe(rotationOf(end));
  });
});
