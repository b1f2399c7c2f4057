import type { Assumption } from '../model/assessment';
import type { Side } from '../model/axes';
import { SIDES } from '../model/axes';
import type { Case } from '../model/case';
import type { Reading, ReadingSource } from '../model/patient';
import { isAccelerated, unfoldingOf, withUnfolding } from './resolve-unfolding';
import { solveClass, type FrozenCase } from './geometry-class';
import { CAUTIOUS_B1_SCALE } from '../body/presaturated-weight';
import { fatShares } from '../fold/fat-shares';
import { acquiredWidthMmOf } from '../sequence/displacement';
import { figure } from './words';

const NOT_MEASURED: readonly ReadingSource[] = [
  'girth-and-depth',
  'girth',
  'weight-and-height',
  'population',
  'policy-default',
];

const SOURCE_WORDS: Readonly<Record<ReadingSource, string>> = {
  measured: 'measured',
  localiser: 'from the localiser',
  reported: 'reported',
  'girth-and-depth': 'worked out from girth and depth',
  girth: 'worked out from girth',
  'weight-and-height': 'estimated from weight and height',
  population: 'taken from the population',
  'policy-default': 'the site policy’s default',
};

function sizeAssumptions({ patient, policy }: Case): Assumption[] {
  if (patient.parts !== undefined) return [];
  const assumptions: Assumption[] = [];
  const sidesBySource = new Map<ReadingSource, Side[]>();
  for (const side of SIDES) {
    const { source } = patient.extents[side];
    if (NOT_MEASURED.includes(source))
      sidesBySource.set(source, [...(sidesBySource.get(source) ?? []), side]);
  }
  for (const [source, sides] of sidesBySource) {
    assumptions.push({
      field: 'patient.extents',
      used: source,
      text: `Size to the ${sides.join(', ')} is ${SOURCE_WORDS[source]}; a measured size would narrow the answer.`,
    });
  }
  if (policy.sureAt > 0.5 && SIDES.some((side) => patient.extents[side].spread > 0)) {
    const percent = figure(policy.sureAt * 100);
    assumptions.push({
      field: 'policy.sureAt',
      used: String(policy.sureAt),
      text: `Sizes are taken so that ${percent} % of such patients are not larger; the margin comes on top.`,
    });
  }
  return assumptions;
}

const fromPolicy = (field: string, name: string, reading: Reading, unit: string): Assumption[] =>
  reading.source !== 'policy-default'
    ? []
    : [
        {
          field,
          used: String(reading.value),
          text: `${name} is the site policy’s default, ${figure(reading.value)} ${unit}.`,
        },
      ];

/** Unknown unfolding: what was taken, and what the answer would be if the scanner unfolded in k-space. */
function unfoldingAssumption(given: FrozenCase): Assumption[] {
  if (!isAccelerated(given.prescription) || unfoldingOf(given) !== 'unknown') return [];
  const cautious = solveClass({
    ...given,
    prescription: withUnfolding(given, 'image-domain-grid-ends'),
  }).requirement();
  const plain = solveClass({
    ...given,
    prescription: withUnfolding(given, 'k-space-self-calibrating'),
  }).requirement();
  const difference =
    Math.abs(cautious.firstCleanMm - plain.firstCleanMm) < 0.05
      ? 'Knowing it would change nothing here.'
      : `That asks for ${figure(cautious.firstCleanMm)} mm; unfolding in k-space would need ${figure(plain.firstCleanMm)} mm.`;
  return [
    {
      field: 'prescription.acceleration.unfolding',
      used: 'image-domain-grid-ends',
      text: `How accelerated scans are unfolded here is unknown: taken in the image domain, with a grid that ends at the acquired width. ${difference}`,
    },
  ];
}

function slabAssumptions({ prescription: p, policy }: Case): Assumption[] {
  if (p.slices.mode !== 'slab' || !p.slices.selective) return [];
  const assumptions: Assumption[] = [];
  if (p.slices.timeBandwidthProduct === undefined) {
    assumptions.push({
      field: 'prescription.slices.timeBandwidthProduct',
      used: String(policy.unknownTimeBandwidthProduct),
      text:
        `The slab pulse’s sharpness is unknown: a time-bandwidth product of ${figure(policy.unknownTimeBandwidthProduct)} ` +
        `is taken. A sharper pulse would leave fewer end partitions contaminated; a phantom check tells.`,
    });
  }
  if (p.slices.pulseDurationMs === undefined) {
    assumptions.push({
      field: 'prescription.slices.pulseDurationMs',
      used: 'no shift',
      text: 'The slab pulse’s duration is unknown, so the shift of fat’s slab is not counted; it would ask for more at one end.',
    });
  }
  return assumptions;
}

/** Which way fat goes in EPI, and that suppression is not trusted outside the picture. */
function displacementAssumptions({ prescription: p, scanner }: Case): Assumption[] {
  const shares = fatShares(p, scanner.fieldStrengthT);
  if (shares.length === 0) return [];
  const mm = figure(Math.abs(shares[0]!) * acquiredWidthMmOf(p));
  const assumptions: Assumption[] = [];
  if (p.fatDisplacedTowards === undefined) {
    assumptions.push({
      field: 'prescription.fatDisplacedTowards',
      used: 'both ends',
      text: `Which way this EPI displaces fat is unknown: ${mm} mm to either end is taken. Knowing it would ask for less at one end.`,
    });
  }
  if (p.fatSuppressed) {
    assumptions.push({
      field: 'prescription.fatSuppressed',
      used: 'bright outside',
      text: 'Fat suppression is tuned inside the picture: the rim of fat that folds counts at full brightness.',
    });
  }
  return assumptions;
}

/** How true a band's flip is, where the site has not measured it. */
function presaturationAssumptions({ prescription: p, policy }: Case): Assumption[] {
  if (p.presaturation.length === 0 || policy.presaturationB1Scale !== undefined) return [];
  return [
    {
      field: 'policy.presaturationB1Scale',
      used: String(CAUTIOUS_B1_SCALE),
      text:
        `The true flip of presaturation bands is not measured here: ${figure(CAUTIOUS_B1_SCALE)} of nominal is taken. ` +
        'At the nominal flip a band would leave 3 % of fat’s signal instead of a third.',
    },
  ];
}

/**
 * Everything that stood in for something unknown, with what knowing it would change.
 * @param given sizes as recorded (not yet taken at the policy's certainty)
 */
export function assumptionsFor(given: FrozenCase): readonly Assumption[] {
  const { patient, prescription } = given;
  return [
    ...sizeAssumptions(given),
    ...(prescription.breathing === 'breath-hold'
      ? fromPolicy('patient.breathHoldS', 'Breath-hold', patient.breathHoldS, 's')
      : []),
    ...(prescription.breathing === 'triggered'
      ? fromPolicy('patient.breathPeriodS', 'Breath period', patient.breathPeriodS, 's')
      : []),
    ...(patient.weightKg === undefined
      ? [
          {
            field: 'patient.weightKg',
            used: 'unknown',
            text: 'Weight is unknown: the table load is not checked.',
          },
        ]
      : []),
    ...unfoldingAssumption(given),
    ...slabAssumptions(given),
    ...displacementAssumptions(given),
    ...presaturationAssumptions(given),
    {
      field: 'prescription.coil',
      used: 'every weight 1',
      text: 'Coil sensitivity is not known place by place: outlying tissue counts at full brightness.',
    },
  ];
}
