import type { Case } from '@/lib/domain/case/model';
import { assess } from '@/lib/physics';
import { CONTROLS } from './controls';
import { boxOf, inventedCase } from './invented-case';
import type { ControlId, SceneDocument } from './scene';

const CONTROL_SET: readonly ControlId[] = ['slice-oversampling', 'pulse-sharpness', 'slab-thickness', 'partitions', 'flip', 'selective'];

function slabCase(): Case {
  return inventedCase(
    { region: 'abdomen', extents: { right: 190, left: 190, anterior: 125, posterior: 125, superior: 250, inferior: 250 } },
    {
      name: 'T1 3D gradient echo', family: 'gradient-echo-3d', fovPhaseMm: 280, fovReadoutMm: 400, linesAcrossFov: 192, readoutMatrix: 288,
      trMs: 4, teMs: 2, flipDeg: 12, bandwidthHzPerPixel: 500,
      slices: {
        mode: 'slab', partitions: 48, partitionThicknessMm: 4, acquiredPartitions: 48, selective: true, timeBandwidthProduct: 6,
        droppedPartitionsPerEnd: 0,
      },
    },
    boxOf({ xMm: [-170, 60], yMm: [-110, 90], zMm: [-84, 84] }),
  );
}

function moved(question: Case, id: 'slice-oversampling' | 'pulse-sharpness' | 'phase-oversampling' | 'depth', value: number): Case {
  const control = CONTROLS[id];
  return control.kind === 'number' ? control.write(question, value) : question;
}

const wrapped = (question: Case): number => assess(question).slab?.contaminated ?? 0;

/** The slab in five steps; every count in a note is the engine's for the scene it stands beside. */
export function slabScenes(): readonly SceneDocument[] {
  const before = slabCase();
  // 54 partitions instead of 48: what is named is what whole partitions come to.
  const some = moved(before, 'slice-oversampling', 12.5);
  const slab = assess(before).slab;
  const partitions = before.prescription.slices.mode === 'slab' ? before.prescription.slices.partitions : 1;
  const enoughPartitions = slab?.smallestCleanPartitions;
  const enough = enoughPartitions === undefined ? some : moved(before, 'slice-oversampling', (enoughPartitions / partitions - 1) * 100);
  const sharper = moved(before, 'pulse-sharpness', 14);
  // Deeper than the FOV, so that there is something for phase oversampling to do.
  const along = moved(moved(before, 'depth', 310), 'phase-oversampling', 100);
  const scene = (given: Pick<SceneDocument, 'title' | 'note' | 'question'> & Partial<SceneDocument>): SceneDocument => ({
    schemaVersion: 1, view: 'slab', highlight: 'what-wraps', sliceOffsetMm: 0, controls: CONTROL_SET, ...given,
  });
  return [
    scene({
      title: 'The dome of the liver at the feet end',
      note: `The pulse does not end where the slab ends. What it excites beyond one end is sampled as if it lay at the other: ${wrapped(before)} partitions hold it.`,
      question: before, sliceOffsetMm: -94,
    }),
    scene({ title: '12.5 % slice oversampling', note: `${wrapped(some)} partitions are left with it, at both ends.`, question: some }),
    scene({
      title: 'Enough slice oversampling',
      note: `${enoughPartitions ?? 'No number of'} acquired partitions leave the keep-clear area free; time grows with them.`,
      question: enough,
    }),
    scene({ title: 'A sharper pulse instead', note: `No oversampling, narrower skirts: ${wrapped(sharper)} partitions. A sharper pulse takes longer or more power.`, question: sharper }),
    scene({
      title: 'Phase oversampling does nothing for a slab',
      note: `A deeper body: 100 % along phase, and still ${wrapped(along)} partitions. Each direction has its own oversampling.`,
      question: along,
      controls: ['phase-oversampling', 'slice-oversampling'],
    }),
  ];
}
