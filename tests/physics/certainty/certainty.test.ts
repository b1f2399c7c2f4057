import { describe, expect, it } from 'vitest';
import { assess, foldProbability, rankRemedies, sizesAt } from '@/lib/physics';
import { normalCumulative, normalQuantile } from '@/lib/physics/certainty/normal';
import { haltonPoints } from '@/lib/physics/certainty/quasi-random';
import { DomainError } from '@/lib/physics/model/domain-error';
import type { Patient } from '@/lib/physics/model/patient';
import {
  evenMargin,
  measured,
  prescriptionOf,
  sketchCase,
  typicalPatient,
  typicalPolicy,
  typicalPrescription,
  workedCase,
} from '@/tests/support/physics-cases';

const withSpread = (spread: number, values: Partial<Patient> = {}): Patient => {
  const patient = typicalPatient(values);
  return {
    ...patient,
    extents: {
      ...patient.extents,
      anterior: { ...patient.extents.anterior, spread },
      posterior: { ...patient.extents.posterior, spread },
    },
  };
};

describe('standard normal', () => {
  // Source: [abramowitz-1964] table 26.1, fifteen places there, ten taken.
  it.each([
    [0, 0.5],
    [1, 0.8413447461],
    [1.96, 0.9750021049],
    [3, 0.998650102],
    [-2, 0.0227501319],
    [4.5, 0.9999966023],
  ])('Φ(%d) = %d', (x, p) => expect(normalCumulative(x)).toBeCloseTo(p, 9));

  // The same to the last digits a double holds, by the C library's erfc: the stated error is 1e-14.
  it.each([
    [0.5, 0.6914624612740131],
    [1, 0.8413447460685429],
    [2, 0.9772498680518208],
    [3, 0.9986501019683699],
    [3.9, 0.9999519036559824],
    [-4, 3.1671241833119965e-5],
  ])('Φ(%d) = %d to 1e-14', (x, p) => expect(Math.abs(normalCumulative(x) - p)).toBeLessThan(1e-14));

  it('keeps its digits far out, where a share is one in a thousand million', () => {
    // Relative, by erfc as above; the continued fraction is used from 4 on.
    for (const [x, tail] of [
      [4, 3.1671241833119965e-5],
      [4.5, 3.3976731247300615e-6],
      [6, 9.865876450377012e-10],
    ] as const)
      expect(Math.abs(normalCumulative(-x) / tail - 1)).toBeLessThan(1e-12);
    expect(normalCumulative(Infinity)).toBe(1);
    expect(normalCumulative(-Infinity)).toBe(0);
  });

  it('inverts itself', () => {
    // 1e-9: the quantile's own stopping step is 1e-14, Φ loses digits near 1.
    for (const p of [1e-6, 0.01, 0.3, 0.5, 0.77, 0.95, 0.999])
      expect(normalCumulative(normalQuantile(p))).toBeCloseTo(p, 9);
    expect(normalQuantile(0.95)).toBeCloseTo(1.6448536, 6);
    // The median is no deviation, and not minus none.
    expect(Object.is(normalQuantile(0.5), 0)).toBe(true);
    // 1e-3: p is asked for by 1 − p, which keeps four digits of 1e-12.
    for (const p of [1e-12, 1e-9])
      expect(Math.abs(normalCumulative(normalQuantile(p)) / p - 1)).toBeLessThan(1e-3);
  });

  it('refuses a probability that is none', () => {
    for (const p of [0, 1, -0.1, 1.1, Number.NaN]) expect(() => normalQuantile(p)).toThrow(DomainError);
  });
});

describe('quasi-random points', () => {
  it('are the same every time and fill the square evenly', () => {
    const points = haltonPoints(512, 2);
    expect(points).toEqual(haltonPoints(512, 2));
    // Each quarter holds 128 of 512 within 3: the discrepancy of 512 Halton points in two dimensions is below 0.02.
    for (const [a, b] of [
      [0, 0],
      [0, 1],
      [1, 0],
      [1, 1],
    ] as const) {
      const share = points.filter(([x, y]) => Math.floor(x! * 2) === a && Math.floor(y! * 2) === b).length;
      expect(Math.abs(share - 128)).toBeLessThanOrEqual(6);
    }
  });
});

describe('sizes at a certainty', () => {
  it('returns the same object where nothing is uncertain, and the same extents when asked twice', () => {
    const sure = typicalPatient();
    expect(sizesAt(sure, 0.95)).toBe(sure);
    const unsure = withSpread(10);
    expect(sizesAt(unsure, 0.95).extents).toBe(sizesAt(unsure, 0.95).extents);
    expect(sizesAt(unsure, 0.95).extents.anterior.value).toBeCloseTo(170 + 16.4485, 3);
    expect(sizesAt(unsure, 0.5)).toBe(unsure);
  });
});

describe('probability of fold', () => {
  it('is 1 − Φ((W − r − |o − q| − μ)/σ) for one interval', () => {
    // Whole FOV of 300 centred: r = 150, q = o = 0, μ = 170; W = 330, σ = 8: 1 − Φ(10/8).
    const given = { ...workedCase({ linesAcrossFov: 300, acquiredLines: 330 }), patient: withSpread(8) };
    const { probability, method } = foldProbability(given);
    expect(method).toBe('exact');
    // 1e-6: bisection ends at 1e-9 spreads, widths compare at 1 µm of 8 mm, times φ ≤ 0.4.
    expect(probability).toBeCloseTo(1 - normalCumulative(10 / 8), 4);
  });

  it('takes the margin to be no part of it', () => {
    const given = { ...workedCase({ linesAcrossFov: 300, acquiredLines: 330 }), patient: withSpread(8) };
    const wide = { ...given, policy: typicalPolicy({ marginMm: evenMargin(20) }) };
    expect(foldProbability(wide)).toEqual(foldProbability(given));
  });

  it('is certain without spread', () => {
    expect(foldProbability(workedCase()).probability).toBe(1);
    expect(foldProbability(workedCase({ acquiredLines: 274 })).probability).toBe(0);
    // One size was looked at, since there is only one.
    expect(foldProbability(workedCase())).toEqual({ probability: 1, method: 'certain', draws: 1 });
  });

  it('agrees with a plain count of sizes where arms make gaps', () => {
    const patient = withSpread(0, {
      arms: { position: 'down', breadthMm: 80, depthMm: 100, gapMm: 40 },
    });
    const spread: Patient = {
      ...patient,
      extents: { ...patient.extents, right: measured(210, 15), left: measured(210, 15) },
    };
    // Keep-clear |x| < 10, W 230: trunk of half-width s folds when s > 220, the arm from s + 40 on when s < 200.
    const prescription = prescriptionOf('balanced', {
      fovPhaseMm: 220,
      linesAcrossFov: 220,
      acquiredLines: 230,
      fovReadoutMm: 400,
    });
    const keepClear = {
      area: {
        kind: 'box' as const,
        box: { xMm: [-10, 10] as const, yMm: [-50, 50] as const, zMm: [-60, 60] as const },
      },
      followsWindow: false,
    };
    const given = sketchCase({
      patient: spread,
      prescription,
      keepClear,
      policy: typicalPolicy({ marginMm: evenMargin(0) }),
    });
    const answer = foldProbability(given);
    expect(answer.method).toBe('quasi-random');
    let folding = 0;
    const draws = 1000;
    for (let i = 0; i < draws; i++) {
      const size = 210 + 15 * normalQuantile((i + 0.5) / draws);
      const one = { ...spread, extents: { ...spread.extents, right: measured(size), left: measured(size) } };
      if (assess({ ...given, patient: one }).fold!.inKeepClear) folding++;
    }
    const expected = 1 - (normalCumulative(10 / 15) - normalCumulative(-10 / 15));
    expect(Math.abs(folding / draws - expected)).toBeLessThan(0.002);
    // 0.01: 512 quasi-random sizes against 1000 evenly spaced ones, a few thresholds each worth at most 1/512.
    expect(Math.abs(answer.probability - folding / draws)).toBeLessThan(0.01);
    expect(folding).toBeGreaterThan(0);
    expect(folding).toBeLessThan(draws);
  });
});

describe('sure at p', () => {
  it('sizes a remedy that holds for p of such patients', () => {
    const given = sketchCase({
      patient: withSpread(8),
      prescription: typicalPrescription(),
      policy: typicalPolicy({ marginMm: evenMargin(0), sureAt: 0.95 }),
    });
    const first = rankRemedies(given).remedies.find((remedy) => remedy.key === 'phase-oversampling')!;
    const adopted = { ...given, prescription: first.prescription };
    // One line is 1.25 mm, so the grid can only make it surer.
    expect(foldProbability(adopted).probability).toBeLessThanOrEqual(0.05);
    const oneLess = {
      ...adopted,
      prescription: { ...first.prescription, acquiredLines: first.prescription.acquiredLines - 1 },
    };
    expect(foldProbability(oneLess).probability).toBeGreaterThan(0.05);
  });

  it('does not trust a width that is clean only in a gap between trunk and arm', () => {
    const patient = typicalPatient({ arms: { position: 'down', breadthMm: 80, depthMm: 100, gapMm: 40 } });
    const unsure: Patient = {
      ...patient,
      extents: { ...patient.extents, right: measured(185.3, 15), left: measured(185.3, 15) },
    };
    const prescription = prescriptionOf('balanced', {
      fovPhaseMm: 220,
      linesAcrossFov: 220,
      acquiredLines: 230,
      fovReadoutMm: 400,
    });
    const keepClear = {
      area: {
        kind: 'box' as const,
        box: { xMm: [-10, 10] as const, yMm: [-50, 50] as const, zMm: [-60, 60] as const },
      },
      followsWindow: false,
    };
    const given = sketchCase({
      patient: unsure,
      prescription,
      keepClear,
      policy: typicalPolicy({ marginMm: evenMargin(0) }),
    });
    const answer = assess(given);
    // At the 95 % size (half-width 210) 230 mm is clean; in most smaller patients it is not.
    expect(answer.fold?.inKeepClear).toBe(false);
    expect(answer.verdict).toBe('fold-in-keep-clear');
    expect(answer.reasons[0]?.code).toBe('clean-only-at-this-size');
    const sure = {
      ...given,
      patient: { ...unsure, extents: { ...unsure.extents, right: measured(210), left: measured(210) } },
    };
    expect(assess(sure).verdict).not.toBe('fold-in-keep-clear');
  });
});
