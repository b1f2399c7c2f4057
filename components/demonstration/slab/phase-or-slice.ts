import { CONTROLS } from '@/lib/domain/demonstration/controls';
import { drawSection } from '@/lib/physics';
import { geometryCase } from '@/lib/physics/assess/assess';
import type { Case } from '@/lib/physics/model/case';
import { answerOf } from '../stage/shown-scene';

export interface DirectionLine {
  readonly key: 'as-set' | 'phase' | 'slice';
  readonly label: string;
  readonly question: Case;
  readonly contaminated: number;
  readonly foldAlongPhase: boolean;
}

/** The same oversampling given to one direction and to the other, beside what is set: people take one for the other. */
export const COMPARED_PCT = 30;

export function phaseOrSlice(question: Case): readonly DirectionLine[] {
  const moved = (id: 'phase-oversampling' | 'slice-oversampling', pct: number, on: Case): Case => {
    const control = CONTROLS[id];
    return control.kind === 'number' ? control.write(on, pct) : on;
  };
  const bare = moved('phase-oversampling', 0, moved('slice-oversampling', 0, question));
  const cases = [
    ['as-set', 'none in either direction', bare],
    ['phase', `${COMPARED_PCT} % along phase`, moved('phase-oversampling', COMPARED_PCT, bare)],
    ['slice', `${COMPARED_PCT} % along slice`, moved('slice-oversampling', COMPARED_PCT, bare)],
  ] as const;
  return cases.flatMap(([key, label, each]): DirectionLine[] => {
    const { assessment } = answerOf(each);
    if (!assessment?.slab) return [];
    // The area of fold counts both directions; the pieces of the middle section are those of the phase direction alone.
    const { pieces, ghosts } = drawSection(geometryCase(each));
    const foldAlongPhase = [...pieces, ...ghosts].length > 0;
    return [{ key, label, question: each, contaminated: assessment.slab.contaminated, foldAlongPhase }];
  });
}
