import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import { fitScene, fromPixels } from '@/components/schematic/scene/scene';
import { sectionBounds, sectionScene, type DrawnSection } from '@/components/schematic/scene/section-scene';
import { geometryCase } from '@/lib/physics/assess/assess';
import type { Case } from '@/lib/physics/model/case';
import { drawSection } from '@/lib/physics/section/draw-section';
import { describeSection } from '@/lib/presentation/describe-section';
import type { PlanView } from '@/lib/schemas/plan';

const WIDTH_PX = 560;
const HEIGHT_PX = 350;

/** The section of the sequence that was changed, or the first: black on white, told apart by hatching and edges. */
export function SheetPicture({ plan }: { plan: PlanView }) {
  const index = Math.max(0, plan.sequences.findIndex(({ adopted }) => adopted.length > 0));
  const sequence = plan.sequences[index];
  const result = plan.results[index];
  if (!sequence || !result || result.verdict === 'not-modelled') return <div />;
  const question: Case = {
    patient: plan.patient,
    prescription: sequence.prescription,
    keepClear: sequence.frozenKeepClear ?? plan.keepClear,
    scanner: plan.scanner,
    policy: plan.policy,
  };
  const drawn: DrawnSection = { question, drawing: drawSection(geometryCase(question)), asGiven: drawSection(question).tissue };
  const fit = fitScene(sectionBounds(drawn), WIDTH_PX, HEIGHT_PX);
  const [left, top] = fromPixels(fit, [0, 0]);
  const [right, bottom] = fromPixels(fit, [WIDTH_PX, HEIGHT_PX]);
  const scene = sectionScene({ ...drawn, bounds: { left, top, right, bottom }, mmPerPx: 1 / fit.scale });
  const words = describeSection(drawn.drawing, result.phaseAxis, result.readoutAxis);
  return (
    <figure>
      <SceneSvg scene={scene} label={words.join(' ')} widthPx={WIDTH_PX} heightPx={HEIGHT_PX} ground="paper" className="w-full bg-paper" />
      <figcaption className="sheet-small text-sm">
        {sequence.prescription.name}, middle slice. Hatched: tissue that lands here from the other side. Dotted edge: estimated.
      </figcaption>
    </figure>
  );
}
