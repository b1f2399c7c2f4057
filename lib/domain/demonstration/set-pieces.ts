import type { Assessment, Case, PatientBox, Prescription } from '@/lib/domain/case/model';
import { assess } from '@/lib/physics';
import { CONTROLS } from './controls';
import { boxOf, inventedCase, type InventedBody, WHOLE_PICTURE } from './invented-case';
import type { ControlId, SceneDocument } from './scene';
import { slabScenes } from './slab-set-piece';

export interface SetPiece {
  readonly key: string;
  readonly title: string;
  /** What it teaches, in a sentence. */
  readonly lead: string;
  /** Worked out when it is copied: figures in the notes are the engine's. */
  readonly scenes: () => readonly SceneDocument[];
}

type Given = Pick<SceneDocument, 'title' | 'note' | 'question'> & Partial<SceneDocument>;

export function sceneOf(given: Given): SceneDocument {
  return { schemaVersion: 1, view: 'section', highlight: 'what-wraps', sliceOffsetMm: 0, controls: [], ...given };
}

export function moved(question: Case, id: ControlId, value: number | string): Case {
  const control = CONTROLS[id];
  return control.kind === 'number' ? control.write(question, Number(value)) : control.write(question, String(value));
}

export const prescribed = (question: Case, patch: Partial<Prescription>): Case => ({
  ...question,
  prescription: { ...question.prescription, ...patch },
});

const seconds = ({ time }: Assessment): string => `${Math.round(time?.scanS ?? 0)} s`;
const pct = (share: number): string => `${Math.round(share * 1000) / 10} %`;

const LARGE: InventedBody = {
  region: 'abdomen',
  extents: { right: 240, left: 240, anterior: 170, posterior: 170, superior: 250, inferior: 250 },
};
const LIVER: PatientBox = { xMm: [-190, 60], yMm: [-140, 95], zMm: [-60, 60] };

const ECHO_TRAIN = {
  name: 'T2 echo-train spin echo', family: 'echo-train-spin-echo', trMs: 4000, teMs: 90, echoTrainLength: 16, echoSpacingMs: 8,
  averages: 2, fovPhaseMm: 300, fovReadoutMm: 480, linesAcrossFov: 240, readoutMatrix: 384,
} as const;

function axialFold(): readonly SceneDocument[] {
  const before = inventedCase(LARGE, ECHO_TRAIN, boxOf(LIVER));
  const { width } = assess(before);
  const lines = width?.firstCleanLines ?? before.prescription.linesAcrossFov;
  const enough = prescribed(before, { acquiredLines: lines });
  const cover = prescribed(before, { acquiredLines: width?.coverBodyLines ?? lines });
  return [
    sceneOf({
      title: 'The back of the body lands on the liver',
      note: 'Follow the thread: what leaves by the posterior edge comes in by the anterior one, shifted by the acquired width, never mirrored.',
      question: before, controls: ['phase-oversampling'],
    }),
    sceneOf({
      title: 'Just enough',
      note: `${lines} lines instead of ${before.prescription.linesAcrossFov}: ${pct(lines / before.prescription.linesAcrossFov - 1)} oversampling leaves the keep-clear area free. Scan time ${seconds(assess(before))} becomes ${seconds(assess(enough))}.`,
      question: enough, highlight: 'keep-clear', controls: ['phase-oversampling'],
    }),
    sceneOf({
      title: 'Covering the whole body asks for more',
      note: `${cover.prescription.acquiredLines} lines, ${seconds(assess(cover))}: nothing folds anywhere, and the keep-clear area gains nothing over the scene before.`,
      question: cover, highlight: 'acquired-edge', controls: ['phase-oversampling'],
    }),
  ];
}

function swap(): readonly SceneDocument[] {
  const before = inventedCase(LARGE, ECHO_TRAIN, boxOf(LIVER));
  const after = moved(before, 'phase-direction', 'RL');
  return [
    sceneOf({ title: 'Phase along A–P', note: `${before.prescription.linesAcrossFov} lines, ${seconds(assess(before))}.`, question: before, controls: ['phase-direction'] }),
    sceneOf({
      title: 'Phase along R–L: no fold, at a price',
      note: `Each axis keeps its pixel, so ${after.prescription.linesAcrossFov} lines are needed and the scan takes ${seconds(assess(after))}. Motion ghosts turn with the phase direction.`,
      question: after, highlight: 'acquired-edge', controls: ['phase-direction'],
    }),
  ];
}

function fovAndPixel(): readonly SceneDocument[] {
  const before = inventedCase(LARGE, ECHO_TRAIN, boxOf(LIVER));
  const coarser = prescribed(before, { fovPhaseMm: 345 });
  const longer = moved(before, 'phase-fov', 345);
  const pixel = ({ prescription: p }: Case) => `${Math.round((p.fovPhaseMm / p.linesAcrossFov) * 100) / 100} mm`;
  return [
    sceneOf({ title: 'FOV 300 mm', note: `${before.prescription.linesAcrossFov} lines, pixel ${pixel(before)}.`, question: before, controls: [] }),
    sceneOf({ title: 'Larger FOV, same lines: the pixel grows', note: `Pixel ${pixel(coarser)}, still ${seconds(assess(coarser))}.`, question: coarser, view: 'picture' }),
    sceneOf({
      title: 'Larger FOV, same pixel: the time grows',
      note: `${longer.prescription.linesAcrossFov} lines, ${seconds(assess(longer))} instead of ${seconds(assess(before))}.`,
      question: longer, view: 'picture', controls: ['phase-fov'],
    }),
  ];
}

/** s ≥ (e − F/2)/F for a centred body, where covering it would take (2e − F)/F. */
function half(): readonly SceneDocument[] {
  const body: InventedBody = { ...LARGE, extents: { ...LARGE.extents, anterior: 175, posterior: 175 } };
  const before = inventedCase(body, { ...ECHO_TRAIN, fovPhaseMm: 280, linesAcrossFov: 224 }, WHOLE_PICTURE);
  const { width } = assess(before);
  const { linesAcrossFov } = before.prescription;
  const enough = width?.firstCleanLines ?? linesAcrossFov;
  const cover = width?.coverBodyLines ?? linesAcrossFov;
  return [
    sceneOf({ title: 'How much oversampling frees the whole picture?', note: 'Ask the room before moving anything. e is half the depth, F the phase FOV.', question: before, controls: ['phase-oversampling'] }),
    sceneOf({
      title: `Half of what you think: ${pct(enough / linesAcrossFov - 1)}`,
      note: `s ≥ (e − F/2)/F. Tissue may land in the oversampled margin, which is cut off; covering the body would take ${pct(cover / linesAcrossFov - 1)}.`,
      question: prescribed(before, { acquiredLines: enough }), highlight: 'acquired-edge', controls: ['phase-oversampling', 'depth'],
    }),
  ];
}

function coronalArms(): readonly SceneDocument[] {
  const body: InventedBody = { region: 'abdomen', extents: { right: 190, left: 190, anterior: 130, posterior: 130, superior: 250, inferior: 250 }, arms: 'down' };
  const down = inventedCase(
    body,
    { name: 'Balanced', family: 'balanced', plane: 'coronal', phaseAxis: 'RL', fovPhaseMm: 400, fovReadoutMm: 400, linesAcrossFov: 256, readoutMatrix: 256, trMs: 4, teMs: 2, flipDeg: 50 },
    WHOLE_PICTURE,
  );
  return [
    sceneOf({ title: 'Arms beside the body, phase along R–L', note: 'The right arm lands at the patient’s left, and the left arm at the right.', question: down, controls: ['arms', 'phase-oversampling'] }),
    sceneOf({ title: 'Arms up', note: 'Nothing was added to the scan. Confirm with the patient.', question: moved(down, 'arms', 'up'), controls: ['arms'] }),
    sceneOf({ title: 'Phase along S–I instead', note: 'The body goes on beyond the picture that way too: look at both ends.', question: moved(down, 'phase-direction', 'SI'), controls: ['phase-direction'] }),
  ];
}

function accelerated(): readonly SceneDocument[] {
  const plain = inventedCase(LARGE, ECHO_TRAIN, boxOf(LIVER));
  const acceleration = { ...plain.prescription.acceleration, factorPhase: 2, referenceLines: 0, calibrationS: 6 };
  const image = prescribed(plain, { acceleration: { ...acceleration, unfolding: 'image-domain-grid-ends' } });
  const kspace = prescribed(plain, { acceleration: { ...acceleration, unfolding: 'k-space-self-calibrating', referenceLines: 24, calibrationS: 0 } });
  return [
    sceneOf({ title: 'Unfolded in the image: a ghost at the centre', note: 'Tissue beyond the unfolding grid is left over and spread over the picture at W/R. It is not dimmer than its source.', question: image, controls: ['unfolding', 'phase-oversampling'] }),
    sceneOf({ title: 'Unfolded in k-space: fold as in a plain scan', note: 'Same body, same FOV: what lies outside folds to the far edge and nowhere else.', question: kspace, controls: ['unfolding', 'phase-oversampling'] }),
  ];
}

function averages(): readonly SceneDocument[] {
  const two = inventedCase(LARGE, ECHO_TRAIN, boxOf(LIVER));
  const paid = prescribed(two, { acquiredLines: 2 * two.prescription.linesAcrossFov, averages: 1 });
  const ratio = (assess(paid).detail?.snr ?? 0) / (assess(two).detail?.snr ?? 1);
  return [
    sceneOf({ title: 'Two averages, no oversampling', note: `${seconds(assess(two))}.`, question: two, controls: ['averages', 'phase-oversampling'] }),
    sceneOf({
      title: 'One average, 100 % oversampling',
      note: `${seconds(assess(paid))}, SNR × ${Math.round(ratio * 100) / 100}: the lines of the second average now lie outside the picture. With one average to begin with there is nothing to pay with.`,
      question: paid, controls: ['averages', 'phase-oversampling'],
    }),
  ];
}

function shoulder(): readonly SceneDocument[] {
  const body: InventedBody = { region: 'shoulder', extents: { right: 90, left: 350, anterior: 100, posterior: 110, superior: 120, inferior: 250 }, arms: 'down' };
  const joint: PatientBox = { xMm: [-60, 50], yMm: [-60, 60], zMm: [-40, 40] };
  const before = inventedCase(
    body,
    { name: 'PD echo-train spin echo', family: 'echo-train-spin-echo', phaseAxis: 'RL', fovPhaseMm: 180, fovReadoutMm: 180, linesAcrossFov: 240, readoutMatrix: 320, trMs: 3000, teMs: 30, echoTrainLength: 8, echoSpacingMs: 9 },
    boxOf(joint),
  );
  return [
    sceneOf({ title: 'A shoulder with the chest beside it', note: 'All the tissue lies on one side: the rule of half the depth is no use here.', question: before, controls: ['phase-oversampling', 'phase-direction'] }),
    sceneOf({ title: 'Phase along A–P', note: 'Less tissue lies beyond the picture that way.', question: moved(before, 'phase-direction', 'AP'), controls: ['phase-direction', 'phase-oversampling'] }),
  ];
}

export const SET_PIECES: readonly SetPiece[] = [
  { key: 'slab-wrap', title: 'Wrap between the ends of a 3D slab', lead: 'Why the dome of the liver appears at the feet end, what slice oversampling does, and what a sharper pulse does instead.', scenes: slabScenes },
  { key: 'axial-fold', title: 'Fold across an axial abdomen of large habitus', lead: 'Where outlying tissue lands, and how little is enough.', scenes: axialFold },
  { key: 'swap', title: 'Swapping the phase direction, and what it costs', lead: 'No fold, more lines.', scenes: swap },
  { key: 'fov-and-pixel', title: 'FOV and pixel', lead: 'A larger FOV costs detail or time.', scenes: fovAndPixel },
  { key: 'half', title: 'Half of what you think', lead: 'Freeing the picture takes half the oversampling that covering the body would.', scenes: half },
  { key: 'coronal-arms', title: 'Arms down in a coronal', lead: 'Each arm lands at the other side.', scenes: coronalArms },
  { key: 'accelerated', title: 'Central ghost of an accelerated scan', lead: 'Unfolding in the image against unfolding in k-space.', scenes: accelerated },
  { key: 'averages', title: 'Oversampling paid for with averages', lead: 'Same time, same SNR, no fold.', scenes: averages },
  { key: 'shoulder', title: 'Off-centre shoulder', lead: 'When all the tissue lies on one side.', scenes: shoulder },
];

export function findSetPiece(key: string): SetPiece | undefined {
  return SET_PIECES.find((piece) => piece.key === key);
}
