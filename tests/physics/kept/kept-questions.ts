/** Questions whose answers are kept under fixtures/golden/engine: wide rather than deep, every region and family. */
import { assess, drawSection, foldProbability, rankRemedies } from '@/lib/physics';
import type { Assessment } from '@/lib/physics/model/assessment';
import type { Case } from '@/lib/physics/model/case';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
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
import {
  REGIONS,
  ARMS,
  patientOf,
  withArms,
  bodies,
  phantoms,
  signals,
  pictures,
  sizes,
  bores,
} from './kept-bodies';

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

/** Without the engine's version, which says only that some answer changed. */
const shortened = ({ slab, reasons, assumptions, engineVersion: _, ...rest }: Assessment) => ({
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
