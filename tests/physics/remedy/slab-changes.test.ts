import { describe, expect, it } from 'vitest';
import { freeze } from '@/lib/physics/assess/geometry-class';
import type { Slab } from '@/lib/physics/model/prescription';
import { countEdits, slabCoverageLostMm } from '@/lib/physics/remedy/prescription-difference';
import {
  dropEndPartitions,
  enlargeSlab,
  sharperPulse,
  sliceOversampling,
} from '@/lib/physics/remedy/slab-changes';
import type { TargetedCase } from '@/lib/physics/remedy/change';
import {
  prescriptionOf,
  sketchCase,
  slabOf,
  typicalPrescription,
  typicalScanner,
} from '@/tests/support/physics-cases';
import { codeOf, planned, solverThat } from './stated-solver';

const slabIn = (given: TargetedCase) => given.prescription.slices as Slab;

describe('changes of a slab', () => {
  const slab = slabOf({
    partitions: 40,
    acquiredPartitions: 50,
    partitionThicknessMm: 3,
    timeBandwidthProduct: 6,
    pulseDurationMs: 1.2,
  });
  const given = freeze(
    sketchCase({
      prescription: prescriptionOf('gradient-echo-3d', { slices: slab, trMs: 5, teMs: 2 }),
      scanner: typicalScanner({ partitionStep: 4, limits: { sliceOversamplingMaxPct: 40 } }),
    }),
  );
  const stack = freeze(sketchCase({ prescription: typicalPrescription() }));
  const cleanFrom = (enough: (slab: Slab) => boolean) =>
    solverThat({ slabIsClean: (asked) => enough(slabIn(asked)), leavesPicture: () => undefined });
  const never = cleanFrom(() => false);

  it('a thicker one: as few partitions more as are enough, two at a time, at the same oversampling', () => {
    const after = planned(
      enlargeSlab(
        given,
        cleanFrom(({ partitions }) => partitions >= 47),
      ),
    );
    // 48 · 1.25 = 60 lies on the step of four from 48.
    expect(slabIn(after)).toMatchObject({ partitions: 48, acquiredPartitions: 60 });
    // Up to twice, itself included.
    expect(
      slabIn(
        planned(
          enlargeSlab(
            given,
            cleanFrom(({ partitions }) => partitions >= 80),
          ),
        ),
      ).partitions,
    ).toBe(80);
    expect(
      codeOf(
        enlargeSlab(
          given,
          cleanFrom(({ partitions }) => partitions >= 81),
        ),
      ),
    ).toBe('slab-not-enough');
    expect(
      codeOf(
        enlargeSlab(
          given,
          cleanFrom(() => true),
        ),
      ),
    ).toBe('nothing-to-change');
    expect(codeOf(enlargeSlab(stack, never))).toBe('nothing-to-change');
  });
  it('a thicker one stays within the scanner’s oversampling, its most included', () => {
    const upTo = (sliceOversamplingMaxPct: number) =>
      enlargeSlab(
        { ...given, scanner: typicalScanner({ partitionStep: 1, limits: { sliceOversamplingMaxPct } }) },
        cleanFrom(({ partitions }) => partitions >= 60),
      );
    expect(slabIn(planned(upTo(25)))).toMatchObject({ partitions: 60, acquiredPartitions: 75 });
    expect(codeOf(upTo(24))).toBe('slab-not-enough');
  });
  it('a sharper pulse: the next product that is enough, lasting longer in proportion, TR and half of it TE with it', () => {
    for (const [from, product] of [
      [6.1, 8],
      [8.5, 10],
      [10.5, 12],
      [12.5, 16],
      [16, 16],
    ] as const) {
      const after = planned(
        sharperPulse(
          given,
          cleanFrom(({ timeBandwidthProduct: tbw }) => tbw! >= from),
        ),
      );
      const added = (1.2 * product) / 6 - 1.2;
      expect(slabIn(after).timeBandwidthProduct).toBe(product);
      expect(slabIn(after).pulseDurationMs).toBeCloseTo(1.2 + added, 9);
      expect(after.prescription.trMs).toBeCloseTo(5 + added, 9);
      expect(after.prescription.teMs).toBeCloseTo(2 + added / 2, 9);
    }
    expect(codeOf(sharperPulse(given, never))).toBe('pulse-not-enough');
    const blunt = {
      ...given,
      prescription: { ...given.prescription, slices: { ...slab, timeBandwidthProduct: 4 } },
    };
    const next = planned(
      sharperPulse(
        blunt,
        cleanFrom(({ timeBandwidthProduct }) => timeBandwidthProduct! > 4),
      ),
    );
    expect(slabIn(next).timeBandwidthProduct).toBe(6);
    const unknown = (values: Partial<Slab>) => ({
      ...given,
      prescription: { ...given.prescription, slices: { ...slab, ...values } },
    });
    expect(codeOf(sharperPulse(unknown({ timeBandwidthProduct: undefined }), never))).toBe('pulse-unknown');
    expect(codeOf(sharperPulse(unknown({ pulseDurationMs: undefined }), never))).toBe('pulse-unknown');
    expect(codeOf(sharperPulse(unknown({ selective: false }), never))).toBe('nothing-to-change');
    expect(codeOf(sharperPulse(stack, never))).toBe('nothing-to-change');
  });
  it('end partitions given up: as few as are enough, while something is left and nothing that must stay goes', () => {
    const enough = (least: number) =>
      cleanFrom(({ droppedPartitionsPerEnd }) => droppedPartitionsPerEnd >= least);
    const result = dropEndPartitions(given, enough(3));
    expect(slabIn(planned(result)).droppedPartitionsPerEnd).toBe(3);
    expect(result).toMatchObject({ sideEffects: ['18 mm of coverage given up, half at each end'] });
    expect(slabIn(planned(dropEndPartitions(given, enough(1)))).droppedPartitionsPerEnd).toBe(1);
    // Of 40 at least two stay.
    expect(slabIn(planned(dropEndPartitions(given, enough(19)))).droppedPartitionsPerEnd).toBe(19);
    expect(codeOf(dropEndPartitions(given, enough(20)))).toBe('drop-not-enough');
    expect(codeOf(dropEndPartitions(given, enough(0)))).toBe('nothing-to-change');
    const leaving = solverThat({
      slabIsClean: () => false,
      leavesPicture: (asked) =>
        slabIn(asked).droppedPartitionsPerEnd > 2 ? { code: 'area-leaves-picture', text: '' } : undefined,
    });
    expect(codeOf(dropEndPartitions(given, leaving))).toBe('area-leaves-picture');
    // Some given up before: only what is given up now is told.
    const before = {
      ...given,
      prescription: { ...given.prescription, slices: { ...slab, droppedPartitionsPerEnd: 2 } },
    };
    expect(dropEndPartitions(before, enough(3))).toMatchObject({
      sideEffects: ['6 mm of coverage given up, half at each end'],
    });
  });
  it('slice oversampling: what the geometry asks for, more or fewer', () => {
    const asked = (partitions: number | undefined) => solverThat({ cleanPartitions: () => partitions });
    expect(slabIn(planned(sliceOversampling(given, asked(56)))).acquiredPartitions).toBe(56);
    expect(slabIn(planned(sliceOversampling(given, asked(44)))).acquiredPartitions).toBe(44);
    expect(codeOf(sliceOversampling(given, asked(50)))).toBe('nothing-to-change');
    expect(codeOf(sliceOversampling(given, asked(undefined)))).toBe('slice-oversampling-over-maximum');
    expect(codeOf(sliceOversampling(stack, never))).toBe('nothing-to-change');
  });
  it('coverage lost and settings changed are counted', () => {
    const { prescription: p } = given;
    const edits = (values: Partial<Slab>) => countEdits(p, { ...p, slices: { ...slab, ...values } });
    expect(edits({})).toBe(0);
    expect(edits({ acquiredPartitions: 55 })).toBe(1);
    // Partitions at the same share of oversampling are one setting; with another share, two.
    expect(edits({ partitions: 48, acquiredPartitions: 60 })).toBe(1);
    expect(edits({ partitions: 48 })).toBe(2);
    expect(edits({ timeBandwidthProduct: 8, pulseDurationMs: 1.6 })).toBe(1);
    expect(edits({ partitions: 48, acquiredPartitions: 50, timeBandwidthProduct: 8 })).toBe(3);
    const lost = (before: number, after: number) =>
      slabCoverageLostMm(
        { ...p, slices: { ...slab, droppedPartitionsPerEnd: before } },
        { ...p, slices: { ...slab, droppedPartitionsPerEnd: after } },
      );
    expect([lost(0, 0), lost(0, 1), lost(1, 3), lost(3, 1)]).toEqual([0, 6, 12, 0]);
    expect(slabCoverageLostMm(typicalPrescription(), p)).toBe(0);
    expect(slabCoverageLostMm(p, typicalPrescription())).toBe(0);
  });
});
