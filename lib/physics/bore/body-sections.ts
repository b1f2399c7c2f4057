import type { ArmPosition, PatientPosition, Reading } from '../model/patient';
import type { BorePart, BoreSection } from './bore-types';

export interface ArmSize {
  readonly breadthMm: number;
  readonly depthMm: number;
  readonly gapMm: number;
}

/** Sizes of the sections a bore can catch; lengths mm. What is absent is not checked, and the answer says so. */
export interface BoreSizes {
  readonly trunkBreadthMm: Reading;
  readonly trunkDepthMm: Reading;
  readonly hipBreadthMm?: Reading;
  readonly hipDepthMm?: Reading;
  readonly shoulderBreadthMm?: Reading;
  readonly shoulderDepthMm?: Reading;
  /** Over both elbows with the arms up. */
  readonly elbowBreadthMm?: Reading;
  readonly arms: ArmSize;
  /** Along the body from the target, mm, positive towards the head; absent: at the target, so that it always counts. */
  readonly hipsZMm?: number;
  readonly trunkZMm?: number;
  readonly shouldersZMm?: number;
  readonly elbowsZMm?: number;
}

export interface BodySections {
  readonly sections: readonly BoreSection[];
  /** Sections that would count but whose size is not known, as shown. */
  readonly unknown: readonly string[];
}

const part = (name: string, breadthMm: Reading, depthMm: Reading, underCoil: boolean): BorePart => ({
  name,
  breadthMm,
  depthMm,
  centreMm: 0,
  raisedMm: 0,
  underCoil,
});

/** Both arms beside a trunk, lying on the table; a broader trunk pushes them out by half its spread. */
function armsBeside(trunkBreadthMm: Reading, { breadthMm, depthMm, gapMm }: ArmSize): readonly BorePart[] {
  return (['right', 'left'] as const).map((side): BorePart => {
    const centre = trunkBreadthMm.value / 2 + gapMm + breadthMm / 2;
    return {
      name: `${side} arm`,
      // Only its outer side matters: the trunk's half spread is twice that on the arm's own breadth.
      breadthMm: { value: breadthMm, spread: trunkBreadthMm.spread, source: trunkBreadthMm.source },
      depthMm: { value: depthMm, spread: 0, source: 'policy-default' },
      centreMm: side === 'left' ? centre : -centre,
      raisedMm: 0,
      underCoil: false,
    };
  });
}

/**
 * Sections to check, from sizes: hips, trunk and, with the arms down, the arms; head-first also the shoulders and, with
 * the arms up, the elbows. Feet-first the shoulders may stay outside, so they are not asked for.
 * @returns sections in the bore's own order, and what is not known
 */
export function bodySections(
  sizes: BoreSizes,
  position: PatientPosition,
  arms: ArmPosition,
  coilOn: 'trunk' | 'hips' | 'none',
): BodySections {
  const unknown: string[] = [];
  const sections: BoreSection[] = [
    {
      name: 'trunk',
      zFromTargetMm: sizes.trunkZMm ?? 0,
      parts: [part('trunk', sizes.trunkBreadthMm, sizes.trunkDepthMm, coilOn === 'trunk')],
    },
  ];
  if (arms !== 'up') {
    sections.push({
      name: 'arms',
      zFromTargetMm: sizes.trunkZMm ?? 0,
      parts: armsBeside(sizes.trunkBreadthMm, sizes.arms),
    });
  }
  if (sizes.hipBreadthMm) {
    const depth = sizes.hipDepthMm ?? sizes.trunkDepthMm;
    sections.push({
      name: 'hips',
      zFromTargetMm: sizes.hipsZMm ?? 0,
      parts: [part('hips', sizes.hipBreadthMm, depth, coilOn === 'hips')],
    });
  } else unknown.push('hip breadth');
  if (position.startsWith('head-first')) {
    if (sizes.shoulderBreadthMm) {
      const depth = sizes.shoulderDepthMm ?? sizes.trunkDepthMm;
      sections.push({
        name: 'shoulders',
        zFromTargetMm: sizes.shouldersZMm ?? 0,
        parts: [part('shoulders', sizes.shoulderBreadthMm, depth, false)],
      });
    } else unknown.push('shoulder breadth');
    if (arms === 'up') {
      if (sizes.elbowBreadthMm) {
        const depth: Reading = { value: sizes.arms.depthMm, spread: 0, source: 'policy-default' };
        sections.push({
          name: 'elbows',
          zFromTargetMm: sizes.elbowsZMm ?? 0,
          parts: [part('elbows', sizes.elbowBreadthMm, depth, false)],
        });
      } else unknown.push('breadth over the elbows');
    }
  }
  return { sections, unknown };
}
