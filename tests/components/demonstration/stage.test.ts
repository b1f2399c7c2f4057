import { describe, expect, it } from 'vitest';
import { betweenScenes } from '@/components/demonstration/stage/between-scenes';
import { figuresOf, mixFigures } from '@/components/demonstration/stage/figures';
import { greyImageHref } from '@/components/demonstration/stage/grey-image';
import { answerOf, drawScene, type ShownScene } from '@/components/demonstration/stage/shown-scene';
import { SET_PIECES } from '@/lib/domain/demonstration/set-pieces';
import { assess } from '@/lib/physics';

const SIZE = { widthPx: 760, heightPx: 480 };
const shown = SET_PIECES.flatMap(({ key, scenes }) => scenes().map((scene, i): ShownScene => ({ ...scene, id: `${key}/${i}` })));
const drawn = (scene: ShownScene) => drawScene(scene, answerOf(scene.question), SIZE)!;

describe('a scene on the stage', () => {
  it.each(shown.filter(({ view }) => view !== 'picture').map((scene) => [scene.id, scene] as const))('%s is drawn, in names that occur once and in words', (_id, scene) => {
    const { picture, words } = drawn(scene);
    const names = picture.nodes.map(({ name }) => name);
    expect(new Set(names).size).toBe(names.length);
    expect(words.length).toBeGreaterThan(0);
  });

  it('paints what is highlighted heavier and hides nothing', () => {
    const scene = shown.find(({ id }) => id === 'axial-fold/0')!;
    const plain = drawn({ ...scene, highlight: 'nothing' }).picture.nodes;
    const heavy = drawn({ ...scene, highlight: 'keep-clear' }).picture.nodes;
    expect(heavy.map(({ name }) => name)).toEqual(plain.map(({ name }) => name));
    const width = (nodes: typeof plain) => nodes.flatMap((node) => (node.kind === 'area' && node.name === 'keep-clear' ? [node.stroke!.widthPx] : []));
    expect(width(heavy)).toEqual(width(plain).map((each) => 2 * each));
  });

  it('says why a case is refused', () => {
    const scene = shown[0]!;
    const broken = { ...scene.question, prescription: { ...scene.question.prescription, fovPhaseMm: -1 } };
    expect(answerOf(broken).refusal).toContain('fovPhaseMm');
  });
});

describe('between two scenes', () => {
  const [from, to] = [drawn(shown.find(({ id }) => id === 'slab-wrap/0')!), drawn(shown.find(({ id }) => id === 'slab-wrap/1')!)];

  it('arrives at the next picture itself and keeps all its nodes on the way', () => {
    expect(betweenScenes(from.picture, to.picture, 1)).toBe(to.picture);
    const middle = betweenScenes(from.picture, to.picture, 0.5);
    expect(middle.nodes.map(({ name }) => name)).toEqual(to.picture.nodes.map(({ name }) => name));
  });

  it('moves what has the same name half of the way', () => {
    const edge = ({ nodes }: typeof from.picture) => nodes.find(({ name }) => name === 'acquired-edge/high')!;
    const u = (node: ReturnType<typeof edge>) => (node.kind === 'lines' ? node.lines[0]![0]![0] : NaN);
    const middle = betweenScenes(from.picture, to.picture, 0.5);
    expect(u(edge(middle))).toBeCloseTo((u(edge(from.picture)) + u(edge(to.picture))) / 2, 9);
  });

  it('moves landed pieces whose outline has another number of points, and slides in those that are new', () => {
    const [before, less, none] = ['axial-fold/0', 'axial-fold/1', 'axial-fold/2'].map((id) => drawn(shown.find((scene) => scene.id === id)!).picture);
    const landed = (picture: typeof from.picture) => picture.nodes.filter(({ name }) => name.endsWith('/landed'));
    const extent = (node: (typeof from.picture.nodes)[number]) => {
      const points = node.kind === 'area' ? node.rings.flat() : [];
      const [us, vs] = [points.map(([u]) => u), points.map(([, v]) => v)];
      return [Math.min(...us), Math.max(...us), Math.min(...vs), Math.max(...vs)];
    };
    const pairs = landed(less!).map((node) => [landed(before!).find(({ name }) => name === node.name)!, node, landed(betweenScenes(before!, less!, 0.5)).find(({ name }) => name === node.name)!] as const);
    expect(pairs).toHaveLength(2);
    for (const [a, b, middle] of pairs) {
      expect(extent(a)).not.toEqual(extent(b));
      extent(middle).forEach((value, i) => expect(value).toBeCloseTo((extent(a)[i]! + extent(b)[i]!) / 2, 6));
    }
    // Back from a picture without any: each comes from where its tissue lies, one acquired width away.
    expect(landed(none!)).toEqual([]);
    const arriving = landed(betweenScenes(none!, before!, 0));
    expect(arriving).toHaveLength(2);
    for (const node of arriving) {
      const there = landed(before!).find(({ name }) => name === node.name)!;
      expect(Math.abs(extent(node)[2]! - extent(there)[2]!)).toBeCloseTo(300, 6);
    }
  });

  it('moves the numbers too', () => {
    const [a, b] = ['slab-wrap/0', 'slab-wrap/1'].map((id) => figuresOf(assess(shown.find((scene) => scene.id === id)!.question)));
    const middle = mixFigures(a!, b!, 0.5);
    expect(middle.contaminated).toBe((a!.contaminated! + b!.contaminated!) / 2);
    expect(mixFigures(a!, b!, 1)).toEqual(b);
  });
});

it('a grey picture is a bitmap of that size, bottom row first', () => {
  const bytes = Buffer.from(greyImageHref([1, 2, 3, 4, 5, 6], 3, 2).split(',')[1]!, 'base64');
  expect(bytes.subarray(0, 2).toString()).toBe('BM');
  expect([bytes.readInt32LE(18), bytes.readInt32LE(22), bytes.readUInt16LE(28)]).toEqual([3, 2, 8]);
  // Rows are padded to four bytes.
  expect([...bytes.subarray(54 + 1024)]).toEqual([4, 5, 6, 0, 1, 2, 3, 0]);
});
