import { describe, expect, it } from 'vitest';
import { assess, drawSection } from '@/lib/physics';
import { applies } from '@/lib/domain/demonstration/controls';
import { findSetPiece, SET_PIECES } from '@/lib/domain/demonstration/set-pieces';
import { sceneDocumentSchema } from '@/lib/schemas/demonstration';

const scenesOf = (key: string) => findSetPiece(key)!.scenes();
const verdictsOf = (key: string) => scenesOf(key).map(({ question }) => assess(question).verdict);

describe('set pieces', () => {
  it.each(SET_PIECES.map(({ key }) => key))('%s: every scene is storable, can be drawn, and offers only controls that do something', (key) => {
    const scenes = scenesOf(key);
    expect(scenes.length).toBeGreaterThan(1);
    for (const scene of scenes) {
      const parsed = sceneDocumentSchema.safeParse(scene);
      expect(parsed.error?.issues ?? []).toEqual([]);
      expect(['cannot-be-scanned', 'not-modelled']).not.toContain(assess(scene.question).verdict);
      expect(drawSection(scene.question, { sliceOffsetMm: scene.sliceOffsetMm }).tissue.length).toBeGreaterThan(0);
      expect(scene.controls.filter((id) => !applies(id, scene.question))).toEqual([]);
    }
  });

  it('shows fold in the keep-clear area first and frees it with the smallest oversampling', () => {
    expect(verdictsOf('axial-fold')).toEqual(['fold-in-keep-clear', 'fold-outside-keep-clear', 'no-fold-expected']);
  });

  it('needs half of what covering the body takes: (e − F/2)/F = 12.5 % against (2e − F)/F = 25 %', () => {
    const [before, enough] = scenesOf('half');
    expect(enough!.question.prescription.acquiredLines / before!.question.prescription.linesAcrossFov).toBe(1.125);
    expect(assess(before!.question).width?.coverBodyLines).toBe(280);
    expect(verdictsOf('half')).toEqual(['fold-in-keep-clear', 'no-fold-expected']);
  });

  it('swaps without fold for 384 lines instead of 240', () => {
    const [, after] = scenesOf('swap');
    expect(after!.question.prescription.linesAcrossFov).toBe(384);
    expect(verdictsOf('swap')).toEqual(['fold-in-keep-clear', 'no-fold-expected']);
  });

  it('pays oversampling with an average: same time, same SNR', () => {
    const [two, one] = scenesOf('averages').map(({ question }) => assess(question));
    expect(one!.time!.scanS).toBe(two!.time!.scanS);
    // Same lines in all, so the same noise: equal but for the last bits of a square root.
    expect(one!.detail!.snr / two!.detail!.snr).toBeCloseTo(1, 9);
  });

  it('ghosts only when unfolded in the image', () => {
    const [image, kspace] = scenesOf('accelerated').map(({ question }) => assess(question).fold?.ghosts);
    expect([image, kspace]).toEqual([true, false]);
  });

  it('folds the arms of a coronal until they are raised', () => {
    expect(verdictsOf('coronal-arms').slice(0, 2)).toEqual(['fold-in-keep-clear', 'no-fold-expected']);
  });

  it('has fewer partitions wrapped with 12 %, none kept clear wrapped with enough, and as many with phase oversampling', () => {
    const [before, some, enough, sharper, phase] = scenesOf('slab-wrap').map(({ question }) => assess(question).slab!);
    expect(some!.contaminated).toBeLessThan(before!.contaminated);
    expect(enough!.contaminatedInKeepClear).toBe(0);
    expect(before!.contaminatedInKeepClear).toBeGreaterThan(0);
    expect(sharper!.contaminated).toBeLessThan(before!.contaminated);
    expect(phase!.contaminated).toBe(before!.contaminated);
  });
});
