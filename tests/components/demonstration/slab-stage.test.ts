import { describe, expect, it } from 'vitest';
import { oversamplingCurve, curveScene } from '@/components/demonstration/slab/oversampling-curve';
import { COMPARED_PCT, phaseOrSlice } from '@/components/demonstration/slab/phase-or-slice';
import { slabStage } from '@/components/demonstration/slab/slab-stage';
import { travelsOf } from '@/components/demonstration/slab/slab-travel';
import { CONTROLS } from '@/lib/domain/demonstration/controls';
import { findSetPiece } from '@/lib/domain/demonstration/set-pieces';
import { assess, simulateImage } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import { partitionsWithWrap } from '@/tests/support/drawn-partitions';

const SIZE = { widthPx: 760, heightPx: 480 };
const scenes = findSetPiece('slab-wrap')!.scenes();
const before = scenes[0]!.question;
const slabOf = (question: Case) => assess(question).slab!;
const stage = (question: Case, sliceOffsetMm = 0) => slabStage({ question, slab: slabOf(question), size: SIZE, sliceOffsetMm });
const moved = (id: 'slice-oversampling' | 'pulse-sharpness' | 'partitions' | 'slab-thickness' | 'flip', value: number): Case => {
  const control = CONTROLS[id];
  return control.kind === 'number' ? control.write(before, value) : before;
};

describe('the slab made visible', () => {
  it('draws a box a partition, its alias where the engine finds one, and the profile beyond the ends', () => {
    const { nodes } = stage(before);
    const slab = slabOf(before);
    const names = nodes.map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
    expect(nodes.find(({ name }) => name === 'stack')).toMatchObject({ rings: { length: slab.partitions.length } });
    expect(names).toContain('profile/skirts');
    expect(partitionsWithWrap(nodes, slab)).toEqual(slab.partitions.filter(({ state }) => state === 'contaminated').map(({ index }) => index));
  });

  it('sends every contaminated partition’s intruder one acquired width, from one end to the other', () => {
    const slab = slabOf(before);
    const travels = travelsOf(slab, 192, 4, (z) => Math.exp(-Math.abs(z) / 96));
    expect(travels.map(({ end }) => end)).toEqual(['high', 'low']);
    expect(travels.flatMap(({ partitions }) => partitions)).toHaveLength(slab.contaminated);
    for (const { end, sourceMm, landedMm } of travels) {
      const shift = end === 'high' ? 192 : -192;
      expect([sourceMm[0] - landedMm[0], sourceMm[1] - landedMm[1]]).toEqual([shift, shift]);
      // From beyond one end onto the other half of the slab.
      expect(Math.sign(sourceMm[0] + sourceMm[1])).toBe(-Math.sign(landedMm[0] + landedMm[1]));
    }
  });

  it('frames the partition that is looked at', () => {
    const { nodes } = stage(before, -94);
    const chosen = nodes.find(({ name }) => name === 'chosen-partition');
    const ring = [[-96, expect.any(Number)], [-92, expect.any(Number)], [-92, expect.any(Number)], [-96, expect.any(Number)]];
    expect(chosen).toMatchObject({ rings: [ring, ring] });
    // Above the base line and in the body's lane: the words between the two are crossed by nothing.
    const [above, below] = chosen?.kind === 'area' ? chosen.rings.map((one) => one.map(([, v]) => v)) : [];
    expect(Math.max(...above!)).toBe(0);
    expect(Math.min(...below!)).toBeGreaterThan(0);
  });

  it('cuts off what is acquired beyond the slab, whatever the number', () => {
    for (const percent of [0, 12, 30]) {
      const question = moved('slice-oversampling', percent);
      const { slices } = question.prescription;
      const acquired = slices.mode === 'slab' ? slices.acquiredPartitions : 0;
      const node = stage(question).nodes.find(({ name }) => name === 'stack/cut-off');
      const ends = node?.kind === 'area' ? node.rings.flatMap((ring) => ring.map(([z]) => z)) : [];
      expect(ends.length > 0).toBe(percent > 0);
      if (ends.length > 0) expect([Math.min(...ends), Math.max(...ends)]).toEqual([-acquired * 2, acquired * 2]);
    }
  });

  it.each([['slice-oversampling', 25], ['pulse-sharpness', 3], ['partitions', 24], ['slab-thickness', 120], ['flip', 30]] as const)(
    'shows the engine’s own count with %s at %s',
    (id, value) => {
      const question = moved(id, value);
      const slab = slabOf(question);
      expect(partitionsWithWrap(stage(question).nodes, slab)).toHaveLength(slab.contaminated);
    },
  );

  it('puts the intruder of a simulated partition where the fold law says: what lies one acquired width away, in its place', () => {
    const slab = slabOf(before);
    const worst = slab.partitions.reduce((a, b) => (b.alias > a.alias ? b : a));
    const { values: withWrap, widthPx: width } = simulateImage(before, { sliceOffsetMm: worst.offsetMm, sizePx: 48, noiseShare: 0 });
    const { slices } = before.prescription;
    if (slices.mode !== 'slab') throw new Error('a slab is needed');
    // Acquired so wide that nothing wraps: the partition alone. Then the difference is the intruder alone.
    const alone = { ...before, prescription: { ...before.prescription, slices: { ...slices, acquiredPartitions: 96 } } };
    const own = simulateImage(alone, { sliceOffsetMm: worst.offsetMm, sizePx: 48, noiseShare: 0 }).values;
    const difference = [...withWrap].map((value, i) => value - own[i]!);
    expect(Math.min(...difference)).toBeGreaterThan(-1e-6);
    // The phantom's trunk is the same cylinder at either end: the intruder spans the body exactly, and nothing beside it.
    const span = (values: readonly number[]) => {
      const at = values.flatMap((value, i) => (value > 1e-6 ? [[i % width, Math.floor(i / width)] as const] : []));
      const [xs, ys] = [at.map(([x]) => x), at.map(([, y]) => y)];
      return [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
    };
    expect(span(difference)).toEqual(span([...own]));
  });
});

describe('where an intruder lands', () => {
  // A small body of its own, to the patient's left and front, that lies beyond the high end: z 102, the slab ends at 96.
  const alone = (zMm: number): Case => ({
    ...before,
    patient: {
      ...before.patient,
      parts: [{ name: 'piece', kind: 'other', signalWeight: 1, estimated: false, shape: { type: 'ellipsoid', centreMm: [60, -30, zMm], semiAxesMm: [30, 30, 12] } }],
    },
  });
  const offsets = slabOf(before).partitions.map(({ offsetMm }) => offsetMm);
  function seen(question: Case, sliceOffsetMm: number) {
    const { values, widthPx, heightPx } = simulateImage(question, { sliceOffsetMm, sizePx: 200, noiseShare: 0 });
    let [sum, x, y] = [0, 0, 0];
    values.forEach((value, i) => {
      sum += value;
      x += value * ((i % widthPx) + 0.5);
      y += value * (Math.floor(i / widthPx) + 0.5);
    });
    const { fovReadoutMm, fovPhaseMm } = question.prescription;
    return { sum, leftMm: (x / sum / widthPx - 0.5) * fovReadoutMm, backMm: (y / sum / heightPx - 0.5) * fovPhaseMm };
  }

  it.each([[102, 'low'], [-102, 'high']] as const)('tissue at z = %s mm is in the partitions one acquired width away, at the %s end, and in no other', (zMm, end) => {
    const question = alone(zMm);
    // fold(z) = ((z + W/2) mod W) − W/2 with W = 48 · 4 mm, shifted and never mirrored; it reaches 12 mm each way.
    const folded = zMm > 0 ? zMm - 192 : zMm + 192;
    const holding = offsets.filter((offset) => Math.abs(offset - folded) < 12);
    const own = offsets.filter((offset) => Math.abs(offset - zMm) < 12);
    const lit = offsets.filter((offset) => seen(question, offset).sum > 1e-3);
    expect(lit).toEqual([...holding, ...own].sort((a, b) => a - b));
    expect(holding.every((offset) => (end === 'low' ? offset < 0 : offset > 0))).toBe(true);
    // In the plane it stays where it was: not mirrored. A pixel is 2 mm; fat is displaced by 0.9 of a readout pixel of 1.4 mm.
    const { leftMm, backMm } = seen(question, holding[Math.floor(holding.length / 2)]!);
    expect(Math.abs(leftMm - 60)).toBeLessThan(3.5);
    expect(Math.abs(backMm + 30)).toBeLessThan(2.5);
  });

  it('more slice oversampling than the distance leaves it out', () => {
    const { slices } = before.prescription;
    if (slices.mode !== 'slab') throw new Error('a slab is needed');
    const wide = { ...alone(102), prescription: { ...before.prescription, slices: { ...slices, acquiredPartitions: 56 } } };
    // W = 224: z 90 to 114 lands at −134 to −110, beyond the displayed −96.
    expect(offsets.filter((offset) => seen(wide, offset).sum > 1e-3 && offset < 0)).toEqual([]);
  });
});

describe('the curve', () => {
  it('is the engine’s count at every number of partitions', () => {
    const points = oversamplingCurve(before);
    expect(points[0]).toMatchObject({ acquiredPartitions: 48, oversamplingPct: 0 });
    expect(points.at(-1)!.acquiredPartitions).toBe(96);
    for (const { oversamplingPct, contaminated } of points.filter((_, i) => i % 7 === 0)) {
      expect(contaminated).toBe(slabOf(moved('slice-oversampling', oversamplingPct)).contaminated);
    }
  });

  it('marks where the scene stands', () => {
    const points = oversamplingCurve(before);
    const nodes = curveScene(points, 54).nodes;
    expect(nodes.map(({ name }) => name)).toContain('here');
    expect(curveScene(points, 47).nodes.map(({ name }) => name)).not.toContain('here');
  });
});

it('phase oversampling leaves the partitions as they are, slice oversampling the fold along phase', () => {
  const body = before.patient.extents;
  const deeper = { ...before, patient: { ...before.patient, extents: { ...body, anterior: { ...body.anterior, value: 170 }, posterior: { ...body.posterior, value: 170 } } } };
  const [bare, phase, slice] = phaseOrSlice(deeper);
  expect(COMPARED_PCT).toBe(30);
  expect(bare).toMatchObject({ foldAlongPhase: true });
  expect(phase).toMatchObject({ foldAlongPhase: false, contaminated: bare!.contaminated });
  expect(slice!.foldAlongPhase).toBe(true);
  expect(slice!.contaminated).toBeLessThan(bare!.contaminated);
});
