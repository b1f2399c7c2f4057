import { AXIS_SIDES } from '@/lib/physics/geometry/vector';
import type { PartitionResult, SlabResult } from '@/lib/physics/model/assessment';
import type { PatientAxis } from '@/lib/physics/model/axes';
import { SIDE_LETTERS } from '@/lib/presentation/anatomy-words';
import { hatch } from './rings';
import type { Bounds, Ring, Scene, SceneNode, TextNode } from './scene';
import type { ScreenPoint } from './section-frame';

export interface SlabSceneInput {
  readonly slab: SlabResult;
  readonly sliceAxis: PatientAxis;
  readonly partitionThicknessMm: number;
  readonly acquiredSlabMm: number;
  readonly bounds: Bounds;
  readonly mmPerPx: number;
  /** A signal of 1 is drawn this share of the acquired slab high. */
  readonly heightShare?: number;
}

/** A signal of 1 is drawn this share of the acquired slab high. */
export const HEIGHT_SHARE = 0.42;

export function slabBounds(acquiredSlabMm: number): Bounds {
  const half = acquiredSlabMm / 2;
  const height = acquiredSlabMm * HEIGHT_SHARE;
  return { left: -half * 1.2, right: half * 1.2, top: -height * 1.45, bottom: height * 0.35 };
}

/**
 * The slice direction: each partition with its own signal, and on it what wraps from the other end of the slab.
 * Low end of the slice axis on the left.
 */
export function slabScene(input: SlabSceneInput): Scene {
  const { slab, bounds, acquiredSlabMm, partitionThicknessMm, mmPerPx, heightShare = HEIGHT_SHARE } = input;
  const height = acquiredSlabMm * heightShare;
  const bar = (partition: PartitionResult, from: number, to: number): Ring => {
    const half = partitionThicknessMm * 0.43;
    const { offsetMm: at } = partition;
    return [[at - half, -from * height], [at + half, -from * height], [at + half, -to * height], [at - half, -to * height]];
  };
  const nodes: SceneNode[] = [];
  for (const partition of slab.partitions) {
    nodes.push({
      kind: 'area',
      name: `partition/${partition.index}`,
      rings: [bar(partition, 0, partition.signal)],
      fill: 'tissue-lean',
      stroke: { colour: 'ink-soft', widthPx: 1, edge: partition.dim ? 'dotted' : 'solid' },
    });
    if (partition.alias > 0.001) nodes.push(...aliasNodes(partition, bar(partition, partition.signal, partition.signal + partition.alias), mmPerPx));
  }
  nodes.push(...keepClearNodes(slab, partitionThicknessMm, height));
  nodes.push(
    {
      kind: 'lines',
      name: 'profile',
      lines: [slab.partitions.map(({ offsetMm, signal }) => [offsetMm, -signal * height] as const)],
      stroke: { colour: 'ink', widthPx: 1.75, edge: 'solid' },
    },
    {
      kind: 'lines',
      name: 'baseline',
      lines: [[[bounds.left, 0], [bounds.right, 0]]],
      stroke: { colour: 'ink', widthPx: 1.25, edge: 'solid' },
    },
  );
  for (const sign of [-1, 1] as const) nodes.push(...acquiredEdge(sign, acquiredSlabMm / 2, height, mmPerPx));
  nodes.push(...endLetters(input, height), ...levelNodes(bounds, height));
  return { bounds, nodes };
}

function aliasNodes(partition: PartitionResult, ring: Ring, mmPerPx: number): SceneNode[] {
  const contaminated = partition.state === 'contaminated';
  const colour = contaminated ? (partition.inKeepClear ? 'thread' : 'ochre') : 'ink-soft';
  const nodes: SceneNode[] = [
    {
      kind: 'area',
      name: `partition/${partition.index}/alias`,
      rings: [ring],
      ...(contaminated ? { fill: partition.inKeepClear ? ('thread-wash' as const) : ('ochre-wash' as const) } : {}),
      stroke: { colour, widthPx: 1, edge: contaminated ? 'solid' : 'dotted' },
    },
  ];
  if (contaminated) {
    nodes.push({
      kind: 'lines',
      name: `partition/${partition.index}/alias/hatch`,
      lines: hatch([ring], partition.inKeepClear ? 45 : -45, 6 * mmPerPx),
      stroke: { colour, widthPx: 1.25, edge: 'solid' },
    });
  }
  return nodes;
}

function keepClearNodes(slab: SlabResult, thicknessMm: number, height: number): SceneNode[] {
  const kept = slab.partitions.filter(({ inKeepClear }) => inKeepClear);
  const [first, last] = [kept[0], kept.at(-1)];
  if (!first || !last) return [];
  const [low, high] = [first.offsetMm - thicknessMm / 2, last.offsetMm + thicknessMm / 2];
  const top = -1.25 * height;
  return [
    {
      kind: 'area',
      name: 'keep-clear',
      rings: [[[low, 0], [high, 0], [high, top], [low, top]]],
      stroke: { colour: 'indigo', widthPx: 1.75, edge: 'dashed' },
    },
    label('keep-clear/label', 'keep-clear area', [low, top], [8, 18], 'start', 'indigo'),
  ];
}

function acquiredEdge(sign: -1 | 1, half: number, height: number, mmPerPx: number): SceneNode[] {
  const gap = 5 * mmPerPx * sign;
  const [top, bottom] = [-1.3 * height, 0.12 * height];
  const ticks: (readonly ScreenPoint[])[] = [];
  for (let v = top; v + Math.abs(gap) < bottom; v += 9 * mmPerPx) ticks.push([[sign * half, v], [sign * half + gap, v + Math.abs(gap) * 0.8]]);
  const line = (u: number): readonly ScreenPoint[] => [[u, top], [u, bottom]];
  return [
    { kind: 'lines', name: `acquired-edge/${sign < 0 ? 'low' : 'high'}`, lines: [line(sign * half)], stroke: { colour: 'ink', widthPx: 2, edge: 'solid' } },
    { kind: 'lines', name: `acquired-edge/${sign < 0 ? 'low' : 'high'}/woven`, lines: [line(sign * half + gap), ...ticks], stroke: { colour: 'ink', widthPx: 1, edge: 'solid' } },
  ];
}

function endLetters({ sliceAxis, acquiredSlabMm, slab }: SlabSceneInput, height: number): SceneNode[] {
  const [low, high] = AXIS_SIDES[sliceAxis];
  const half = acquiredSlabMm / 2;
  const letter = (name: string, text: string, u: number): TextNode => ({
    kind: 'text', name, text, at: [u, -0.5 * height], offsetPx: [0, 6], anchor: 'middle', size: 'letter', colour: 'ink',
  });
  const first = slab.partitions[0];
  const last = slab.partitions.at(-1);
  return [
    letter('letter/low', SIDE_LETTERS[low], -half * 1.12),
    letter('letter/high', SIDE_LETTERS[high], half * 1.12),
    label('acquired-edge/label', `acquired ${Math.round(acquiredSlabMm)} mm`, [-half, -1.3 * height], [6, -8], 'start', 'ink-soft'),
    ...(first && last
      ? [
          label('partition/first', String(first.index + 1), [first.offsetMm, 0], [0, 18], 'middle', 'ink-soft'),
          label('partition/last', String(last.index + 1), [last.offsetMm, 0], [0, 18], 'middle', 'ink-soft'),
          label('partition/axis', 'partition', [0, 0], [0, 18], 'middle', 'ink-soft'),
        ]
      : []),
  ];
}

/** Dim below 0.9 of the plateau, bright above 1.1: not wrap, but worth knowing. */
function levelNodes(bounds: Bounds, height: number): SceneNode[] {
  return ([['dim', 0.9], ['bright', 1.1]] as const).flatMap(([name, level]): SceneNode[] => [
    {
      kind: 'lines',
      name: `level/${name}`,
      lines: [[[bounds.left, -level * height], [bounds.right, -level * height]]],
      stroke: { colour: 'ink-soft', widthPx: 0.75, edge: 'dotted' },
    },
    label(`level/${name}/label`, name, [bounds.right, -level * height], [-6, name === 'dim' ? 15 : -5], 'end', 'ink-soft'),
  ]);
}

function label(
  name: string,
  text: string,
  at: ScreenPoint,
  offsetPx: ScreenPoint,
  anchor: TextNode['anchor'],
  colour: TextNode['colour'],
): TextNode {
  return { kind: 'text', name, text, at, offsetPx, anchor, size: 'note', colour };
}
