import { Document, Page, Path, Rect, StyleSheet, Svg, Text, View } from '@react-pdf/renderer';
import type { ReactNode } from 'react';
import { ScenePdf } from '@/components/schematic/pdf/scene-pdf';
import { qrPath } from '@/lib/presentation/qr-path';
import { QR_QUIET_MODULES } from '@/lib/presentation/qr-quiet-zone';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import type { PlanView } from '@/lib/schemas/plan';
import { CAUTIONS } from '../cautions';
import { sheetSequence, type SheetSequence } from '../sheet-facts';
import { SHEET_PICTURE_PX, sheetScene } from '../sheet-scene';
import { restRows, restsOn, SHEET_TITLES, sheetHeading, signatureRows, sizeRows } from '../sheet-words';
import { FIGURE_FONT, printable, TEXT_FONT } from './sheet-fonts';
import { VerdictMark } from './verdict-mark';

/** 12 mm, as the printed page has. */
const MARGIN_PT = 34;
const PICTURE_PT = 280;

/** All sizes follow one number, so that a long plan can be set smaller and still be one page. */
function styles(scale: number) {
  const pt = (size: number) => size * scale;
  return StyleSheet.create({
    page: { padding: MARGIN_PT, fontFamily: TEXT_FONT, fontSize: pt(9), lineHeight: 1.2, color: 'black' },
    row: { flexDirection: 'row' },
    small: { fontSize: pt(8) },
    bold: { fontWeight: 700 },
    figures: { fontFamily: FIGURE_FONT },
    // The face gives a hyphen the width of a figure: large, that reads as a gap.
    reference: { fontFamily: FIGURE_FONT, fontWeight: 700, fontSize: pt(24), lineHeight: 1.1, letterSpacing: pt(-1.6) },
    value: { fontFamily: FIGURE_FONT, fontWeight: 700, fontSize: pt(11) },
    line: { borderBottomWidth: 0.75, borderBottomColor: 'black' },
    cell: { paddingVertical: pt(1), paddingRight: 5 },
    gap: { marginTop: pt(6) },
    label: { borderWidth: 0.75, borderStyle: 'dashed', width: 180, height: pt(60), padding: 5, justifyContent: 'space-between' },
    signature: { flex: 1, marginRight: 14 },
  });
}

type Styles = ReturnType<typeof styles>;

const COLUMNS = ['33%', '16%', '16%', '6%', '13%', '16%'] as const;
const HEADS = ['Sequence', 'Phase oversampling', 'Slice oversampling', 'Av.', 'Time', 'Verdict'] as const;

function Cells({ s, children }: { s: Styles; children: readonly ReactNode[] }) {
  return (
    <View style={s.row}>
      {children.map((child, column) => (
        <View key={COLUMNS[column]! + column} style={[s.cell, { width: COLUMNS[column]! }]}>
          {child}
        </View>
      ))}
    </View>
  );
}

function Setting({ s, setting }: { s: Styles; setting: SheetSequence['phase'] | undefined }) {
  if (!setting) return <Text>–</Text>;
  return (
    <>
      <Text style={s.value}>{printable(setting.value)}</Text>
      {setting.note ? <Text style={s.small}>{printable(setting.note)}</Text> : null}
    </>
  );
}

function SequenceRow({ s, row, size }: { s: Styles; row: SheetSequence; size: number }) {
  return (
    <View style={[s.line, { paddingVertical: 2 }]} wrap={false}>
      <Cells s={s}>
        {[
          <View key="name">
            <Text style={s.bold}>{printable(row.name)}</Text>
            <Text style={s.small}>{printable(row.geometry)}</Text>
          </View>,
          <Setting key="phase" s={s} setting={row.phase} />,
          <Setting key="slice" s={s} setting={row.slice} />,
          <Text key="averages" style={s.figures}>{row.averages}</Text>,
          <Text key="time" style={s.figures}>{row.time}</Text>,
          <View key="verdict" style={s.row}>
            <VerdictMark verdict={row.verdict} size={size} />
            <Text style={[s.small, { flex: 1 }]}>{VERDICT_WORDS[row.verdict]}</Text>
          </View>,
        ]}
      </Cells>
      {row.adopted.map((sentence) => (
        <Text key={sentence} style={s.small}>Adopted: {printable(sentence)}</Text>
      ))}
    </View>
  );
}

function ScanCode({ link, side }: { link: string; side: number }) {
  const { modules, path } = qrPath(link);
  const quiet = QR_QUIET_MODULES;
  const all = modules + 2 * quiet;
  return (
    <Svg viewBox={`${-quiet} ${-quiet} ${all} ${all}`} style={{ width: side, height: side }}>
      <Rect x={-quiet} y={-quiet} width={all} height={all} fill="white" />
      <Path d={path} fill="black" />
    </Svg>
  );
}

function Sizes({ s, plan }: { s: Styles; plan: PlanView }) {
  return (
    <View style={{ flex: 1 }}>
      <Text style={[s.small, s.bold]}>{SHEET_TITLES.sizes}</Text>
      {sizeRows(plan).map(({ name, value, source }) => (
        <View key={name} style={[s.row, s.line, { borderBottomWidth: 0.4 }]}>
          <Text style={[s.small, { width: '24%' }]}>{name}</Text>
          <Text style={[s.small, s.figures, { width: '34%' }]}>{value}</Text>
          <Text style={[s.small, { width: '42%' }]}>{source}</Text>
        </View>
      ))}
      {restRows(plan).map(([name, words]) => (
        <Text key={name} style={[s.small, { marginTop: 2 }]}>
          <Text style={s.bold}>{name}</Text> {printable(words)}
        </Text>
      ))}
    </View>
  );
}

export interface SheetPageProps {
  readonly plan: PlanView;
  readonly link: string;
  readonly paper: 'A4' | 'Letter';
  readonly scale: number;
  readonly pictureScale: number;
}

/** The plan sheet as one page: the same words, values and picture as on the screen. */
export function SheetPage({ plan, link, paper, scale, pictureScale }: SheetPageProps) {
  const s = styles(scale);
  const heading = sheetHeading(plan);
  const drawn = sheetScene(plan);
  const { width, height } = SHEET_PICTURE_PX;
  return (
    <Document title={`Plan sheet ${heading.reference}`} subject="Planning estimate" creator="Selvedge" producer="Selvedge" language="en">
      <Page size={paper === 'A4' ? 'A4' : 'LETTER'} style={s.page}>
        <View style={[s.row, s.line, { paddingBottom: 5 }]}>
          <View style={{ flex: 1 }}>
            <Text><Text style={s.bold}>Plan sheet</Text> · {printable(heading.kind)}</Text>
            <Text style={s.reference}>{heading.reference}</Text>
            <Text style={s.small}>{heading.version}</Text>
          </View>
          <View style={s.label}>
            {SHEET_TITLES.label.map((words) => <Text key={words} style={s.small}>{words}</Text>)}
          </View>
        </View>
        <View style={s.gap}>
          <View style={s.line}>
            <Cells s={s}>{HEADS.map((head) => <Text key={head} style={[s.small, s.bold]}>{head}</Text>)}</Cells>
          </View>
          {plan.sequences.map((sequence, index) => (
            <SequenceRow key={sequence.id} s={s} size={11 * scale} row={sheetSequence(sequence, plan.results[index]!, plan)} />
          ))}
        </View>
        <View style={[s.row, s.gap]} wrap={false}>
          {drawn ? (
            <View style={{ width: PICTURE_PT * pictureScale, marginRight: 12 }}>
              <ScenePdf scene={drawn.scene} widthPx={width} heightPx={height} font={TEXT_FONT} width={PICTURE_PT * pictureScale} />
              <Text style={s.small}>{printable(drawn.caption)}</Text>
            </View>
          ) : null}
          <Sizes s={s} plan={plan} />
        </View>
        <View style={s.gap} wrap={false}>
          <Text style={[s.small, s.bold]}>{SHEET_TITLES.cautions}</Text>
          {CAUTIONS.map((caution) => <Text key={caution} style={s.small}>– {caution}</Text>)}
        </View>
        <View style={[s.row, s.gap]} wrap={false}>
          {signatureRows(plan).map(([title, note]) => (
            <View key={title} style={s.signature}>
              <View style={[s.line, { height: 24 * scale }]} />
              <Text style={[s.small, s.bold]}>{title}</Text>
              <Text style={s.small}>{note}</Text>
            </View>
          ))}
        </View>
        <View style={[s.row, s.gap, { borderTopWidth: 0.75, paddingTop: 4 }]} wrap={false}>
          <View style={{ flex: 1 }}>
            <Text style={s.small}>{SHEET_TITLES.link}</Text>
            <Text style={[s.figures, s.bold]}>{link}</Text>
            <Text style={[s.small, s.figures]}>{restsOn(plan)}</Text>
          </View>
          <ScanCode link={link} side={72} />
        </View>
      </Page>
    </Document>
  );
}
