import { execFileSync, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { oversamplingCurve } from '@/components/demonstration/slab/oversampling-curve';
import { slabStage } from '@/components/demonstration/slab/slab-stage';
import { figuresOf } from '@/components/demonstration/stage/figures';
import { CONTROLS } from '@/lib/domain/demonstration/controls';
import { inventedCase, WHOLE_PICTURE } from '@/lib/domain/demonstration/invented-case';
import { findSetPiece } from '@/lib/domain/demonstration/set-pieces';
import { assess } from '@/lib/physics';
import type { Case } from '@/lib/physics/model/case';
import { slabProfile } from '@/lib/physics/slab/slab-profile';
import { partitionsWithWrap } from '@/tests/support/drawn-partitions';
import { parseRows, type PublishedRow, readPublished } from '@/tests/support/read-published';

/* scipy's solve_ivp on the Bloch equations; where Python with scipy is absent the committed values stand in. */
const script = fileURLToPath(new URL('integrate_shown.py', import.meta.url));
const available = spawnSync('python3', ['-c', 'import numpy, scipy'], { stdio: 'ignore' }).status === 0;
const published = readPublished('shown-slab');
const rows = available
  ? parseRows('python3', execFileSync('python3', [script], { encoding: 'utf8', timeout: 120_000 }))
  : published;
console.info(
  available
    ? 'The shown slab: integrated again with scipy and compared.'
    : 'The shown slab: Python with scipy is not here; compared with the committed values.',
);

const of = (use: string, tbw: number, flip: number) =>
  rows.filter((row) => row.text('use') === use && row.number('tbw') === tbw && row.number('flip_deg') === flip);

/** M = |Mxy|·(1 − E1)/(1 − E1·Mz), E1 = exp(−TR/T1) (physics.md section 6), written anew. */
function spoiled(row: PublishedRow, trOverT1: number): number {
  const e1 = Math.exp(-trOverT1);
  return (row.number('mxy') * (1 - e1)) / (1 - e1 * row.number('mz'));
}

function shown(question: Case) {
  const slab = assess(question).slab!;
  const { nodes } = slabStage({ question, slab, size: { widthPx: 760, heightPx: 480 }, sliceOffsetMm: 0 });
  const drawn = partitionsWithWrap(nodes, slab);
  return { slab, drawn, figure: figuresOf(assess(question)).contaminated };
}

describe('the partitions a demonstration shows against scipy’s integration', () => {
  const [before] = findSetPiece('slab-wrap')!.scenes();
  const moved = (id: 'slice-oversampling' | 'pulse-sharpness', value: number): Case => {
    const control = CONTROLS[id];
    return control.kind === 'number' ? control.write(before!.question, value) : before!.question;
  };
  it.each([
    ['as it begins', before!.question, 6, 48],
    ['with 12 % slice oversampling', moved('slice-oversampling', 12), 6, 54],
    ['with a sharper pulse', moved('pulse-sharpness', 14), 14, 48],
  ] as const)('%s: the same partitions hold wrap, in the picture, in the figures and on the curve', (_words, question, tbw, acquired) => {
    const { trMs } = question.prescription;
    const { tissueT1Ms, slabTolerance } = question.policy;
    const centre = of('centre', tbw, 12)[0]!;
    const places = of('partition', tbw, 12).filter((row) => row.number('acquired') === acquired);
    expect(places).toHaveLength(24);
    // The body reaches 250 mm; what lies beyond gives no signal. 4 mm a partition, 192 mm the slab.
    const alias = places.map((row) => {
      if (row.number('z_over_slab') * 192 > 250) return 0;
      return Math.max(...[tissueT1Ms.parenchyma, tissueT1Ms.fat].map((t1) => spoiled(row, trMs / t1) / spoiled(centre, trMs / t1)));
    });
    const { slab, drawn, figure } = shown(question);
    // 2e-5 in Mxy and Mz moves M by less than this where E1 is nearest to 1 (TR/T1 = 0.005: 1 − E1·Mz is 0.005 and more).
    alias.forEach((share, index) => expect(Math.abs(slab.partitions[index]!.alias - share)).toBeLessThan(5e-3));
    const low = alias.flatMap((share, index) => (share > slabTolerance ? [index] : []));
    const expected = [...low, ...low.map((index) => 47 - index).reverse()];
    expect(drawn).toEqual(expected);
    expect(figure).toBe(expected.length);
    expect(oversamplingCurve(question).find((point) => point.acquiredPartitions === acquired)!.contaminated).toBe(expected.length);
  });
});

describe('the spoiled columns of slab-profile', () => {
  const profiles = readPublished('slab-profile').map((row) => [row.number('tbw'), row.number('flip_deg')] as const);
  // As stated with the measurement.
  const trOverT1: Readonly<Record<number, number>> = { 10: 0.005, 30: 0.02, 90: 0.3 };
  it.each(profiles)('TBW %s, %s°: scipy and the engine cross the published place', (tbw, flip) => {
    const ratio = trOverT1[flip]!;
    const middle = spoiled(of('centre', tbw, flip)[0]!, ratio);
    const engine = slabProfile({ timeBandwidthProduct: tbw, flipDeg: flip, kind: 'spoiled', trMs: ratio * 1000, t1Ms: 1000 });
    for (const percent of [1, 2, 5, 10]) {
      const at = (use: string) => of(use, tbw, flip).find((row) => row.number('percent') === percent)!;
      const [inside, outside] = [at('crossing-low'), at('crossing-high')];
      for (const value of [spoiled(inside, ratio) / middle, engine.at(inside.number('z_over_slab'))]) expect(value).toBeGreaterThanOrEqual(percent / 100);
      for (const value of [spoiled(outside, ratio) / middle, engine.at(outside.number('z_over_slab'))]) expect(value).toBeLessThanOrEqual(percent / 100);
    }
  });
});

describe('the partitions a demonstration shows against slab-partitions', () => {
  /** 90° single-pulse rows in whole partitions: an echo train is excited so, through every door a scene goes. */
  const table = readPublished('slab-partitions').filter((row) => {
    const acquired = row.number('partitions') * (1 + row.number('slice_oversampling_pct') / 100);
    return row.number('flip_deg') === 90 && Math.abs(acquired - Math.round(acquired)) < 1e-9;
  });
  it('48 rows, each within one partition an end (tolerance stated with the measurement), drawn as the engine counts', () => {
    expect(table).toHaveLength(48);
    for (const row of table) {
      const partitions = row.number('partitions');
      const base = inventedCase(
        { region: 'abdomen', extents: { right: 100, left: 100, anterior: 100, posterior: 100, superior: 250, inferior: 250 } },
        {
          name: '3D', family: 'echo-train-spin-echo-3d', fovPhaseMm: 300, fovReadoutMm: 300, linesAcrossFov: 128, readoutMatrix: 128, echoTrainLength: 32, echoSpacingMs: 4, trMs: 1500,
          slices: {
            // Thin enough that all that is excited lies inside the body, as in the table.
            mode: 'slab', partitions, partitionThicknessMm: 120 / partitions, acquiredPartitions: Math.round(partitions * (1 + row.number('slice_oversampling_pct') / 100)),
            selective: true, timeBandwidthProduct: row.number('tbw'), droppedPartitionsPerEnd: 0,
          },
        },
        WHOLE_PICTURE,
      );
      const question = { ...base, policy: { ...base.policy, slabTolerance: row.number('threshold_pct_of_plateau') / 100 } };
      const { slab, drawn, figure } = shown(question);
      expect(slab.profileKind).toBe('single-pulse');
      expect(drawn).toEqual(slab.partitions.filter(({ state }) => state === 'contaminated').map(({ index }) => index));
      expect(figure).toBe(drawn.length);
      const low = drawn.filter((index) => index < partitions / 2).length;
      expect(Math.abs(low - row.number('contaminated_low_end'))).toBeLessThanOrEqual(1);
      expect(Math.abs(drawn.length - low - row.number('contaminated_high_end'))).toBeLessThanOrEqual(1);
    }
  });
});

it('scipy gives the committed values again', () => {
  expect(rows).toHaveLength(published.length);
  rows.forEach((row, i) => {
    // Printed to 1e-9; another processor's last bits, amplified by some thousand steps.
    for (const column of ['mxy', 'mz']) expect(Math.abs(row.number(column) - published[i]!.number(column))).toBeLessThanOrEqual(1e-8);
  });
});
