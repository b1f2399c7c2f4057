import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fatShares } from '@/lib/physics/fold/fat-shares';
import { foldProblem } from '@/lib/physics/fold/fold-problem';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { assess, drawSection, simulateImage } from '@/lib/physics';
import { countOf, runsOf, tally } from '@/tests/support/tally';
import {
  accelerated,
  evenMargin,
  prescriptionOf,
  typicalCase,
  typicalPatient,
  typicalPolicy,
  typicalScanner,
} from '@/tests/support/physics-cases';
import { boxPart, ellipsePart, NO_MARGIN_MM, samplePrescription, sampleProblem } from './sample-problem';

const planar = (changes: Parameters<typeof prescriptionOf>[1] = {}) =>
  prescriptionOf('echo-planar', { echoSpacingMs: 0.6, shots: 1, acceleration: accelerated(1), ...changes });

describe('how far EPI displaces fat', () => {
  it('3.5 ppm over the bandwidth along phase: 223.5 Hz · 0.6 ms at 1.5 T, twice that at 3 T', () => {
    // Larmor 42.577 MHz/T (CODATA 2018, from memory): rounding of the given figures is 1e-4 of them.
    expect(fatShares(planar({ fatDisplacedTowards: 'high-end' }), 1.5)[0]).toBeCloseTo(223.5 * 0.0006, 4);
    expect(fatShares(planar({ fatDisplacedTowards: 'high-end' }), 3)[0]).toBeCloseTo(447.1 * 0.0006, 4);
    expect(fatShares(planar({ fatDisplacedTowards: 'low-end' }), 3)[0]).toBeCloseTo(-447.1 * 0.0006, 4);
  });

  it('shots and acceleration divide it; unknown polarity gives both signs', () => {
    const one = fatShares(planar(), 1.5);
    expect(one).toEqual([one[0], -one[0]!]);
    expect(fatShares(planar({ shots: 2 }), 1.5)[0]).toBeCloseTo(one[0]! / 2, 12);
    expect(fatShares(planar({ acceleration: accelerated(3) }), 1.5)[0]).toBeCloseTo(one[0]! / 3, 12);
  });

  it('whole widths change nothing that is seen', () => {
    // 447.1 Hz · 2 ms = 0.894 widths one way is 0.106 the other way.
    expect(fatShares(planar({ echoSpacingMs: 2, fatDisplacedTowards: 'high-end' }), 3)[0]).toBeCloseTo(
      -0.106,
      3,
    );
  });

  it('nothing elsewhere, and nothing without an echo spacing', () => {
    expect(fatShares(prescriptionOf('echo-train-spin-echo'), 3)).toEqual([]);
    expect(fatShares(planar({ echoSpacingMs: 0 }), 3)).toEqual([]);
  });

  it('stands in the problem of a case', () => {
    const given = typicalCase({ prescription: planar(), scanner: typicalScanner({ fieldStrengthT: 3 }) });
    expect(foldProblem(given).fatShares).toEqual(fatShares(planar(), 3));
  });
});

describe('the closed form with displaced fat', () => {
  const solved = (shares: readonly number[]) =>
    solveFold(
      sampleProblem([ellipsePart('trunk', [0, 0], [240, 170])], samplePrescription({ fovPhaseMm: 300 }), {
        fatShares: shares,
      }),
    );

  it('one interval: W ≥ (e + r)/(1 − κ), whichever way the fat goes', () => {
    // Half-width 170 and half a FOV of 300: 320 mm without displacement. Widths are kept to 1 µm.
    expect(solved([]).requirement().alwaysCleanMm).toBe(320);
    for (const shares of [[0.2], [-0.2], [0.2, -0.2]])
      expect(solved(shares).requirement().alwaysCleanMm).toBeCloseTo(400, 3);
  });

  it('one polarity can leave a smaller width clean than both do', () => {
    const one = (shares: readonly number[]) =>
      solveFold(
        sampleProblem(
          [boxPart('part', { xMm: [-50, 50], yMm: [150, 250], zMm: [-200, 200] })],
          samplePrescription(),
          {
            fatShares: shares,
          },
        ),
      ).requirement().alwaysCleanMm;
    expect(one([])).toBe(400);
    // The part lies at the high end: fat that goes on outwards asks for 400/0.8, fat that comes inwards for less than water.
    expect(one([0.2])).toBeCloseTo(500, 3);
    expect(one([-0.2])).toBe(400);
    expect(one([0.2, -0.2])).toBeCloseTo(500, 3);
  });

  it('tissue that is only displaced is not called fold', () => {
    const { fold, reasons, verdict } = assess(
      typicalCase({
        prescription: planar({ fovPhaseMm: 480, fovReadoutMm: 520, linesAcrossFov: 120, acquiredLines: 120 }),
        policy: typicalPolicy({ marginMm: NO_MARGIN_MM }),
      }),
    );
    expect(verdict).toBe('no-fold-expected');
    expect(fold).toMatchObject({ inKeepClear: false, outsideKeepClear: false, displayedAreaMm2: 0 });
    expect(reasons.find(({ code }) => code === 'fat-displaced')?.text).toContain('64 mm');
  });

  it('fold of displaced fat says so: how far it was displaced and how far it came', () => {
    const { fold, reasons, assumptions } = assess(
      typicalCase({
        prescription: planar({ fovPhaseMm: 345, fovReadoutMm: 520, linesAcrossFov: 115, acquiredLines: 115 }),
        policy: typicalPolicy({ marginMm: NO_MARGIN_MM }),
      }),
    );
    const share = 0.134106;
    expect(fold?.inKeepClear).toBe(true);
    expect(fold?.from?.fatDisplacedMm).toBeCloseTo(share * 345, 1);
    expect(fold?.from?.distanceMm).toBeCloseTo((1 - share) * 345, 1);
    expect(Math.abs(fold!.from!.order)).toBe(1);
    expect(reasons[0]!.text).toMatch(/^Fat on the (anterior|posterior) side, displaced 46 mm by EPI,/);
    expect(assumptions.map(({ field }) => field)).toContain('prescription.fatDisplacedTowards');
  });
});

/** Cell ranges [from, to) along readout and phase. */
type Box = readonly [readonly [number, number], readonly [number, number]];

/**
 * Whether a cell of tissue is seen in the area after it was displaced and then folded, by moving cell after cell: the fold
 * law as written, on whole numbers, sharing nothing with lib/physics.
 */
function seenInArea(
  tissue: readonly Box[],
  area: Box,
  margin: readonly [number, number],
  centre: number,
  width: number,
  displacements: readonly number[],
  factor: number,
): boolean {
  const floorMod = (a: number, b: number) => ((a % b) + b) % b;
  for (const [rows, phases] of tissue)
    for (let r = Math.max(rows[0], area[0][0]); r < Math.min(rows[1], area[0][1]); r++)
      for (let cell = phases[0] - margin[0]; cell < phases[1] + margin[1]; cell++)
        for (const displaced of displacements) {
          const sampled = cell + 0.5 + displaced;
          const start = centre - width / 2;
          const folded = start + floorMod(sampled - start, width);
          const inside = folded === sampled;
          const copies = factor === 1 ? [folded] : [];
          if (factor > 1 && !inside)
            for (let k = 0; k < factor; k++)
              copies.push(start + floorMod(folded + (k * width) / factor - start, width));
          if (inside && factor === 1) continue;
          if (copies.some((at) => at > area[1][0] && at < area[1][1])) return true;
        }
  return false;
}

describe('displaced, then folded: every cell of a lattice', () => {
  const runs = runsOf(400);

  it(`${runs} cases, plain and unfolded in the image`, () => {
    const range = (low: number, high: number) =>
      fc
        .tuple(fc.integer({ min: low, max: high - 1 }), fc.integer({ min: 1, max: high - low }))
        .map(([from, length]): readonly [number, number] => [from, Math.min(high, from + length)]);
    const box = fc.tuple(range(-5, 5), range(-45, 45));
    let widths = 0;
    let folding = 0;
    let onlyByFat = 0;
    fc.assert(
      fc.property(
        fc.array(box, { minLength: 1, maxLength: 3 }),
        fc.record({
          fovHalf: fc.integer({ min: 6, max: 24 }),
          centre: fc.integer({ min: -6, max: 6 }),
          area: fc.tuple(range(-5, 5), range(-24, 24)),
          margin: fc.tuple(fc.integer({ min: 0, max: 3 }), fc.integer({ min: 0, max: 3 })),
          divisor: fc.constantFrom(2, 4, 6, 8),
          part: fc.integer({ min: -4, max: 4 }),
          both: fc.boolean(),
          factor: fc.constantFrom(1, 1, 2, 3, 4),
          unit: fc.constantFrom(1, 2, 5, 0.7),
        }),
        (tissue, { fovHalf, centre, area, margin, divisor, part, both, factor, unit }) => {
          const share = part / divisor;
          if (Math.abs(share) > 0.5) return;
          const shares = share === 0 ? [] : both ? [share, -share] : [share];
          const p0 = Math.max(area[1][0], centre - fovHalf);
          const p1 = Math.min(area[1][1], centre + fovHalf);
          if (p1 <= p0) return;
          const mm = ([a, b]: readonly [number, number]) => [a * unit, b * unit] as const;
          const prescription = samplePrescription({
            centreMm: [0, centre * unit, 0],
            fovPhaseMm: 2 * fovHalf * unit,
            fovReadoutMm: 10 * unit,
            acceleration: {
              ...samplePrescription().acceleration,
              factorPhase: factor,
              unfolding: 'image-domain-grid-ends',
            },
          });
          const problem = sampleProblem(
            tissue.map(([r, p], i) => boxPart(`${i}`, { xMm: mm(r), yMm: mm(p), zMm: [-200, 200] })),
            prescription,
            {
              keepClear: {
                axes: [
                  [1, 0, 0],
                  [0, 1, 0],
                  [0, 0, 1],
                ],
                rangesMm: [mm(area[0]), mm([p0, p1]), [-100, 100]],
              },
              marginMm: { ...NO_MARGIN_MM, anterior: margin[0] * unit, posterior: margin[1] * unit },
              fatShares: shares,
            },
          );
          const solved = solveFold(problem);
          // Multiples of 24 keep displacements by eighths and sixths, and thirds and quarters of W, on the lattice.
          for (let width = 24 * Math.ceil(fovHalf / 12); width <= 144; width += 24) {
            const found = (by: readonly number[]) =>
              seenInArea(
                tissue,
                [area[0], [p0, p1]],
                margin,
                centre,
                width,
                by.map((one) => one * width),
                factor,
              );
            const expected = found([0, ...shares]);
            widths++;
            if (expected) folding++;
            if (expected && !found([0])) onlyByFat++;
            expect(solved.isWidthClean(width * unit), `W ${width}`).toBe(!expected);
          }
        },
      ),
      { numRuns: runs, seed: 20261201 },
    );
    // The cases are worth asking: a good part fold, and some only because fat is displaced.
    expect(folding).toBeGreaterThan(widths / 10);
    expect(onlyByFat).toBeGreaterThan(widths / 100);
    tally(
      'displaced fat on a lattice',
      runs,
      `${widths} widths, ${folding} fold, ${onlyByFat} only by fat, none differs`,
    );
  });
});

describe('the drawing and the picture show what the rule says', () => {
  const arm = (position: 'left' | 'right', x: number) => ({
    ...ellipsePart(`${position} arm`, [x, 0], [40, 45]),
    kind: 'arm' as const,
  });
  const given = (lines: number, x: number, towards: 'low-end' | 'high-end' | undefined, factor = 1) =>
    typicalCase({
      patient: typicalPatient({ parts: [arm('left', x)] }),
      keepClear: {
        area: { kind: 'box', box: { xMm: [-130, -20], yMm: [-60, 60], zMm: [-50, 50] } },
        followsWindow: false,
      },
      policy: typicalPolicy({ marginMm: evenMargin(0) }),
      prescription: planar({
        phaseAxis: 'RL',
        fovPhaseMm: 320,
        fovReadoutMm: 320,
        linesAcrossFov: 160,
        readoutMatrix: 160,
        acquiredLines: lines,
        echoSpacingMs: 0.9,
        bandwidthHzPerPixel: 20000,
        slices: { mode: 'stack', slices: 1, thicknessMm: 5, gapMm: 0 },
        acceleration: accelerated(factor, {
          unfolding: factor > 1 ? 'image-domain-grid-ends' : 'k-space-self-calibrating',
        }),
        ...(towards && { fatDisplacedTowards: towards }),
      }),
    });

  it('a piece is drawn in the keep-clear area exactly where the rule forbids the width', () => {
    let inside = 0;
    for (const towards of ['low-end', 'high-end', undefined] as const)
      for (const factor of [1, 2])
        for (let lines = 160; lines <= 300; lines += 7) {
          const asked = given(lines, 230, towards, factor);
          const drawing = drawSection(asked);
          const drawn = [...drawing.pieces, ...drawing.ghosts].filter(
            ({ inKeepClear }) => inKeepClear.length > 0,
          );
          expect(drawn.length > 0, `${lines} lines ${towards} R ${factor}`).toBe(
            assess(asked).fold!.inKeepClear,
          );
          if (drawn.length > 0) inside++;
          const names = [...drawing.pieces, ...drawing.ghosts].map(({ name }) => name);
          expect(new Set(names).size).toBe(names.length);
        }
    expect(inside).toBeGreaterThan(20);
  });

  /** Brightness inside the area. Without an echo spacing nothing is displaced: the picture water would make. */
  const brightness = (asked: ReturnType<typeof given>) => {
    // A part of no other kind is painted as fat through and through.
    const parts = asked.patient.parts!.map((part) => ({ ...part, kind: 'other' as const }));
    const image = simulateImage(
      { ...asked, patient: { ...asked.patient, parts } },
      { noiseShare: 0, sizePx: 160 },
    );
    return [...image.values].reduce((most, value, i) => {
      const x = -160 + ((i % 160) + 0.5) * 2;
      const y = -160 + (Math.floor(i / 160) + 0.5) * 2;
      // Half a pixel inside the area: a pixel over its edge holds what lies beside it as well.
      return x > -129 && x < -21 && Math.abs(y) < 59 ? Math.max(most, value) : most;
    }, 0);
  };

  it('the simulated picture, of fat and of water, is bright there exactly where the rule says so', () => {
    const cases = countOf('SELVEDGE_EPI_PICTURES', 40);
    const seen = { bright: 0, dark: 0, near: 0 };
    for (let k = 0; k < cases; k++) {
      const lines = 160 + ((k * 37) % 150);
      const asked = given(lines, 215 + ((k * 11) % 60), k % 2 === 0 ? 'low-end' : 'high-end');
      const { prescription: p } = asked;
      const widthMm = (lines * p.fovPhaseMm) / p.linesAcrossFov;
      const fat = brightness(asked);
      const water = brightness({ ...asked, prescription: { ...p, echoSpacingMs: 0 } });
      const { forbiddenMm } = assess(asked).width!;
      const held = forbiddenMm.some(([low, high]) => widthMm > low && widthMm < high);
      // The picture has pixels of 2 mm: nearer than 4 mm to an end it cannot tell.
      const end = Math.min(...forbiddenMm.flat().map((at) => Math.abs(at - widthMm)));
      if (end < 4) {
        seen.near++;
        continue;
      }
      if (held) seen.bright++;
      else seen.dark++;
      expect(Math.max(fat, water) > 1e-3, `${lines} lines, case ${k}`).toBe(held);
    }
    expect(seen.bright).toBeGreaterThan(cases / 8);
    expect(seen.dark).toBeGreaterThan(cases / 8);
  });
});
