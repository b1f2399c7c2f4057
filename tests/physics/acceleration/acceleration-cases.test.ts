import { describe, expect, it } from 'vitest';
import { ghostWidths, mirrorMargin, mirrorPhase } from '@/lib/physics/acceleration/ghost-widths';
import { unfoldingRule } from '@/lib/physics/acceleration/unfolding-rule';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { straight } from '@/lib/physics/section/curve';
import { readTable } from '../fold/read-table';
import { boxPart, samplePrescription, sampleProblem } from '../fold/sample-problem';

/** Object half-width 150, displayed FOV 250, as measured. */
function solve(
  shift: number,
  unfolding: 'k-space-self-calibrating' | 'image-domain-grid-ends',
  factorPhase = 2,
) {
  const object = boxPart('object', { xMm: [-100, 100], yMm: [shift - 150, shift + 150], zMm: [-50, 50] });
  const prescription = samplePrescription({
    fovPhaseMm: 250,
    fovReadoutMm: 200,
    linesAcrossFov: 250,
    acceleration: { ...samplePrescription().acceleration, factorPhase, unfolding },
  });
  return solveFold(sampleProblem([object], prescription));
}

describe('thresholds of both unfolding rules (acceleration-cases.csv)', () => {
  const rows = readTable('acceleration-cases/acceleration-cases.csv');

  it.each(rows)('shift $object_shift_mm, W $acquired_width_mm', (row) => {
    const shift = Number(row.object_shift_mm);
    const width = Number(row.acquired_width_mm);
    // A clean row's error energy is truncation alone (1e-4 right at the edge, 1e-7 beyond); a folding one's is 2e-3 up.
    const plainClean = Number(row.error_energy_plain) < 1e-6;
    const endsClean = Number(row.error_energy_image_domain_r2) < 5e-4;
    expect(solve(shift, 'k-space-self-calibrating').isWidthClean(width)).toBe(plainClean);
    expect(solve(shift, 'image-domain-grid-ends').isWidthClean(width)).toBe(endsClean);
  });

  it('the exact thresholds lie between the rows where the energy drops', () => {
    expect(solve(0, 'k-space-self-calibrating').requirement().firstCleanMm).toBe(275);
    expect(solve(30, 'k-space-self-calibrating').requirement().firstCleanMm).toBe(305);
    expect(solve(0, 'image-domain-grid-ends').requirement().firstCleanMm).toBe(300);
    expect(solve(30, 'image-domain-grid-ends').requirement().firstCleanMm).toBe(360);
  });

  it('W ≥ 2·max|p − c| is always enough, whatever the factor', () => {
    for (const factor of [2, 3, 4]) {
      for (const shift of [0, 12, 30, -40]) {
        const needed = solve(shift, 'image-domain-grid-ends', factor).requirement().alwaysCleanMm;
        expect(needed).toBeLessThanOrEqual(2 * (150 + Math.abs(shift)));
      }
    }
  });
});

describe('the exact ghost rule', () => {
  const row = (low: number, high: number) => [{ r0: 0, r1: 10, lower: straight(low), upper: straight(high) }];

  it('R = 2 puts the ghost of the edge on the image centre: a small area off centre stays free', () => {
    // Tissue to 200, keep-clear 60 to 100: p − W/2 lies in it for some p beyond W/2 while W < 2·(200 − 60) = 280.
    expect(ghostWidths(row(-200, 200), row(60, 100), [0, 0], 0, 0.5)).toEqual([0, 280]);
    // Keep-clear on the other side of the centre is never reached by m = 1 from this end.
    expect(ghostWidths(row(-200, 200), row(-100, -60), [0, 0], 0, 0.5)).toBeUndefined();
    // m = 2 is the plain fold of what lies beyond W/2.
    expect(ghostWidths(row(-200, 200), row(-100, -60), [0, 0], 0, 1)).toEqual([120, 300]);
  });

  it('agrees with counting points on rows, for either end and any multiple', () => {
    // Independent: points 0.1 mm apart at each width. Widths within 2 mm of an end are not judged: a
    // point off by 0.1 mm moves the end by up to 0.1/(½ − ⅓) = 0.6 mm.
    for (const [low, high, k, l, centre, multiple] of [
      [-230, 190, -60, 80, 10, 0.5],
      [-230, 190, -60, 80, 10, 1],
      [-180, 240, 20, 60, -15, 1 / 3],
      [-180, 240, -90, -20, -15, 2 / 3],
      [120, 260, -90, 100, 0, 0.5],
    ] as const) {
      for (const end of ['high', 'low'] as const) {
        const widths =
          end === 'high'
            ? ghostWidths(row(low, high), row(k, l), [4, 6], centre, multiple)
            : ghostWidths(
                mirrorPhase(row(low, high)),
                mirrorPhase(row(k, l)),
                mirrorMargin([4, 6]),
                -centre,
                multiple,
              );
        for (let w = 150; w < 560; w += 2.5) {
          if (widths?.some((edge) => Math.abs(edge - w) < 2)) continue;
          let fouled = false;
          for (let p = low - 4 + 0.05; p < high + 6; p += 0.1) {
            const beyond = end === 'high' ? p - centre > w / 2 : p - centre < -w / 2;
            const ghost = end === 'high' ? p - multiple * w : p + multiple * w;
            if (beyond && ghost > k && ghost < l) fouled = true;
          }
          expect(fouled, `W ${w}, ${end}, m/R ${multiple}`).toBe(
            widths !== undefined && w > widths[0] && w < widths[1],
          );
        }
      }
    }
  });

  it('says when the cautious rule was assumed', () => {
    const acceleration = {
      ...samplePrescription().acceleration,
      factorPhase: 2,
      unfolding: 'unknown' as const,
    };
    expect(unfoldingRule(samplePrescription({ acceleration }))).toMatchObject({
      kind: 'grid-ends',
      assumed: true,
    });
    expect(
      unfoldingRule(samplePrescription({ acceleration: { ...acceleration, factorPhase: 1 } })),
    ).toMatchObject({
      kind: 'plain',
      assumed: false,
    });
  });
});
