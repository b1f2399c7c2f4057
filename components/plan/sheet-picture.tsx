import { SceneSvg } from '@/components/schematic/svg/scene-svg';
import type { PlanView } from '@/lib/schemas/plan';
import { SHEET_PICTURE_PX, sheetScene } from './sheet-scene';

/** The section, black on white, told apart by hatching and edges. */
export function SheetPicture({ plan }: { plan: PlanView }) {
  const drawn = sheetScene(plan);
  if (!drawn) return <div />;
  const { width, height } = SHEET_PICTURE_PX;
  return (
    <figure>
      <SceneSvg scene={drawn.scene} label={drawn.words} widthPx={width} heightPx={height} ground="paper" className="w-full bg-paper" />
      <figcaption className="sheet-small text-sm">{drawn.caption}</figcaption>
    </figure>
  );
}
