import { Document, Page, StyleSheet, Text, View } from '@react-pdf/renderer';
import { FIGURE_FONT, printable, TEXT_FONT } from '@/components/plan/pdf/sheet-fonts';
import { VerdictMark } from '@/components/plan/pdf/verdict-mark';
import { ScenePdf } from '@/components/schematic/pdf/scene-pdf';
import type { HandOut } from '@/lib/domain/demonstration/hand-out';
import type { Paper } from '@/lib/domain/plan/sheet';
import type { Assessment } from '@/lib/physics/model/assessment';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import { SHOWN_CAUTION } from '../caution';
import { curveScene, oversamplingCurve } from '../slab/oversampling-curve';
import { nearestPartition } from '../slab/slab-stage';
import { figureLines, figuresOf } from '../stage/figures';
import { type Answer, answerOf, sceneWords, type ShownScene } from '../stage/shown-scene';
import { HandOutPicture, SimulatedPdf } from './hand-out-picture';

/** 12 mm, as the plan sheet has. */
const MARGIN_PT = 34;
const SIDE_PT = 208;
const GAP_PT = 18;
const CURVE = { widthPx: 380, heightPx: 190 };
const PARTITION = { widthPx: 380, heightPx: 230 };
/** Landscape, points. */
const PAGE_WIDTH_PT = { A4: 842, Letter: 792 } as const;
/** More would push the page over; the first ones say the most. */
const WORDS_MAX = 5;

const s = StyleSheet.create({
  page: { padding: MARGIN_PT, fontFamily: TEXT_FONT, fontSize: 9.5, lineHeight: 1.25, color: 'black' },
  row: { flexDirection: 'row' },
  head: { flexDirection: 'row', justifyContent: 'space-between', borderBottomWidth: 0.75, paddingBottom: 3, fontSize: 8.5 },
  title: { fontSize: 20, fontWeight: 700, lineHeight: 1.15, marginTop: 8, maxLines: 2 },
  verdict: { flexDirection: 'row', marginTop: 4, fontSize: 11 },
  bold: { fontWeight: 700 },
  small: { fontSize: 8.5 },
  figures: { fontFamily: FIGURE_FONT, fontSize: 9 },
  figure: { flexDirection: 'row', justifyContent: 'space-between', borderBottomWidth: 0.4, paddingVertical: 1.5 },
  foot: { position: 'absolute', left: MARGIN_PT, right: MARGIN_PT, bottom: 18, borderTopWidth: 0.4, paddingTop: 3, fontSize: 7.5 },
});

function SlabAside({ scene, assessment }: { scene: ShownScene; assessment: Assessment }) {
  const { slab } = assessment;
  const { slices } = scene.question.prescription;
  const chosen = slab && nearestPartition(slab, scene.sliceOffsetMm);
  if (!slab || !chosen || slices.mode !== 'slab') return null;
  const curve = curveScene(oversamplingCurve(scene.question), slices.acquiredPartitions);
  return (
    <>
      <Text style={[s.bold, { marginTop: 8, marginBottom: 4 }]}>Partition {chosen.index + 1} of {slab.partitions.length}, simulated</Text>
      <SimulatedPdf question={scene.question} sliceOffsetMm={chosen.offsetMm} width={SIDE_PT} size={PARTITION} />
      <Text style={[s.bold, { marginTop: 4 }]}>Partitions with wrap against slice oversampling</Text>
      <ScenePdf scene={curve} {...CURVE} font={TEXT_FONT} width={SIDE_PT} />
    </>
  );
}

function SceneWords({ scene, answer }: { scene: ShownScene; answer: Answer }) {
  return (
    <>
      {sceneWords(scene, answer).slice(0, WORDS_MAX).map((words) => (
        <Text key={words} style={[s.small, { marginTop: 4, maxLines: scene.view === 'slab' ? 1 : 5 }]}>{printable(words)}</Text>
      ))}
    </>
  );
}

function ScenePage({ printed, index, paper }: { printed: HandOut; index: number; paper: Paper }) {
  const scene = printed.scenes[index]!;
  const answer = answerOf(scene.question);
  const { assessment } = answer;
  const pictureWidth = PAGE_WIDTH_PT[paper] - 2 * MARGIN_PT - SIDE_PT - GAP_PT;
  return (
    <Page size={paper === 'A4' ? 'A4' : 'LETTER'} orientation="landscape" style={s.page}>
      <View style={s.head}>
        <Text>{printable(printed.title)}</Text>
        <Text style={s.figures}>{index + 1} / {printed.scenes.length}</Text>
      </View>
      <Text style={s.title}>{printable(scene.title)}</Text>
      {!assessment ? (
        <Text>This scene cannot be worked out: {printable(answer.refusal)}</Text>
      ) : (
        <View style={[s.row, { marginTop: 2 }]}>
          <View style={{ width: pictureWidth, marginRight: GAP_PT }}>
            <View style={s.verdict}>
              <VerdictMark verdict={assessment.verdict} size={14} />
              <View style={{ flex: 1 }}>
                <Text style={s.bold}>{VERDICT_WORDS[assessment.verdict]}</Text>
                {assessment.reasons[0] ? <Text style={{ maxLines: 2 }}>{printable(assessment.reasons[0].text)}</Text> : null}
              </View>
            </View>
            <HandOutPicture scene={scene} answer={answer} width={pictureWidth} />
            {scene.view === 'slab' ? <SceneWords scene={scene} answer={answer} /> : null}
          </View>
          <View style={{ width: SIDE_PT, paddingTop: 4 }}>
            {figureLines(figuresOf(assessment), assessment, scene.question.prescription).map(({ key, label, value }) => (
              <View key={key} style={s.figure}>
                <Text style={s.small}>{label}</Text>
                <Text style={s.figures}>{printable(value)}</Text>
              </View>
            ))}
            {scene.view === 'slab' ? <SlabAside scene={scene} assessment={assessment} /> : <SceneWords scene={scene} answer={answer} />}
          </View>
        </View>
      )}
      <Text style={s.foot}>{SHOWN_CAUTION}</Text>
    </Page>
  );
}

/** All scenes for the audience to take home, one a page: pictures and figures as shown, without the presenter's notes. */
export function HandOutPages({ printed, paper }: { printed: HandOut; paper: Paper }) {
  return (
    <Document title={printed.title} creator="Selvedge" producer="Selvedge" language="en">
      {printed.scenes.map(({ id }, index) => <ScenePage key={id} printed={printed} index={index} paper={paper} />)}
    </Document>
  );
}
