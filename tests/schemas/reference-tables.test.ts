import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { assess } from '@/lib/physics';
import { parseCase, type CaseInput } from '@/lib/schemas/case';
import { parseRows, readPublished, type PublishedRow } from '@/tests/support/read-published';

/*
 * Every case of the published tables can be written down as the JSON the check takes, and the engine's answer to it is
 * the table's. Sources and agreements: fixtures/published/<key>/.
 */

const table = (key: string): readonly PublishedRow[] =>
  parseRows(key, readFileSync(new URL(`../../fixtures/published/${key}/${key}.csv`, import.meta.url), 'utf8'));

/** Through text and back, as it would arrive. */
const ask = (input: CaseInput) => assess(parseCase(JSON.parse(JSON.stringify(input))));

type Part = NonNullable<CaseInput['patient']['parts']>[number];
const cylinder = (name: string, x: number, y: number, a: number, b: number, rotationDeg = 0): Part => ({
  name, shape: { type: 'elliptic-cylinder', along: 'z', centreMm: [x, y, 0], semiAxesMm: [a, b], rotationDeg },
});

/** Margins off and the sizes exact: the tables know neither. */
const BARE = { marginMm: 0 } as const;

describe('lowest phase oversampling (fold-cases)', () => {
  const rows = table('fold-cases');

  function pose(row: PublishedRow): CaseInput {
    const across = row.text('phase_direction') === 'LR';
    const shift = row.number('object_shift_mm');
    const parts = [
      cylinder('trunk', across ? shift : 0, across ? 0 : shift, row.number('extent_lr_mm') / 2, row.number('extent_ap_mm') / 2, row.number('rotation_deg')),
    ];
    if (row.text('arms_radius_mm') !== '') {
      const [x, r] = [row.number('arms_offset_mm'), row.number('arms_radius_mm')];
      parts.push(cylinder('left arm', x, 0, r, r), cylinder('right arm', -x, 0, r, r));
    }
    const [centre, half] = [row.number('keep_clear_centre_mm'), row.number('keep_clear_half_width_mm')];
    const range: [number, number] = [centre - half, centre + half];
    return {
      patient: { parts },
      prescription: {
        phaseAxis: across ? 'RL' : 'AP',
        fovPhaseMm: row.number('phase_fov_mm'),
        fovReadoutMm: row.number('readout_fov_mm'),
        linesAcrossFov: 384,
      },
      keepClear: { area: { kind: 'box', box: across ? { xMm: range } : { yMm: range } } },
      policy: BARE,
    };
  }

  it('holds sixteen cases', () => expect(rows).toHaveLength(16));
  it.each(rows.map((row) => [row.text('label'), row] as const))('%s', (_label, row) => {
    const { width } = ask(pose(row));
    const percent = (width!.firstCleanMm / row.number('phase_fov_mm') - 1) * 100;
    // Half a unit of the table's last decimal, and a little for its binary form.
    expect(Math.abs(percent - row.number('closed_form_pct'))).toBeLessThanOrEqual(0.00501);
    // ± 0.6 points: one sweep step of the measurement (0.52) plus the rounding of the table.
    expect(Math.abs(percent - row.number('measured_unfiltered_pct'))).toBeLessThanOrEqual(0.6);
  });
});

describe('plain and image-domain thresholds (acceleration-cases)', () => {
  /** Object half-width 150, displayed FOV 250, R = 2; one line a millimetre, so that L is the acquired width. */
  function pose(row: PublishedRow, unfolding: 'k-space-self-calibrating' | 'image-domain-grid-ends'): CaseInput {
    return {
      patient: { parts: [cylinder('object', row.number('object_shift_mm'), 0, 150, 100)] },
      prescription: {
        phaseAxis: 'RL', fovPhaseMm: 250, fovReadoutMm: 250, linesAcrossFov: 250,
        acquiredLines: row.number('acquired_width_mm'),
        acceleration: { factorPhase: 2, unfolding },
      },
      policy: BARE,
    };
  }

  it.each(table('acceleration-cases').map((row) => [row.number('object_shift_mm'), row.number('acquired_width_mm'), row] as const))(
    'object %d mm off centre, %d mm acquired',
    (_shift, _width, row) => {
      const plain = ask(pose(row, 'k-space-self-calibrating'));
      expect(plain.fold!.inKeepClear).toBe(row.text('plain_rule_holds') !== 'True');
      const imageDomain = ask(pose(row, 'image-domain-grid-ends'));
      expect(imageDomain.fold!.inKeepClear).toBe(row.text('covers_object') !== 'True');
    },
  );
});

describe('scan times (scan-time)', () => {
  const stack = (slices: number) => ({ mode: 'stack' as const, slices });
  const echoTrain = { family: 'echo-train-spin-echo', trMs: 4000, echoTrainLength: 15, echoSpacingMs: 8, sliceTimeMs: 120 } as const;
  const slab = (acquiredPartitions: number, partitions = 64) => ({ mode: 'slab' as const, partitions, partitionThicknessMm: 2, acquiredPartitions });
  const spinEcho = { family: 'spin-echo', trMs: 500, sliceTimeMs: 20 } as const;

  /** The inputs column of each row, in the check's own words. Percent Sampling and oversampling stand where the row has them. */
  const POSED: Readonly<Record<string, Omit<CaseInput['prescription'], 'fovReadoutMm'>>> = {
    '1': { ...spinEcho, linesAcrossFov: 256 },
    '3': { ...spinEcho, linesAcrossFov: 256, phaseOversamplingPct: 50 },
    '5': { ...spinEcho, percentPhaseFieldOfView: 75, linesAcrossFov: 192, phaseOversamplingPct: 30 },
    '7': { ...spinEcho, linesAcrossFov: 256, slices: stack(30), sliceTimeMs: 25 },
    '9': { ...echoTrain, linesAcrossFov: 320, phaseOversamplingPct: 30 },
    '11': { ...echoTrain, linesAcrossFov: 320, phaseOversamplingPct: 100 },
    '13': { ...echoTrain, linesAcrossFov: 320, phaseOversamplingPct: 100, averages: 1 },
    '15': { family: 'gradient-echo', trMs: 150, linesAcrossFov: 173, slices: stack(20), sliceTimeMs: 10 },
    '17': { family: 'single-shot-echo-train', trMs: 1200, teMs: 400, linesAcrossFov: 173, echoSpacingMs: 4.2, slices: stack(25), sliceTimeMs: 800 },
    '19': { family: 'echo-planar', trMs: 5000, linesAcrossFov: 160, fovPhaseMm: 300, echoSpacingMs: 0.7, volumes: 4, sliceTimeMs: 100, acceleration: { factorPhase: 2 } },
    '21': { family: 'gradient-echo-3d', trMs: 4.5, linesAcrossFov: 218, phaseOversamplingPct: 20, slices: slab(64) },
    '23': { family: 'gradient-echo-3d', trMs: 4.5, linesAcrossFov: 218, phaseOversamplingPct: 20, slices: { mode: 'slab', partitions: 64, partitionThicknessMm: 2, sliceOversamplingPct: 20 } },
    // One phase line and all partitions a shot: 282 segments of 176 × 10 ms with 540 ms of preparation make 2.3 s each.
    '25': { family: 'gradient-echo-3d', trMs: 10, linesAcrossFov: 282, slices: slab(176, 176), segments: 282, preparationMs: 540 },
  };

  const rows = readPublished('scan-time');
  it('poses every row', () => expect(rows.map((row) => row.text('case'))).toEqual(Object.keys(POSED)));
  it.each(rows.map((row) => [row.text('case'), row.text('sequence'), row] as const))('case %s: %s', (key, _sequence, row) => {
    const { time } = ask({ patient: { breadthMm: 300, depthMm: 200 }, prescription: { fovReadoutMm: 300, ...POSED[key] }, policy: BARE });
    // Arithmetic on both sides; nine decimals leave room for the last bits of a double only.
    expect(time!.scanS).toBeCloseTo(row.number('time_s'), 9);
    if (key === '17') expect(time!.trainMs).toBeCloseTo(726.6, 9);
    if (key === '19') expect(time!.displacementPer100HzMm).toBeCloseTo(10.5, 9);
  });
});

describe('contaminated partitions of single-pulse slabs (slab-partitions)', () => {
  const whole = readPublished('slab-partitions').filter((row) => {
    const acquired = row.number('partitions') * (1 + row.number('slice_oversampling_pct') / 100);
    return Math.abs(acquired - Math.round(acquired)) < 1e-9;
  });

  function pose(row: PublishedRow): CaseInput {
    return {
      patient: { parts: [cylinder('object', 0, 0, 60, 60)] },
      prescription: {
        // Single-pulse at any flip: with TR far above T1 a spoiled sequence is (1 − E1) = 1 times |Mxy|.
        family: 'gradient-echo-3d',
        trMs: 60000,
        fovReadoutMm: 150,
        flipDeg: row.number('flip_deg'),
        slices: {
          mode: 'slab',
          partitions: row.number('partitions'),
          partitionThicknessMm: 1,
          sliceOversamplingPct: row.number('slice_oversampling_pct'),
          timeBandwidthProduct: row.number('tbw'),
        },
      },
      policy: { ...BARE, slabTolerance: row.number('threshold_pct_of_plateau') / 100, tissueT1Ms: { parenchyma: 10, fat: 10 } },
    };
  }

  it('finds the rows with whole partitions: those at 0, 25 and 50 %', () => expect(whole).toHaveLength(144));
  it('agrees with all of them within one partition an end', () => {
    for (const row of whole) {
      const { slab } = ask(pose(row));
      const bad = slab!.partitions.filter(({ state }) => state === 'contaminated');
      const name = ['tbw', 'flip_deg', 'partitions', 'slice_oversampling_pct', 'threshold_pct_of_plateau'].map((column) => row.text(column)).join(' ');
      // ± 1 an end: both sides sample the profile at partition centres, and an edge may fall between two.
      const low = bad.filter(({ offsetMm }) => offsetMm < 0).length;
      const high = bad.filter(({ offsetMm }) => offsetMm > 0).length;
      expect(Math.abs(low - row.number('contaminated_low_end')), `${name}, low end`).toBeLessThanOrEqual(1);
      expect(Math.abs(high - row.number('contaminated_high_end')), `${name}, high end`).toBeLessThanOrEqual(1);
    }
  });
});
