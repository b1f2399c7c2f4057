/** Questions whose answers are kept under fixtures/golden/engine: wide rather than deep, every region, family and route. */
import { assess, drawSection, foldProbability, rankRemedies, simulateImage } from '@/lib/physics';
import type { Assessment } from '@/lib/physics/model/assessment';
import { buildBody } from '@/lib/physics/body/build-body';
import { checkBore } from '@/lib/physics/bore/check-bore';
import { sectionFrame } from '@/lib/physics/geometry/section-frame';
import { paintLayers } from '@/lib/physics/image/paint-layers';
import { tissueSignal } from '@/lib/physics/image/tissue-signal';
import { RELAXATION, type Tissue } from '@/lib/physics/image/tissues';
import type { Case } from '@/lib/physics/model/case';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { BodyRegion, Patient } from '@/lib/physics/model/patient';
import type { Prescription } from '@/lib/physics/model/prescription';
import { BODY_REGRESSIONS, bodyMeasure, type BodyMeasure } from '@/lib/physics/size/body-regressions';
import { shouldersFromWeightAndHeight } from '@/lib/physics/size/estimate-shoulders';
import { workOutSize, type KnownSizes } from '@/lib/physics/size/work-out-size';
import { slabProfile } from '@/lib/physics/slab/slab-profile';
import { drawCase } from '@/tests/support/draw-case';
import { seededNumbers } from '@/tests/support/seeded-numbers';
import {
  accelerated,
  evenMargin,
  extentsOf,
  LIVER_BOX,
  measured,
  prescriptionOf,
  SEQUENCE_FAMILIES,
  slabOf,
  typicalCase,
  typicalPatient,
  typicalPolicy,
  typicalScanner,
} from '@/tests/support/physics-cases';

const REGIONS: readonly BodyRegion[] = [
  'abdomen',
  'pelvis',
  'chest',
  'head',
  'shoulder',
  'hip',
  'knee',
  'breast',
];
const ARMS = ['up', 'down', 'cannot-be-raised'] as const;

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

const patientOf = (region: BodyRegion, changes: Partial<Patient> = {}): Patient =>
  typicalPatient({ region, extents: extentsOf(SIZES[region]), ...changes });

const withArms = (position: (typeof ARMS)[number], gapMm = 12): Patient['arms'] => ({
  position,
  breadthMm: 94,
  depthMm: 103,
  gapMm,
});

function bodies(): unknown {
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

function phantoms(region: BodyRegion): unknown {
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

function signals(): unknown {
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

function pictures(): unknown {
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

function sizes(): unknown {
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

function bores(): unknown {
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

const across: Partial<Case> = {
  keepClear: {
    ...LIVER_BOX,
    mustStayDisplayed: { xMm: [-120, 90], yMm: [-80, 60], zMm: [-40, 40] },
  } as Case['keepClear'],
  policy: typicalPolicy({
    marginMm: { anterior: 9, posterior: 4, right: 6, left: 5, superior: 8, inferior: 7 },
  }),
};

/** Every region with every family that suits, tilted, off-centre, with ghosts and slabs. */
function turned(): Case[] {
  const next = seededNumbers(77);
  const between = (low: number, high: number) => Math.round(low + next() * (high - low));
  return REGIONS.flatMap((region, i) =>
    SEQUENCE_FAMILIES.filter((_, j) => (i + j) % 3 === 0).map((family, j) => {
      const p = prescriptionOf(family);
      const fovPhaseMm = between(170, 300);
      const slices =
        p.slices.mode === 'slab'
          ? slabOf({
              partitions: 20,
              acquiredPartitions: between(20, 26),
              partitionThicknessMm: 4,
              timeBandwidthProduct: 6,
            })
          : { ...p.slices, slices: 5 };
      const unfolding = (['image-domain-grid-ends', 'k-space-self-calibrating'] as const)[j % 2]!;
      return typicalCase({
        ...across,
        patient: patientOf(region, {
          arms: withArms(ARMS[(i + j) % 3]!, between(0, 25)),
          isocentreZMm: between(-30, 30),
          lateralOffsetMm: between(-20, 20),
        }),
        prescription: {
          ...p,
          slices,
          fovPhaseMm,
          fovReadoutMm: fovPhaseMm + between(0, 120),
          acquiredLines: between(p.linesAcrossFov, p.linesAcrossFov * 1.3),
          centreMm: [between(-25, 25), between(-25, 25), between(-15, 15)],
          tiltAboutPhaseDeg: j % 2 === 0 ? between(-25, 25) : 0,
          tiltAboutReadoutDeg: j % 3 === 0 ? between(-20, 20) : 0,
          inPlaneRotationDeg: j % 4 === 0 ? between(-15, 15) : 0,
          acceleration: p.acceleration.factorPhase > 1 ? accelerated(2, { unfolding }) : p.acceleration,
        },
      });
    }),
  );
}

function drawings(): unknown {
  /** Enough of an outline to see it change: its points' sums. */
  const outline = (rings: readonly (readonly (readonly [number, number])[])[]) =>
    rings.map((ring) => [
      ring.length,
      ring.reduce((sum, [r]) => sum + r, 0),
      ring.reduce((sum, [, p]) => sum + p, 0),
      ring.reduce((sum, [r, p]) => sum + r * p, 0),
    ]);
  return turned().map((given) => {
    const {
      tissue,
      pieces,
      ghosts,
      keepClear,
      keepClearWithMargin,
      mustStayDisplayed,
      frame: _,
      ...rest
    } = drawSection(given, { sliceOffsetMm: 4 });
    const seen = (one: (typeof pieces)[number] | (typeof ghosts)[number]) => ({
      ...one,
      source: outline(one.source),
      landed: outline(one.landed),
      inKeepClear: outline(one.inKeepClear),
    });
    return {
      ...rest,
      areas: outline([keepClear, keepClearWithMargin, mustStayDisplayed]),
      tissue: tissue.map((one) => ({ ...one, rings: outline(one.rings) })),
      pieces: pieces.map(seen),
      ghosts: ghosts.map(seen),
    };
  });
}

function profiles(): unknown {
  return [
    { kind: 'single-pulse', timeBandwidthProduct: 3, flipDeg: 10 },
    { kind: 'single-pulse', timeBandwidthProduct: 8, flipDeg: 90 },
    { kind: 'spoiled', timeBandwidthProduct: 12, flipDeg: 15, trMs: 4, t1Ms: 800 },
    { kind: 'spoiled', timeBandwidthProduct: 6, flipDeg: 40, trMs: 5, t1Ms: 300 },
  ].map((spec) => {
    const profile = slabProfile(spec as Parameters<typeof slabProfile>[0]);
    return [
      ...Array.from({ length: 40 }, (_, i) => profile.at(i * 0.031)),
      profile.skirtShare(0.05),
      profile.skirtShare(0.02),
    ];
  });
}

/** The figures in a sentence. The words around them may be put better any day. */
const figures = (text: string): readonly string[] => text.match(/\d+(?:\.\d+)?/g) ?? [];

const shortened = ({ slab, reasons, assumptions, ...rest }: Assessment) => ({
  ...rest,
  reasons: reasons.map(({ code, text }) => [code, ...figures(text)]),
  assumptions: assumptions.map(({ field, used }) => [field, ...figures(used)]),
  slab: slab && { ...slab, partitions: slab.partitions.map(({ alias, signal }) => [alias, signal]) },
});

/** Cases whose remedies differ: strict and lenient policies, short breath-holds, coarse steps, coils, doubtful sizes. */
function remedies(): unknown {
  const strict = typicalPolicy({ strictBreathHold: true, tolerateFoldOutsidePct: 2, sureAt: 0.9 });
  const cases: Case[] = [2, 5, 9, 12, 17, 23].map((seed, i) => {
    const given = drawCase(seed);
    return i % 2 === 0 ? given : { ...given, policy: strict };
  });
  const unsure = extentsOf({});
  const coil = [
    {
      name: 'body array',
      elements: [-150, -50, 50, 150].map((z) => ({ name: `at ${z}`, seesFromMm: z - 80, seesToMm: z + 80 })),
    },
  ];
  cases.push(
    typicalCase({
      keepClear: LIVER_BOX,
      patient: typicalPatient({ arms: withArms('down'), extents: { ...unsure, anterior: measured(172, 6) } }),
      prescription: prescriptionOf('gradient-echo'),
    }),
    typicalCase({
      keepClear: LIVER_BOX,
      scanner: typicalScanner({ coils: coil, lineStep: { kind: 'percent', percent: 10 } }),
      prescription: prescriptionOf('balanced'),
    }),
    typicalCase({
      keepClear: LIVER_BOX,
      policy: strict,
      prescription: prescriptionOf('echo-train-spin-echo-3d'),
    }),
  );
  return cases.map((given) => {
    const { now: _, remedies: listed, notPossible, candidates } = rankRemedies(given);
    return {
      candidates,
      remedies: listed.map(({ assessment, prescription: p, sentence, sideEffects, terms, ...rest }) => ({
        ...rest,
        terms: terms.map(({ kind, tenths }) => [kind, tenths]),
        said: [...figures(sentence), ...sideEffects.flatMap(figures)],
        set: [
          p.acquiredLines,
          p.fovPhaseMm,
          p.fovReadoutMm,
          p.linesAcrossFov,
          p.readoutMatrix,
          p.averages,
          p.centreMm,
          p.slices,
          p.acceleration,
          p.partialFourierPhase,
          p.presaturation,
          p.coilElements,
        ],
        verdict: assessment.verdict,
        time: assessment.time,
        detail: assessment.detail,
      })),
      notPossible: notPossible.map(({ key, reason }) => [key, reason.code, ...figures(reason.text)]),
    };
  });
}

function probabilities(): unknown {
  const unsure = (given: Case, spread: number): Case => {
    const { extents } = given.patient;
    return {
      ...given,
      patient: {
        ...given.patient,
        extents: {
          ...extents,
          anterior: { ...extents.anterior, spread },
          posterior: { ...extents.posterior, spread },
          right: { ...extents.right, spread: spread + 3 },
          left: { ...extents.left, spread: spread + 3 },
        },
      },
    };
  };
  // With the arms down nothing decides alone: the share of many sizes.
  const many = typicalCase({
    keepClear: LIVER_BOX,
    patient: typicalPatient({ arms: withArms('down', 8) }),
    prescription: prescriptionOf('echo-planar', {
      phaseAxis: 'RL',
      fovPhaseMm: 420,
      fovReadoutMm: 300,
      acquiredLines: 122,
    }),
  });
  return [
    ...[3, 8, 14, 21].map((seed) => foldProbability(unsure(drawCase(seed), 9))),
    foldProbability(unsure(many, 9)),
  ];
}

/** Group by group; each becomes one file. */
export const KEPT: Readonly<Record<string, () => unknown>> = {
  policy: () => DEFAULT_POLICY,
  bodies,
  ...Object.fromEntries(REGIONS.map((region) => [`phantom-${region}`, () => phantoms(region)])),
  signals,
  pictures,
  sizes,
  bores,
  drawings,
  profiles,
  probabilities,
  remedies,
  'assessments-turned': () => turned().map((given) => shortened(assess(given))),
  'assessments-drawn': () => Array.from({ length: 40 }, (_, i) => shortened(assess(drawCase(i + 1)))),
  'assessments-margin': () =>
    SEQUENCE_FAMILIES.map((family) =>
      shortened(
        assess(
          typicalCase({
            keepClear: LIVER_BOX,
            prescription: prescriptionOf(family),
            policy: typicalPolicy({ marginMm: evenMargin(4), sureAt: 0.8 }),
            patient: typicalPatient({
              extents: { ...extentsOf({}), anterior: measured(170, 8), posterior: measured(168, 8) },
              arms: withArms('down'),
            }),
          }),
        ),
      ),
    ),
};
