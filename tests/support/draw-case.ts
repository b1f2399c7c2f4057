import type { Case } from '@/lib/physics/model/case';
import { DEFAULT_POLICY } from '@/lib/physics/model/default-policy';
import type { LineStep } from '@/lib/physics/model/scanner';
import {
  accelerated,
  extentsOf,
  prescriptionOf,
  SEQUENCE_FAMILIES,
  slabOf,
  typicalCase,
  typicalPatient,
  typicalPolicy,
  typicalScanner,
} from './physics-cases';
import { seededNumbers } from './seeded-numbers';

const STEPS: readonly LineStep[] = [
  { kind: 'line' },
  { kind: 'even-lines' },
  { kind: 'percent', percent: 5 },
  { kind: 'doubling' },
];

/** A folding case of any family: sizes, arms, step, plane offset, acceleration and averages drawn from a fixed seed. */
export function drawCase(seed: number): Case {
  const next = seededNumbers(seed);
  const whole = (low: number, high: number): number => low + Math.floor(next() * (high - low + 1));
  const pick = <T>(values: readonly T[]): T => values[whole(0, values.length - 1)]!;
  const family = pick(SEQUENCE_FAMILIES);
  const base = prescriptionOf(family);
  const unfolding = pick([
    'k-space-self-calibrating',
    'image-domain-grid-ends',
    'image-domain-beyond',
  ] as const);
  const across = { coronal: [380, 420], axial: [260, 300], sagittal: [260, 300] }[base.plane] as [
    number,
    number,
  ];
  const fovPhaseMm = whole(across[0], across[1]);
  return typicalCase({
    patient: typicalPatient({
      extents: extentsOf({
        right: whole(180, 250),
        left: whole(180, 250),
        anterior: whole(140, 180),
        posterior: whole(140, 180),
      }),
      arms: {
        position: pick(['up', 'down', 'cannot-be-raised'] as const),
        breadthMm: 90,
        depthMm: 100,
        gapMm: whole(0, 30),
      },
      breathHoldS: { value: whole(12, 24), source: 'measured', spread: 0 },
    }),
    prescription: {
      ...base,
      fovPhaseMm,
      averages: family === 'echo-planar' ? 1 : pick([1, 2, 3]),
      centreMm: [whole(-10, 10), whole(-10, 10), 0],
      acceleration: base.acceleration.factorPhase > 1 ? accelerated(2, { unfolding }) : base.acceleration,
      slices:
        base.slices.mode === 'slab'
          ? slabOf({
              partitions: 40,
              acquiredPartitions: 40,
              partitionThicknessMm: whole(3, 5),
              timeBandwidthProduct: pick([4, 8, 12]),
            })
          : base.slices,
    },
    keepClear: {
      area: {
        kind: 'box',
        box: {
          xMm: [-whole(100, 190), whole(40, 120)],
          yMm: [-whole(80, 125), whole(60, 110)],
          zMm: [-whole(20, 60), whole(20, 60)],
        },
      },
      followsWindow: false,
    },
    scanner: typicalScanner({
      lineStep: pick(STEPS),
      partitionStep: pick([1, 2, 4]),
      phaseFovMayExceedReadoutFov: pick([true, false]),
    }),
    policy: typicalPolicy({
      marginMm: pick([DEFAULT_POLICY.marginMm, { ...DEFAULT_POLICY.marginMm, anterior: 0, posterior: 0 }]),
    }),
  });
}
