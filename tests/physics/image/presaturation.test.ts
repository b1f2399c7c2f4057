import { describe, expect, it } from 'vitest';
import { simulateImage } from '@/lib/physics';
import { presaturatedWeight } from '@/lib/physics/body/presaturated-weight';
import type { Prescription, PresaturationBand } from '@/lib/physics/model/prescription';
import { prescriptionOf, sketchCase, slabOf, typicalPrescription } from '@/tests/support/physics-cases';

/** The whole body inside the picture, 4 mm pixels, chemical shift of a fifth of a pixel: nothing folds or moves. */
const open = (overrides: Partial<Prescription>): Prescription =>
  typicalPrescription({
    fovPhaseMm: 640,
    linesAcrossFov: 160,
    acquiredLines: 160,
    fovReadoutMm: 640,
    readoutMatrix: 160,
    bandwidthHzPerPixel: 1200,
    ...overrides,
  });

const picture = (prescription: Prescription) =>
  simulateImage(sketchCase({ prescription }), { noiseShare: 0, sizePx: 160 });

describe('a presaturation band in the picture', () => {
  const inner = 60;
  const thickness = 56;
  const outward = { right: [-1, 0], left: [1, 0], anterior: [0, -1], posterior: [0, 1] } as const;

  it.each(
    (['AP', 'RL'] as const).flatMap((phaseAxis) =>
      (['right', 'left', 'anterior', 'posterior'] as const).map((side) => ({ phaseAxis, side })),
    ),
  )('darkens what lies in it and nothing else: phase $phaseAxis, $side', ({ phaseAxis, side }) => {
    const band: PresaturationBand = {
      side,
      innerEdgeMm: inner,
      thicknessMm: thickness,
      nominalFlipDeg: 90,
      delayMs: 10,
    };
    const without = picture(open({ phaseAxis }));
    const under = picture(open({ phaseAxis, presaturation: [band] }));
    const [outX, outY] = outward[side];
    let [inside, outside] = [0, 0];
    const wrong: string[] = [];
    for (let y = 0; y < 160; y++)
      for (let x = 0; x < 160; x++) {
        const before = without.values[y * 160 + x]!;
        if (before < 0.05) continue;
        const after = under.values[y * 160 + x]!;
        const along = (outX * (x + 0.5) + outY * (y + 0.5)) * 4 - 320 * (outX + outY);
        // Two pixels beside each edge are partly in it, and fat there comes from its neighbour.
        if (along > inner + 8 && along < inner + thickness - 8) {
          inside++;
          // At 90° what comes back in 10 ms is below 4 % for every tissue (fat, the fastest: 1 − e^(−10/260)).
          if (!(after > 0 && after / before < 0.05)) wrong.push(`in it ${x}, ${y}: ${after / before}`);
        } else if (along < inner - 8 || along > inner + thickness + 8) {
          outside++;
          if (after !== before) wrong.push(`beside it ${x}, ${y}: ${after / before}`);
        }
      }
    expect(wrong).toEqual([]);
    expect(inside).toBeGreaterThan(400);
    expect(outside).toBeGreaterThan(3000);
  });

  it('turns with the section: in a tilted plane its edge runs where the patient’s axis says', () => {
    const band: PresaturationBand = {
      side: 'anterior',
      innerEdgeMm: 60,
      thicknessMm: 64,
      nominalFlipDeg: 90,
      delayMs: 10,
    };
    const turned = { inPlaneRotationDeg: 30 };
    const without = picture(open(turned));
    const under = picture(open({ ...turned, presaturation: [band] }));
    let [darker, same] = [0, 0];
    const wrong: string[] = [];
    for (let y = 0; y < 160; y++)
      for (let x = 0; x < 160; x++) {
        const before = without.values[y * 160 + x]!;
        if (before < 0.05) continue;
        // Readout is turned 30° from left towards posterior, phase from posterior towards right.
        const [r, p] = [(x + 0.5) * 4 - 320, (y + 0.5) * 4 - 320];
        const anterior = -(r * Math.sin(Math.PI / 6) + p * Math.cos(Math.PI / 6));
        const beyond = anterior - band.innerEdgeMm;
        if (Math.abs(beyond) < 10 || Math.abs(beyond - band.thicknessMm) < 10) continue;
        const after = under.values[y * 160 + x]!;
        if (beyond > 0 && beyond < band.thicknessMm) {
          darker++;
          if (!(after / before < 0.05)) wrong.push(`in it ${x}, ${y}: ${after / before}`);
        } else {
          same++;
          if (after !== before) wrong.push(`beside it ${x}, ${y}: ${after / before}`);
        }
      }
    expect(wrong).toEqual([]);
    expect(darker).toBeGreaterThan(1000);
    expect(same).toBeGreaterThan(3000);
  });

  it('across the slice takes a whole section or leaves it', () => {
    const band: PresaturationBand = {
      side: 'superior',
      innerEdgeMm: 40,
      thicknessMm: 30,
      nominalFlipDeg: 90,
      delayMs: 10,
    };
    const brightness = (sliceOffsetMm: number, presaturation: PresaturationBand[]) =>
      simulateImage(sketchCase({ prescription: open({ presaturation }) }), {
        noiseShare: 0,
        sizePx: 160,
        sliceOffsetMm,
      }).values.reduce((sum, value) => sum + value, 0);
    for (const at of [39, 71, -55]) expect(brightness(at, [band])).toBe(brightness(at, []));
    for (const at of [41, 69]) expect(brightness(at, [band])).toBeLessThan(0.05 * brightness(at, []));
  });

  it('two bands on one place weaken it twice', () => {
    // At 70° enough is left to be told: |1 − (1 − cos 70°)·e^(−10/T1)| is above a third.
    const band: PresaturationBand = {
      side: 'anterior',
      innerEdgeMm: 60,
      thicknessMm: 400,
      nominalFlipDeg: 70,
      delayMs: 10,
    };
    const at = (presaturation: PresaturationBand[]) =>
      picture(open({ presaturation })).values[Math.floor((320 - 100) / 4) * 160 + 80]!;
    const [none, one, two] = [at([]), at([band]), at([band, band])];
    expect(one / none).toBeGreaterThan(0.3);
    expect(two / none).toBeCloseTo((one / none) ** 2, 5);
    expect(one / none).toBeLessThanOrEqual(presaturatedWeight(70, 1, 10, 250) + 1e-6);
  });
});

describe('a slab that is not selective', () => {
  // Fat at the side of a trunk that goes on along z: tissue is seen 250 mm each way, so copies S apart that lie in it add up.
  it.each([
    [70, 7],
    [100, 5],
    [120, 5],
    [130, 3],
    [260, 1],
  ])('of %d mm shows every copy that coil and magnet see: %d', (slabMm, copies) => {
    const at = (thicknessMm: number) =>
      simulateImage(
        sketchCase({
          prescription: {
            ...prescriptionOf('gradient-echo-3d'),
            ...({
              fovPhaseMm: 640,
              linesAcrossFov: 160,
              acquiredLines: 160,
              fovReadoutMm: 640,
              readoutMatrix: 160,
              bandwidthHzPerPixel: 1200,
            } as const),
            slices: slabOf({
              selective: false,
              partitions: 20,
              acquiredPartitions: 20,
              partitionThicknessMm: thicknessMm / 20,
            }),
          },
        }),
        { noiseShare: 0, sizePx: 160 },
      ).values[80 * 160 + Math.floor((320 + 228) / 4)]!;
    expect(at(slabMm) / at(600)).toBeCloseTo(copies, 5);
  });
});
