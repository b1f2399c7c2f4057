import { describe, expect, it } from 'vitest';
import { simulateImage, toGreyLevels } from '@/lib/physics';
import { foldPosition } from '@/lib/physics/fold/fold-position';
import { foldOntoRow, type RowSampling } from '@/lib/physics/image/fold-row';
import { noisyMagnitude } from '@/lib/physics/image/noise';
import { rowInterval, topSegments } from '@/lib/physics/image/row-intervals';
import { tissueSignal } from '@/lib/physics/image/tissue-signal';
import { DomainError } from '@/lib/physics/model/domain-error';
import type { Case } from '@/lib/physics/model/case';
import type { BodyRegion } from '@/lib/physics/model/patient';
import {
  extentsOf,
  prescriptionOf,
  SEQUENCE_FAMILIES,
  sketchCase,
  slabOf,
  stackOf,
  typicalPatient,
  typicalPrescription,
} from '@/tests/support/physics-cases';

const sampling = (overrides: Partial<RowSampling> = {}): RowSampling => ({
  centreMm: 0,
  fovMm: 300,
  widthMm: 300,
  pixels: 300,
  ghostFactor: 1,
  ...overrides,
});

const painted = (how: RowSampling, from: number, to: number): Float64Array => {
  const row = new Float64Array(how.pixels);
  foldOntoRow(row, how, from, to, 1);
  return row;
};
const total = (row: Float64Array): number => row.reduce((sum, value) => sum + value, 0);
const centroidMm = (row: Float64Array, { centreMm, fovMm, pixels }: RowSampling): number =>
  row.reduce((sum, value, i) => sum + value * (centreMm - fovMm / 2 + ((i + 0.5) * fovMm) / pixels), 0) /
  total(row);

describe('one row', () => {
  it('leaves tissue inside the picture where it is, pixel for pixel', () => {
    const row = painted(sampling(), -10.25, 20.5);
    expect(total(row)).toBeCloseTo(30.75, 9);
    expect(row[139]).toBeCloseTo(0.25, 9);
    expect(row[150]).toBe(1);
    expect(row[170]).toBeCloseTo(0.5, 9);
  });

  it.each([
    [170, 300],
    [-220, 400],
    [260, 360],
    [-410, 330],
    [700, 320],
  ])('puts a piece at %d mm where the fold law says at W = %d mm', (at, widthMm) => {
    const how = sampling({ widthMm });
    const row = painted(how, at - 1, at + 1);
    const seen = foldPosition(at, 0, widthMm);
    if (Math.abs(seen) < 149) expect(centroidMm(row, how)).toBeCloseTo(seen, 9);
    else expect(total(row)).toBe(0);
  });

  it('shifts and never mirrors: a ramp beyond the edge keeps its direction', () => {
    const how = sampling();
    const near = painted(how, 155, 156);
    const far = painted(how, 165, 166);
    expect(centroidMm(near, how)).toBeLessThan(centroidMm(far, how));
  });

  it('crops what an acquired margin holds', () => {
    expect(total(painted(sampling({ widthMm: 400 }), 160, 190))).toBe(0);
  });

  it('repeats tissue beyond a grid that ends at W, R times, at its own brightness', () => {
    const how = sampling({ ghostFactor: 2 });
    const row = painted(how, 160, 170);
    // Folded to −140…−130, and half a width on at 10…20: the middle of the picture.
    expect(row.slice(10, 20)).toEqual(new Float64Array(10).fill(1));
    expect(row.slice(160, 170)).toEqual(new Float64Array(10).fill(1));
    expect(total(row)).toBeCloseTo(20, 9);
    expect(total(painted(how, 100, 110))).toBeCloseTo(10, 9);
  });

  it('cuts a row by what lies on top', () => {
    expect(topSegments([[0, 10], [2, 5], undefined, [4, 6]])).toEqual([
      { fromMm: 0, toMm: 2, layer: 0 },
      { fromMm: 2, toMm: 4, layer: 1 },
      { fromMm: 4, toMm: 6, layer: 3 },
      { fromMm: 6, toMm: 10, layer: 0 },
    ]);
  });

  it('crosses a solid where the circle’s equation says', () => {
    const circle = {
      quadric: { centre: [0, 5, 0] as const, xx: 0.01, yy: 0.01, zz: 0, xy: 0, xz: 0, yz: 0 },
      halfSpaces: [{ normal: [0, 1, 0] as const, limit: 10 }],
    };
    expect(rowInterval(circle, 6, 40)).toEqual([-3, 10]);
    expect(rowInterval(circle, 10.1, 0)).toBeUndefined();
  });
});

describe('contrast', () => {
  const signal =
    (family: Parameters<typeof prescriptionOf>[0]) => (tissue: Parameters<typeof tissueSignal>[0]) =>
      tissueSignal(tissue, prescriptionOf(family));

  it('fluid is bright and liver dark with T2 weighting; fat and liver bright, fluid dark with T1 weighting', () => {
    for (const family of ['echo-train-spin-echo', 'single-shot-echo-train'] as const) {
      const of = signal(family);
      expect(of('fluid')).toBeGreaterThan(of('fat'));
      expect(of('fluid')).toBeGreaterThan(2 * of('liver'));
      expect(of('spleen')).toBeGreaterThan(of('liver'));
    }
    for (const family of ['spin-echo', 'gradient-echo', 'gradient-echo-3d'] as const) {
      const of = signal(family);
      expect(of('fat')).toBeGreaterThan(of('liver'));
      expect(of('liver')).toBeGreaterThan(of('spleen'));
      expect(of('liver')).toBeGreaterThan(of('fluid'));
    }
  });

  it('diffusion leaves fluid dark and spleen bright; a balanced sequence shows fluid and fat', () => {
    const diffusion = signal('echo-planar');
    expect(diffusion('spleen')).toBeGreaterThan(diffusion('liver'));
    expect(diffusion('spleen')).toBeGreaterThan(diffusion('gas'));
    const balanced = signal('balanced');
    expect(balanced('fluid')).toBeGreaterThan(balanced('muscle'));
    expect(balanced('fat')).toBeGreaterThan(balanced('muscle'));
  });
});

const quiet = { noiseShare: 0, sizePx: 256 } as const;
const valueAt = (given: Case, xMm: number, yMm: number, options = {}): number => {
  const picture = simulateImage(given, { ...quiet, ...options });
  const p = given.prescription;
  const [across, down] =
    p.phaseAxis === picture.horizontalAxis ? [p.fovPhaseMm, p.fovReadoutMm] : [p.fovReadoutMm, p.fovPhaseMm];
  const column = Math.floor(((xMm + across / 2) / across) * picture.widthPx);
  const row = Math.floor(((yMm + down / 2) / down) * picture.heightPx);
  return picture.values[row * picture.widthPx + column]!;
};

describe('the picture', () => {
  it('is the same twice, and another one with another seed', () => {
    const once = simulateImage(sketchCase());
    expect(simulateImage(sketchCase()).values).toEqual(once.values);
    expect(simulateImage(sketchCase(), { seed: 2 }).values).not.toEqual(once.values);
    expect([once.widthPx, once.heightPx]).toEqual([256, 160]);
  });

  it('shows posterior fat on the anterior side, and no longer with enough lines', () => {
    // Outside the body in front, at x 0, y −160 … nothing; folded tissue lands from y −150 to −130 (15 mm deep with margin 5).
    const folded = valueAt(sketchCase(), 0, -147);
    const clean = valueAt(sketchCase({ prescription: typicalPrescription({ acquiredLines: 300 }) }), 0, -147);
    expect(folded).toBeGreaterThan(clean * 1.8);
  });

  it('shows the ghost of a grid that ends at W in the middle', () => {
    const at = (unfolding: 'image-domain-grid-ends' | 'k-space-self-calibrating') =>
      valueAt(
        sketchCase({
          prescription: typicalPrescription({
            acceleration: { ...prescriptionOf('gradient-echo').acceleration, unfolding },
          }),
        }),
        0,
        10,
      );
    expect(at('image-domain-grid-ends')).toBeGreaterThan(at('k-space-self-calibrating') + 0.3);
  });

  it('moves fat along readout by its shift over the bandwidth', () => {
    const centroid = (bandwidthHzPerPixel: number): number => {
      const given = sketchCase({
        prescription: typicalPrescription({
          bandwidthHzPerPixel,
          fovPhaseMm: 400,
          linesAcrossFov: 320,
          acquiredLines: 320,
          fovReadoutMm: 520,
          readoutMatrix: 416,
        }),
      });
      const { values, widthPx, heightPx } = simulateImage(given, { noiseShare: 0, sizePx: 416 });
      const row = Math.floor(heightPx / 2);
      let edge = 0;
      // Outer left edge of the rim: where brightness first passes half of fat's.
      const line = values.slice(row * widthPx, (row + 1) * widthPx);
      while (line[edge]! < 0.4) edge++;
      return edge;
    };
    // 223.5 Hz at 1.5 T: 4.5 pixels at 50 Hz, 0.4 at 600 Hz; within the pixel a half-covered edge can be off by.
    expect(Math.abs(centroid(50) - centroid(600) - 4.1)).toBeLessThanOrEqual(1);
  });

  it('adds noise with the stated spread, less with more SNR', () => {
    const spread = (relativeSnr: number): number => {
      const noisy = simulateImage(sketchCase(), { relativeSnr, noiseShare: 0.03 }).values;
      const clean = simulateImage(sketchCase(), { noiseShare: 0 }).values;
      const differences = [...noisy].map((value, i) => value - clean[i]!).filter((_, i) => clean[i]! > 0.4);
      const mean = differences.reduce((sum, value) => sum + value, 0) / differences.length;
      return Math.sqrt(differences.reduce((sum, value) => sum + (value - mean) ** 2, 0) / differences.length);
    };
    // 3 %: some 20 000 bright pixels give the spread to 0.5 %; magnitude adds below 0.3 % at this brightness.
    expect(spread(1) / 0.03).toBeCloseTo(1, 1);
    expect(spread(2) / spread(1)).toBeCloseTo(0.5, 1);
  });

  it('has Rayleigh noise in air, mean σ·√(π/2)', () => {
    const values = Array.from({ length: 20_000 }, (_, i) => noisyMagnitude(0, 1, i, 7));
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    // 1.5 %: four bytes are not quite normal (0.3 %), the mean of 20 000 draws spreads by 0.4 %.
    expect(Math.abs(mean / Math.sqrt(Math.PI / 2) - 1)).toBeLessThan(0.015);
  });

  it('mixes the far end into end partitions of a slab, not into its middle', () => {
    const at = (acquiredPartitions: number, sliceOffsetMm: number) =>
      simulateImage(
        sketchCase({
          prescription: prescriptionOf('gradient-echo-3d', { slices: slabOf({ acquiredPartitions }) }),
        }),
        { ...quiet, sliceOffsetMm },
      ).values;
    const difference = (a: Float32Array, b: Float32Array): number =>
      a.reduce((sum, value, i) => sum + Math.abs(value - b[i]!), 0) / a.length;
    expect(difference(at(64, 108), at(128, 108))).toBeGreaterThan(0.05);
    expect(difference(at(64, 0), at(128, 0))).toBeLessThan(0.002);
  });

  it('darkens what lies under a presaturation band, and never to nothing', () => {
    const band = {
      side: 'posterior',
      innerEdgeMm: 150,
      thicknessMm: 40,
      nominalFlipDeg: 90,
      delayMs: 10,
    } as const;
    const with_ = valueAt(
      sketchCase({ prescription: typicalPrescription({ presaturation: [band] }) }),
      0,
      -147,
    );
    const without = valueAt(sketchCase(), 0, -147);
    const tissueAlone = valueAt(
      sketchCase({ prescription: typicalPrescription({ acquiredLines: 300 }) }),
      0,
      -147,
    );
    expect(with_).toBeLessThan(tissueAlone + 0.1 * (without - tissueAlone));
    expect(with_).toBeGreaterThan(tissueAlone);
  });

  it('draws every family and region with bright and dark tissue in it', () => {
    const contrast = (given: Case): number => {
      const levels = toGreyLevels(simulateImage(given, quiet).values);
      return new Set([...levels].map((level) => level >> 4)).size;
    };
    for (const family of SEQUENCE_FAMILIES)
      expect(contrast(sketchCase({ prescription: prescriptionOf(family) })), family).toBeGreaterThanOrEqual(
        5,
      );
    const sizes: Record<Exclude<BodyRegion, 'abdomen'>, number> = {
      pelvis: 180,
      chest: 170,
      head: 78,
      shoulder: 230,
      hip: 190,
      knee: 65,
      breast: 180,
    };
    for (const [region, half] of Object.entries(sizes)) {
      const patient = typicalPatient({
        region: region as BodyRegion,
        extents: extentsOf({
          right: half,
          left: half,
          anterior: half * 0.7,
          posterior: half * 0.7,
          superior: 120,
          inferior: 120,
        }),
      });
      const prescription = typicalPrescription({
        fovPhaseMm: half * 2.2,
        fovReadoutMm: half * 2.4,
        slices: stackOf(20, 5),
      });
      expect(contrast(sketchCase({ patient, prescription })), region).toBeGreaterThanOrEqual(5);
    }
  });

  it('refuses a size or an SNR that is none', () => {
    expect(() => simulateImage(sketchCase(), { sizePx: 8 })).toThrow(DomainError);
    expect(() => simulateImage(sketchCase(), { relativeSnr: 0 })).toThrow(DomainError);
  });
});
