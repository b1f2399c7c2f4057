import { Image, View } from '@react-pdf/renderer';
import { pictureBounds, pictureBox } from '@/components/bench/picture/picture-layout';
import { fitWhite } from '@/components/bench/picture/fit-white';
import { TEXT_FONT } from '@/components/plan/pdf/sheet-fonts';
import { ScenePdf } from '@/components/schematic/pdf/scene-pdf';
import { pictureScene } from '@/components/schematic/scene/picture-scene';
import { fitScene, toPixels } from '@/components/schematic/scene/scene';
import { simulateImage, toGreyLevels } from '@/lib/physics';
import { drawScene, type Answer, type ShownScene } from '../stage/shown-scene';
import { greyPng } from './grey-png';

/** Units across the picture, as on the stage: letters and lines keep their weight against it. */
export const PICTURE_PX = { widthPx: 760, heightPx: 480 };
const PIXELS = 320;

/** The simulated picture with what lies over it. */
export function SimulatedPdf({ question, sliceOffsetMm, width, size = PICTURE_PX }: {
  question: ShownScene['question'];
  sliceOffsetMm: number;
  /** On the page, points. */
  width: number;
  size?: { readonly widthPx: number; readonly heightPx: number };
}) {
  const { widthPx, heightPx } = size;
  const { prescription, keepClear } = question;
  const simulated = simulateImage(question, { sliceOffsetMm, sizePx: PIXELS });
  const bounds = pictureBounds(prescription, undefined);
  const now = pictureBox(prescription);
  const fit = fitScene(bounds, widthPx, heightPx);
  const scale = width / widthPx;
  const [left, top] = toPixels(fit, [now.left, now.top]);
  const [right, bottom] = toPixels(fit, [now.right, now.bottom]);
  const place = { position: 'absolute', left: left * scale, top: top * scale, width: (right - left) * scale, height: (bottom - top) * scale } as const;
  return (
    <View style={{ position: 'relative', width, height: heightPx * scale }}>
      {/* A PDF's picture has no alternative text here; its words stand beside it. */}
      {/* eslint-disable-next-line jsx-a11y/alt-text */}
      <Image src={{ data: greyPng(toGreyLevels(fitWhite(simulated.values)), simulated.widthPx, simulated.heightPx), format: 'png' }} style={place} />
      <View style={{ position: 'absolute', left: 0, top: 0 }}>
        <ScenePdf scene={pictureScene({ prescription, keepClear, now, bounds })} widthPx={widthPx} heightPx={heightPx} font={TEXT_FONT} width={width} />
      </View>
    </View>
  );
}

/** What a scene shows, black on white, from the model its screen is painted from. */
export function HandOutPicture({ scene, answer, width }: { scene: ShownScene; answer: Answer; width: number }) {
  if (!answer.assessment) return null;
  if (scene.view === 'picture') return <SimulatedPdf question={scene.question} sliceOffsetMm={scene.sliceOffsetMm} width={width} />;
  const drawn = drawScene(scene, answer, PICTURE_PX);
  return drawn ? <ScenePdf scene={drawn.picture} {...PICTURE_PX} font={TEXT_FONT} width={width} /> : null;
}
