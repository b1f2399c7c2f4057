import { describe, expect, it } from 'vitest';
import { drawSection } from '@/lib/physics';
import { describeGhost, describePiece } from '@/lib/presentation/describe-section';
import { accelerated, prescriptionOf, typicalCase } from '@/tests/support/physics-cases';

/** 300 mm acquired of a body of 340: some folds, and EPI displaces its fat by 40 mm before it does. */
const planar = (factor: number) =>
  drawSection(
    typicalCase({
      prescription: prescriptionOf('echo-planar', {
        echoSpacingMs: 0.6 * factor,
        fatDisplacedTowards: 'high-end',
        acceleration: accelerated(factor, { unfolding: 'image-domain-grid-ends' }),
      }),
    }),
  );

describe('the picture in words', () => {
  it('calls displaced fat fat, and other tissue tissue', () => {
    const words = planar(1).pieces.map(describePiece);
    expect(words.some((each) => /^Trunk fat, displaced 40 mm by EPI, from the posterior side lands on the anterior side/.test(each))).toBe(true);
    expect(words.some((each) => each.startsWith('Trunk tissue from the posterior side'))).toBe(true);
  });

  it('so for ghosts', () => {
    const words = planar(2).ghosts.map(describeGhost);
    expect(words.some((each) => /^Unfolding shows a ghost of trunk fat from the posterior side, displaced \d+ mm by EPI, \d+ mm away/.test(each))).toBe(true);
    expect(words.some((each) => /^Unfolding shows a ghost of trunk tissue from the posterior side, 150 mm away/.test(each))).toBe(true);
  });
});
