import { createElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { betweenScenes } from '@/components/demonstration/stage/between-scenes';
import { figuresOf, mixFigures } from '@/components/demonstration/stage/figures';
import { PictureEngine } from '@/components/demonstration/stage/picture-engine';
import { SceneStage } from '@/components/demonstration/stage/scene-stage';
import { answerOf, drawScene, type ShownScene } from '@/components/demonstration/stage/shown-scene';
import type * as Physics from '@/lib/physics';
import { CONTROLS } from '@/lib/domain/demonstration/controls';
import { findSetPiece } from '@/lib/domain/demonstration/set-pieces';

const asked = vi.hoisted(() => ({ assess: 0, drawSection: 0, simulateImage: 0 }));
vi.mock('@/lib/physics', async (original) => {
  const physics = await original<typeof Physics>();
  const counting = <K extends keyof typeof asked>(name: K) => ({
    [name]: (...args: never[]) => {
      asked[name] += 1;
      return (physics[name] as (...all: never[]) => unknown)(...args);
    },
  });
  return { ...physics, ...counting('assess'), ...counting('drawSection'), ...counting('simulateImage') };
});

const shown = (key: string, index = 0): ShownScene => ({ ...findSetPiece(key)!.scenes()[index]!, id: `${key}/${index}` });
const moved = (scene: ShownScene, id: 'slice-oversampling' | 'phase-oversampling', value: number): ShownScene => {
  const control = CONTROLS[id];
  return control.kind === 'number' ? { ...scene, question: control.write(scene.question, value) } : scene;
};
const render = (scene: ShownScene, large: boolean) =>
  renderToStaticMarkup(createElement(PictureEngine, null, createElement(SceneStage, { scene, large, onSlice: () => undefined })));

beforeEach(() => {
  asked.assess = 0;
  asked.drawSection = 0;
  asked.simulateImage = 0;
});

describe('how often the engine is asked on the main thread', () => {
  it.each([
    ['a section, in a room or not', moved(shown('axial-fold'), 'phase-oversampling', 7), true, { assess: 1, drawSection: 2 }],
    ['a slab in a room', moved(shown('slab-wrap'), 'slice-oversampling', 7), true, { assess: 1, drawSection: 0 }],
    // Phase against slice: none, phase and slice, each answered and cut once, and the one that is drawn as a section.
    ['a slab with its comparison', moved(shown('slab-wrap'), 'slice-oversampling', 9), false, { assess: 4, drawSection: 5 }],
  ] as const)('one move of a control, %s', (_words, scene, large, counts) => {
    asked.assess = 0;
    asked.drawSection = 0;
    render(scene, large);
    // The simulated picture is a Worker's work.
    expect(asked).toEqual({ ...counts, simulateImage: 0 });
  });

  it('never while a transition is on its way: pictures and figures are mixed from what is known', () => {
    const size = { widthPx: 720, heightPx: 430 };
    const [from, to] = [shown('slab-wrap', 0), shown('slab-wrap', 1)];
    const [a, b] = [from, to].map((scene) => drawScene(scene, answerOf(scene.question), size)!.picture);
    const [x, y] = [from, to].map((scene) => figuresOf(answerOf(scene.question).assessment!));
    const before = { ...asked };
    for (let frame = 0; frame <= 30; frame += 1) {
      betweenScenes(a!, b!, frame / 30);
      mixFigures(x!, y!, frame / 30);
    }
    expect(asked).toEqual(before);
  });

  it('a scene come back to is not worked out again', () => {
    const scene = shown('axial-fold', 1);
    render(scene, true);
    asked.assess = 0;
    render(scene, true);
    expect(asked.assess).toBe(0);
  });
});
