import type { Scene, SceneNode } from '@/components/schematic/scene/scene';
import type { ScreenPoint } from '@/components/schematic/scene/section-frame';
import { geometryCase } from '@/lib/physics/assess/assess';
import { freeze } from '@/lib/physics/assess/geometry-class';
import { slabSurroundings } from '@/lib/physics/assess/slab-surroundings';
import type { Case } from '@/lib/physics/model/case';
import { mostPartitions, slabQuestionOf } from '@/lib/physics/slab/assess-slab';
import { slabPartitions } from '@/lib/physics/slab/contaminated-partitions';

export interface CurvePoint {
  readonly acquiredPartitions: number;
  readonly oversamplingPct: number;
  readonly contaminated: number;
}

/** Contaminated partitions at every number of partitions the scanner can acquire, each asked of the engine. */
export function oversamplingCurve(question: Case): readonly CurvePoint[] {
  const given = geometryCase(freeze(question));
  const { prescription, scanner, policy } = given;
  const { slices } = prescription;
  if (slices.mode !== 'slab') return [];
  const asked = slabQuestionOf(prescription, slices, scanner, policy, slabSurroundings(given));
  const points: CurvePoint[] = [];
  for (let n = slices.partitions; n <= mostPartitions(slices, scanner); n += scanner.partitionStep) {
    const partitions = slabPartitions({ ...asked, acquiredPartitions: n });
    points.push({
      acquiredPartitions: n,
      oversamplingPct: (n / slices.partitions - 1) * 100,
      contaminated: partitions.filter(({ state }) => state === 'contaminated').length,
    });
  }
  return points;
}

const WIDTH = 300;
const HEIGHT = 120;

/** Steps, because partitions are whole; a ring marks where the scene stands. */
export function curveScene(points: readonly CurvePoint[], acquiredPartitions: number): Scene {
  const most = Math.max(1, ...points.map(({ contaminated }) => contaminated));
  const furthest = Math.max(1, ...points.map(({ oversamplingPct }) => oversamplingPct));
  const place = ({ oversamplingPct, contaminated }: CurvePoint): ScreenPoint => [
    (oversamplingPct / furthest) * WIDTH,
    -(contaminated / most) * HEIGHT,
  ];
  const steps = points.flatMap((point, i): ScreenPoint[] => {
    const [x, y] = place(point);
    const next = points[i + 1];
    return next ? [[x, y], [place(next)[0], y]] : [[x, y]];
  });
  const countWords = ({ contaminated, oversamplingPct }: CurvePoint) => `${contaminated} ${contaminated === 1 ? 'partition' : 'partitions'} at ${Math.round(oversamplingPct * 10) / 10} %`;
  const here = points.find((point) => point.acquiredPartitions === acquiredPartitions);
  // The curve falls to the right, so words beside a point are free of it there; near the end they stand to its left.
  const beside = here && place(here)[0] > WIDTH / 2 ? -1 : 1;
  const label = (name: string, text: string, at: ScreenPoint, offsetPx: ScreenPoint, anchor: 'start' | 'middle' | 'end', colour: 'ink' | 'ink-soft' = 'ink-soft'): SceneNode => ({
    kind: 'text', name, text, at, offsetPx, anchor, size: 'note', colour,
  });
  return {
    bounds: { left: -34, right: WIDTH + 24, top: -HEIGHT - 18, bottom: 38 },
    nodes: [
      { kind: 'lines', name: 'axes', lines: [[[0, -HEIGHT], [0, 0], [WIDTH, 0]]], stroke: { colour: 'ink-soft', widthPx: 1, edge: 'solid' } },
      { kind: 'lines', name: 'curve', lines: [steps], stroke: { colour: 'ink', widthPx: 2, edge: 'solid' } },
      label('most', String(most), [0, -HEIGHT], [-6, 5], 'end'),
      label('none', '0', [0, 0], [-6, 5], 'end'),
      label('oversampling/0', '0 %', [0, 0], [0, 18], 'middle'),
      label('oversampling/most', `${Math.round(furthest)} %`, [WIDTH, 0], [0, 18], 'middle'),
      label('oversampling', 'slice oversampling', [WIDTH / 2, 0], [0, 18], 'middle'),
      ...(here
        ? [
            { kind: 'lines', name: 'here/drop', lines: [[place(here), [place(here)[0], 0]]], stroke: { colour: 'indigo', widthPx: 1.25, edge: 'dotted' } } as const,
            label('here/count', countWords(here), place(here), [8 * beside, -8], beside === 1 ? 'start' : 'end', 'ink'),
            { kind: 'marker', name: 'here', at: place(here), shape: 'dot', colour: 'indigo' } as const,
          ]
        : []),
    ],
  };
}
