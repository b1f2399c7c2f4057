/** Bodies, phantoms, pictures, sizes and bores whose answers are kept: every region and route. */
import { simulateImage } from '@/lib/physics';
import { buildBody } from '@/lib/physics/body/build-body';
import { checkBore } from '@/lib/physics/bore/check-bore';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import { paintLayers } from '@/lib/physics/image/paint-layers';
import { tissueSignal } from '@/lib/physics/image/tissue-signal';
import { RELAXATION, type Tissue } from '@/lib/physics/image/tissues';
import type { Case } from '@/lib/physics/model/case';
import type { BodyRegion, Patient } from '@/lib/physics/model/patient';
import type { Prescription } from '@/lib/physics/model/prescription';
import { BODY_REGRESSIONS, bodyMeasure, type BodyMeasure } from '@/lib/physics/size/body-regressions';
import { shouldersFromWeightAndHeight } from '@/lib/physics/size/estimate-shoulders';
import { workOutSize, type KnownSizes } from '@/lib/physics/size/work-out-size';
import {
  accelerated,
  extentsOf,
  measured,
  prescriptionOf,
  SEQUENCE_FAMILIES,
  typicalCase,
  typicalPatient,
  typicalScanner,
} from '@/tests/support/physics-cases';

export const REGIONS: readonly BodyRegion[] = [
  'abdomen',
  'pelvis',
  'chest',
  'head',
  'shoulder',
  'hip',
  'knee',
  'breast',
];
export const ARMS = ['up', 'down', 'cannot-be-raised'] as const;

/** Sizes a region may have, mm a side. */
const SIZES: Readonly<Record<BodyRegion, Parameters<typeof extentsOf>[0]>> = {
  abdomen: { right: 232, left: 247, anterior: 176, posterior: 163 },
  pelvis: { right: 226, left: 231, anterior: 148, posterior: 152 },
  chest: { right: 205, left: 198, anterior: 140, posterior: 128 },
  head: { right: 78, left: 81, anterior: 112, posterior: 97, superior: 118, inferior: 131 },
  shoulder: { right: 62, left: 260, anterior: 118, posterior: 109, superior: 71, inferior: 96 },
  hip: { right: 118, left: 290, anterior: 146, posterior: 138 },
  knee: { right: 74, left: 68, anterior: 66, posterior: 79 },
  breast: { right: 196, left: 191, anterior: 188, posterior: 92, superior: 83, inferior: 94 },
};

export const patientOf = (region: BodyRegion, changes: Partial<Patient> = {}): Patient =>
  typicalPatient({ region, extents: extentsOf(SIZES[region]), ...changes });

export const withArms = (position: (typeof ARMS)[number], gapMm = 12): Patient['arms'] => ({
  position,
  breadthMm: 94,
  depthMm: 103,
  gapMm,
});

export function bodies(): unknown {
  return REGIONS.flatMap((region) =>
    ARMS.flatMap((position) => [
      buildBody(patientOf(region, { arms: withArms(position), pairedSide: 'right', legGapMm: 33 })),
      // Neither weight nor height known: adults' means.
      buildBody(patientOf(region, { arms: withArms(position), weightKg: undefined })),
      // Ends that nobody measured, arms thinner than a chest is deep, the other leg at an unknown distance.
      buildBody({
        ...patientOf(region, { arms: withArms(position, 0), sex: 'female', position: 'head-first-prone' }),
        extents: {
          ...extentsOf(SIZES[region]),
          superior: { value: 250, source: 'policy-default', spread: 0 },
        },
      }),
    ]),
  );
}

export function phantoms(region: BodyRegion): unknown {
  const layersOf = (given: Case) =>
    paintLayers(given, sectionFrame(given.prescription)).map(({ solid, tissue, weight }) => [
      tissue,
      weight,
      solid.quadric,
      solid.halfSpaces,
    ]);
  const patient = patientOf(region, { arms: withArms('down'), pairedSide: 'left' });
  const small = {
    ...patient,
    extents: extentsOf({ right: 41, left: 44, anterior: 38, posterior: 35, superior: 40, inferior: 45 }),
  };
  // Parts as given: a turned cylinder across the body, an ellipsoid, an outline, each with its own weight.
  const given: Patient = {
    ...patient,
    parts: [
      {
        name: 'across',
        kind: 'other',
        signalWeight: 0.8,
        estimated: false,
        shape: {
          type: 'elliptic-cylinder',
          along: 'x',
          centreMm: [5, 20, -10],
          semiAxesMm: [60, 90],
          rotationDeg: 25,
          fromMm: -80,
          toMm: 130,
        },
      },
      {
        name: 'round',
        kind: 'head',
        signalWeight: 1,
        estimated: false,
        shape: { type: 'ellipsoid', centreMm: [12, -30, 45], semiAxesMm: [70, 110, 40] },
      },
      {
        name: 'drawn',
        kind: 'trunk',
        signalWeight: 1.2,
        estimated: false,
        shape: {
          type: 'outline-prism',
          along: 'z',
          rings: [
            [
              [-40, -10],
              [70, 5],
              [20, 90],
            ],
          ],
          fromMm: -30,
          toMm: 25,
        },
      },
      {
        name: 'along',
        kind: 'leg',
        signalWeight: 1,
        estimated: false,
        shape: {
          type: 'elliptic-cylinder',
          along: 'z',
          centreMm: [90, 20, 0],
          semiAxesMm: [60, 70],
          fromMm: -80,
          toMm: 130,
        },
      },
    ],
  };
  return [patient, small, given].map((one) => layersOf(typicalCase({ patient: one })));
}

export function signals(): unknown {
  return (Object.keys(RELAXATION) as Tissue[]).map((tissue) => [
    tissue,
    RELAXATION[tissue],
    ...SEQUENCE_FAMILIES.map((family) => tissueSignal(tissue, prescriptionOf(family))),
  ]);
}

/** A picture as the sums of its blocks: a change of any pixel shows. */
function blocksOf(values: Float32Array, widthPx: number): number[] {
  const sums = new Map<number, number>();
  values.forEach((value, i) => {
    const key = Math.floor(Math.floor(i / widthPx) / 6) * 100 + Math.floor((i % widthPx) / 6);
    sums.set(key, (sums.get(key) ?? 0) + value);
  });
  return [...sums.values()];
}

export function pictures(): unknown {
  const pictureOf = (given: Case, seed: number) => {
    const { values, ...rest } = simulateImage(given, {
      sizePx: 48,
      seed,
      relativeSnr: 0.8,
      noiseShare: 0.03,
      sliceOffsetMm: seed - 3,
    });
    return { ...rest, blocks: blocksOf(values, rest.widthPx) };
  };
  const coarse = (p: Prescription): Prescription => {
    const lines = Math.round(p.linesAcrossFov / 4);
    return {
      ...p,
      readoutMatrix: Math.round(p.readoutMatrix / 4),
      linesAcrossFov: lines,
      acquiredLines: Math.ceil(lines * 1.15),
    };
  };
  const presaturation: Prescription['presaturation'] = [
    { side: 'anterior', innerEdgeMm: 120, thicknessMm: 60, nominalFlipDeg: 90, delayMs: 11 },
  ];
  return SEQUENCE_FAMILIES.map((family, i) => {
    const p = coarse(prescriptionOf(family));
    const acceleration =
      i % 2 === 0 ? accelerated(2, { unfolding: 'image-domain-grid-ends' }) : p.acceleration;
    const region = REGIONS[i]!;
    return pictureOf(
      typicalCase({
        patient: patientOf(region, { arms: withArms('down') }),
        prescription: { ...p, acceleration, presaturation: i < 4 ? presaturation : [] },
      }),
      i + 1,
    );
  });
}

export function sizes(): unknown {
  const people: KnownSizes[] = [
    {},
    { girthMm: measured(1180, 15) },
    { girthMm: measured(1460), depthMm: measured(352, 4) },
    { weightKg: measured(131, 2), heightCm: measured(168, 1) },
    { weightKg: measured(172), heightCm: measured(177), hipGirthMm: measured(1510) },
    {
      weightKg: measured(74),
      heightCm: measured(171),
      breadthMm: { value: 371, source: 'reported', spread: 12 },
    },
    {
      girthMm: measured(1330),
      weightKg: measured(128),
      heightCm: measured(170),
      hipBreadthMm: measured(455),
    },
  ];
  const ways = people.flatMap((known) =>
    ([undefined, 'male', 'female'] as const).flatMap((sex) =>
      (['iliac-crest', 'liver'] as const).map((level) =>
        workOutSize({ ...known, sex }, { level, allowPopulation: level === 'liver' }),
      ),
    ),
  );
  const measures = (Object.keys(BODY_REGRESSIONS) as BodyMeasure[]).flatMap((measure) =>
    (['male', 'female'] as const).map((sex) => bodyMeasure(measure, measured(83, 2), measured(174, 1), sex)),
  );
  const shoulders = ([undefined, 'male', 'female'] as const).map((sex) =>
    shouldersFromWeightAndHeight(measured(118, 3), measured(169, 2), sex),
  );
  return { ways, measures, shoulders };
}

export function bores(): unknown {
  const bore = (...question: Parameters<typeof checkBore>) => {
    const { tightest, sections, unknown, chordAtTableMm } = checkBore(...question);
    return { tightest, sections, unknown, chordAtTableMm };
  };
  return ARMS.flatMap((position) =>
    REGIONS.map((region, i) =>
      bore(
        patientOf(region, {
          arms: withArms(position),
          position: i % 2 === 0 ? 'head-first-supine' : 'feet-first-prone',
          lateralOffsetMm: i * 3 - 9,
          sex: i % 3 === 0 ? 'male' : 'female',
        }),
        typicalScanner({
          boreDiameterMm: i % 2 === 0 ? 600 : 700,
          tableBelowCentreMm: 150 + 5 * i,
          anteriorCoilMm: 30 + i,
        }),
        i < 4
          ? {}
          : {
              elbowBreadthMm: measured(520, 9),
              hipsZMm: -310,
              shouldersZMm: 340,
              halfLengthMm: 500,
              padMm: 12,
            },
      ),
    ),
  );
}
