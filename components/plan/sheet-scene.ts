import { fitScene, fromPixels, type Scene } from '@/components/schematic/scene/scene';
import { sectionBounds, sectionScene, type DrawnSection } from '@/components/schematic/scene/section-scene';
import { geometryCase } from '@/lib/physics/assess/assess';
import type { Case } from '@/lib/physics/model/case';
import type { SectionDrawing } from '@/lib/physics/section/section-drawing';
import { drawSection } from '@/lib/physics/section/draw-section';
import { describeSection } from '@/lib/presentation/describe-section';
import type { PlanView } from '@/lib/schemas/plan';

export const SHEET_PICTURE_PX = { width: 560, height: 350 } as const;

export interface SheetScene {
  readonly scene: Scene;
  /** The picture in words, for who cannot see it. */
  readonly words: string;
  readonly caption: string;
}

/** The section of the sequence that was changed, or the first; absent where nothing can be drawn. Screen, print and PDF paint it. */
export function sheetScene(plan: PlanView): SheetScene | undefined {
  const index = Math.max(0, plan.sequences.findIndex(({ adopted }) => adopted.length > 0));
  const sequence = plan.sequences[index];
  const result = plan.results[index];
  if (!sequence || !result || result.verdict === 'not-modelled') return undefined;
  const question: Case = {
    patient: plan.patient,
    prescription: sequence.prescription,
    keepClear: sequence.frozenKeepClear ?? plan.keepClear,
    scanner: plan.scanner,
    policy: plan.policy,
  };
  const drawn: DrawnSection = { question, drawing: drawSection(geometryCase(question)), asGiven: drawSection(question).tissue };
  const { width, height } = SHEET_PICTURE_PX;
  const fit = fitScene(sectionBounds(drawn), width, height);
  const [left, top] = fromPixels(fit, [0, 0]);
  const [right, bottom] = fromPixels(fit, [width, height]);
  return {
    scene: sectionScene({ ...drawn, bounds: { left, top, right, bottom }, mmPerPx: 1 / fit.scale }),
    words: describeSection(drawn.drawing, result.phaseAxis, result.readoutAxis).join(' '),
    caption: `${sequence.prescription.name}, middle slice.${keyTo(drawn.drawing)}`,
  };
}

/** Explains only what is drawn. */
function keyTo({ pieces, ghosts, tissue }: SectionDrawing): string {
  const lands = pieces.some(({ landed }) => landed.length > 0);
  const shown = [
    lands ? ' Hatched: tissue that lands here from the other side.' : '',
    ghosts.length > 0 ? ` ${lands ? 'Hatched upright' : 'Hatched'}: ghosts of tissue that unfolding shows again.` : '',
    tissue.some(({ estimated }) => estimated) ? ' Dotted edge: estimated.' : '',
  ];
  return shown.join('');
}
