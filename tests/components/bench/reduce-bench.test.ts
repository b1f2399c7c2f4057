import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { benchHandles, moveHandle, nudgeHandle } from '@/components/bench/state/handles';
import { caseOf } from '@/components/bench/state/case-of';
import { isUnsaved, startBench, UNDO_STEPS, type BenchState } from '@/components/bench/state/bench-state';
import { sequenceById } from '@/components/bench/state/bench-document';
import {
  percentPhaseFov,
  percentSampling,
  tidyPrescription,
  withPercentPhaseFov,
  withPercentSampling,
} from '@/components/bench/state/prescription-edit';
import { withSource, withValue } from '@/components/bench/state/reading-edit';
import { reduceBench } from '@/components/bench/state/reduce-bench';
import { changedFields } from '@/components/bench/prescription/from-protocol';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Remedy } from '@/lib/physics/model/remedy';
import { benchDocument } from '@/tests/support/bench-documents';
import { slabOf, typicalPrescription, typicalScanner } from '@/tests/support/physics-cases';

const setting = { policy: DEFAULT_POLICY, today: '2026-03-02' };
const start = (document = benchDocument()): BenchState => startBench(document, 'a', document);
const active = (state: BenchState): Prescription => sequenceById(state.document, state.activeId).prescription;
const remedy = (prescription: Prescription, extra: Partial<Remedy> = {}): Remedy =>
  ({ key: 'phase-oversampling', sentence: 'Add 5 % phase oversampling.', costTenths: 69, arms: 'up', prescription, ...extra }) as Remedy;

describe('editing', () => {
  it('changes only what was edited and marks the bench unsaved', () => {
    const begun = start();
    const state = reduceBench(begun, { type: 'edit-prescription', patch: { fovPhaseMm: 320 } });
    expect(active(state).fovPhaseMm).toBe(320);
    expect(state.document.sequences[1]).toBe(begun.document.sequences[1]);
    expect(state.document.patient).toBe(begun.document.patient);
    expect(isUnsaved(state)).toBe(true);
    expect(isUnsaved(reduceBench(state, { type: 'mark-saved', document: state.document }))).toBe(false);
  });

  it('joins the edits of one drag into one step, and undo and redo walk the steps', () => {
    let state = start();
    for (const fov of [301, 302, 303]) {
      state = reduceBench(state, { type: 'edit-prescription', patch: { fovPhaseMm: fov }, step: 'drag 1' });
    }
    state = reduceBench(state, { type: 'settle' });
    state = reduceBench(state, { type: 'edit-prescription', patch: { fovPhaseMm: 310 }, step: 'drag 1' });
    expect(state.past).toHaveLength(2);
    state = reduceBench(state, { type: 'undo' });
    expect(active(state).fovPhaseMm).toBe(303);
    state = reduceBench(state, { type: 'undo' });
    expect(active(state).fovPhaseMm).toBe(300);
    expect(isUnsaved(state)).toBe(false);
    state = reduceBench(reduceBench(state, { type: 'redo' }), { type: 'redo' });
    expect(active(state).fovPhaseMm).toBe(310);
    expect(reduceBench(state, { type: 'redo' })).toBe(state);
  });

  it('keeps 200 steps', () => {
    let state = start();
    for (let k = 1; k <= UNDO_STEPS + 20; k += 1) {
      state = reduceBench(state, { type: 'edit-prescription', patch: { fovPhaseMm: 300 + k } });
    }
    for (let k = 0; k < UNDO_STEPS + 20; k += 1) state = reduceBench(state, { type: 'undo' });
    expect(active(state).fovPhaseMm).toBe(320);
  });

  it('undoes and redoes any run of edits exactly', () => {
    const edit = fc.oneof(
      fc.record({ type: fc.constant('edit-prescription' as const), patch: fc.record({ fovPhaseMm: fc.integer({ min: 150, max: 500 }) }) }),
      fc.record({ type: fc.constant('edit-patient' as const), patch: fc.record({ lateralOffsetMm: fc.integer({ min: -50, max: 50 }) }) }),
      fc.record({ type: fc.constant('choose-sequence' as const), id: fc.constantFrom('a', 'b', 'c') }),
    );
    fc.assert(
      fc.property(fc.array(edit, { maxLength: 40 }), (actions) => {
        const begun = start();
        const ended = actions.reduce(reduceBench, begun);
        let state = ended;
        while (state.past.length > 0) state = reduceBench(state, { type: 'undo' });
        expect(state.document).toBe(begun.document);
        while (state.future.length > 0) state = reduceBench(state, { type: 'redo' });
        expect(state.document).toBe(ended.document);
      }),
      { seed: 20260303, numRuns: 200 },
    );
  });
});

describe('what follows from an edit', () => {
  const scanner = typicalScanner();

  it('keeps the oversampling that was asked for when the lines change', () => {
    const before = typicalPrescription({ linesAcrossFov: 240, acquiredLines: 252 });
    expect(tidyPrescription(before, { linesAcrossFov: 320 }, scanner).acquiredLines).toBe(336);
  });

  it('never acquires fewer lines than are displayed', () => {
    expect(tidyPrescription(typicalPrescription(), { acquiredLines: 200 }, scanner).acquiredLines).toBe(240);
  });

  it('leaves the window where it is when the phase direction is swapped, each axis keeping its pixel', () => {
    const swapped = tidyPrescription(typicalPrescription(), { phaseAxis: 'RL' }, scanner);
    expect(swapped).toMatchObject({ fovPhaseMm: 480, fovReadoutMm: 300, linesAcrossFov: 384, readoutMatrix: 240, acquiredLines: 384 });
  });

  it('moves the phase direction into a new plane', () => {
    expect(tidyPrescription(typicalPrescription(), { plane: 'coronal' }, scanner).phaseAxis).toBe('SI');
    expect(tidyPrescription(typicalPrescription({ phaseAxis: 'RL' }), { plane: 'coronal' }, scanner).phaseAxis).toBe('RL');
  });

  it('turns a stack into a slab of the same coverage for a 3D family, and keeps slice oversampling', () => {
    const slab = tidyPrescription(typicalPrescription(), { family: 'gradient-echo-3d' }, scanner).slices;
    expect(slab).toMatchObject({ mode: 'slab', partitions: 30, partitionThicknessMm: 6, acquiredPartitions: 30 });
    const before = typicalPrescription({ family: 'gradient-echo-3d', slices: slabOf({ partitions: 64, acquiredPartitions: 80 }) });
    const after = tidyPrescription(before, { slices: { ...slabOf({ partitions: 40, acquiredPartitions: 80 }) } }, scanner);
    expect(after.slices).toMatchObject({ partitions: 40, acquiredPartitions: 50 });
  });

  it('reads and writes Percent Phase Field of View and Percent Sampling', () => {
    // 300 of 480 mm; pixels 1.25 mm both ways.
    const before = typicalPrescription();
    expect(percentPhaseFov(before)).toBeCloseTo(62.5, 10);
    expect(percentSampling(before)).toBeCloseTo(100, 10);
    expect(withPercentPhaseFov(before, 75)).toEqual({ fovPhaseMm: 360, linesAcrossFov: 288 });
    expect(withPercentSampling(before, 80)).toEqual({ linesAcrossFov: 192 });
  });
});

describe('sizes corrected by hand', () => {
  it('makes an estimate a measurement of today, and leaves a localiser reading one', () => {
    const estimate = { value: 300, source: 'weight-and-height' as const, spread: 20 };
    expect(withValue(estimate, 320, '2026-03-02')).toEqual({ value: 320, source: 'measured', spread: 5, takenOn: '2026-03-02' });
    expect(withValue({ value: 300, source: 'localiser', spread: 2 }, 310, '2026-03-02')).toEqual({
      value: 310, source: 'localiser', spread: 2, takenOn: '2026-03-02',
    });
    expect(withSource(estimate, 'localiser', '2026-03-02')).toMatchObject({ value: 300, source: 'localiser', spread: 3 });
  });
});

describe('back to the protocol', () => {
  const protocol = typicalPrescription();

  it('says which fields differ from it, a pair of figures as one field', () => {
    const now = typicalPrescription({ fovPhaseMm: 322, centreMm: [4, -6, 0] });
    const fields = changedFields(protocol, now);
    expect([...fields.keys()].sort()).toEqual(['centreMm', 'fovPhaseMm']);
    expect(fields.get('fovPhaseMm')).toMatchObject([{ theirs: '300', mine: '322' }]);
    expect(fields.get('centreMm')).toHaveLength(2);
    expect(changedFields(protocol, typicalPrescription()).size).toBe(0);
  });

  it('puts one sequence back with what was adopted for it, in one step of undo', () => {
    const adopted = reduceBench(start(), { type: 'adopt', remedy: remedy(typicalPrescription({ acquiredLines: 252 })) });
    const back = reduceBench(adopted, { type: 'back-to-protocol', prescription: protocol });
    expect(back.document.sequences[0]).toEqual({ id: 'a', prescription: protocol, adopted: [] });
    expect(back.document.sequences[1]).toBe(adopted.document.sequences[1]);
    expect(back.document.keepClear).toBe(adopted.document.keepClear);
    expect(reduceBench(back, { type: 'undo' }).document).toBe(adopted.document);
  });
});

describe('trying and adopting', () => {
  it('tries without editing, leaves without a trace, and any edit ends the trial', () => {
    const begun = start();
    const tried = reduceBench(begun, { type: 'try', remedy: remedy(typicalPrescription({ acquiredLines: 252 })) });
    expect(tried.document).toBe(begun.document);
    expect(tried.past).toHaveLength(0);
    expect(reduceBench(tried, { type: 'leave-trial' }).trial).toBeNull();
    expect(reduceBench(tried, { type: 'edit-prescription', patch: { averages: 1 } }).trial).toBeNull();
    expect(reduceBench(tried, { type: 'choose-sequence', id: 'b' }).trial).toBeNull();
  });

  it('adopts into one sequence, raises the arms for all, and can be undone', () => {
    const state = reduceBench(start(), { type: 'adopt', remedy: remedy(typicalPrescription({ acquiredLines: 252 }), { arms: 'down' }) });
    expect(active(state).acquiredLines).toBe(252);
    expect(state.document.patient.arms.position).toBe('down');
    expect(state.document.sequences[0]?.adopted).toEqual([
      { key: 'phase-oversampling', sentence: 'Add 5 % phase oversampling.', costTenths: 69 },
    ]);
    expect(reduceBench(state, { type: 'undo' }).document).toEqual(start().document);
  });

  it('freezes a whole-picture area in the patient when the remedy moves the window', () => {
    const whole = benchDocument({ keepClear: { area: { kind: 'whole-picture' }, followsWindow: false } });
    const larger = remedy(typicalPrescription({ fovPhaseMm: 320 }), { key: 'larger-fov-same-matrix' });
    const state = reduceBench(start(whole), { type: 'adopt', remedy: larger });
    expect(state.document.sequences[0]?.frozenKeepClear?.area).toMatchObject({ kind: 'box', box: { yMm: [-150, 150], xMm: [-240, 240] } });
    const more = reduceBench(start(whole), { type: 'adopt', remedy: remedy(typicalPrescription({ acquiredLines: 252 })) });
    expect(more.document.sequences[0]?.frozenKeepClear).toBeUndefined();
    const redrawn = reduceBench(state, { type: 'edit-keep-clear', keepClear: whole.keepClear });
    expect(redrawn.document.sequences[0]?.frozenKeepClear).toBeUndefined();
  });
});

describe('handles', () => {
  const handlesOf = (state: BenchState) => benchHandles(caseOf(state.document, setting, sequenceById(state.document, state.activeId)));
  const at = (state: BenchState, id: string) => handlesOf(state).find((handle) => handle.id === id);

  it('have one for every edge of FOV, keep-clear area and body, the centre and the rotation', () => {
    expect(handlesOf(start()).map(({ id }) => id)).toEqual([
      'extent-right', 'extent-left', 'extent-anterior', 'extent-posterior',
      'keep-clear-right', 'keep-clear-left', 'keep-clear-anterior', 'keep-clear-posterior',
      'fov-centre', 'fov-rotation', 'fov-phase-low', 'fov-phase-high', 'fov-readout-low', 'fov-readout-high',
    ]);
    expect(at(start(), 'fov-phase-low')).toMatchObject({ label: 'FOV edge, anterior', at: [0, -150] });
    expect(at(start(), 'keep-clear-right')?.at).toEqual([-190, -22.5]);
  });

  it('come to rest where they were put, on whole millimetres', () => {
    const moves: [string, readonly [number, number]][] = [
      ['fov-phase-low', [12, -161.3]],
      ['fov-readout-high', [233.7, 40]],
      ['keep-clear-anterior', [3, -120.4]],
      ['extent-left', [262.2, 9]],
      ['fov-centre', [4.6, -7.2]],
    ];
    for (const [id, to] of moves) {
      const action = moveHandle(start(), setting, id, to);
      const moved = at(reduceBench(start(), action!), id)!;
      const along = moved.along ?? ([0, 0] as const);
      const reach = Math.abs(to[0] * along[0] + to[1] * along[1]);
      // FOV edges move in halves of a whole-millimetre FOV, everything else in whole millimetres.
      if (moved.along) expect(Math.abs(Math.abs(moved.at[0] * along[0] + moved.at[1] * along[1]) - reach)).toBeLessThanOrEqual(0.5);
      else expect(moved.at).toEqual([5, -7]);
    }
  });

  it('step one millimetre by key, and not across their direction', () => {
    const up = nudgeHandle(start(), setting, 'fov-phase-low', [0, -1]);
    expect(active(reduceBench(start(), up!)).fovPhaseMm).toBe(302);
    expect(nudgeHandle(start(), setting, 'fov-phase-low', [1, 0])).toBeNull();
    const ten = nudgeHandle(start(), setting, 'extent-anterior', [0, -10]);
    expect(reduceBench(start(), ten!).document.patient.extents.anterior.value).toBe(180);
  });

  it('cannot cross one another or shrink a body below nothing', () => {
    const box = moveHandle(start(), setting, 'keep-clear-anterior', [0, 200]);
    expect(box).toMatchObject({ keepClear: { area: { box: { yMm: [94, 95] } } } });
    const body = moveHandle(start(), setting, 'extent-left', [-50, 0]);
    expect(body).toMatchObject({ reading: { value: 0 } });
  });
});
