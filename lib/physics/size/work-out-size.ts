import type { Side } from '../model/axes';
import type { Reading } from '../model/patient';
import { bodyMassIndex } from './body-mass-index';
import {
  breadthFromGirth,
  breadthFromMeasuredGirthAndDepth,
  breadthFromWeightAndHeight,
  depthFromGirth,
  depthFromWeightAndHeight,
  sizeNeeded,
  type TrunkLevel,
} from './estimate-trunk';
import { hipBreadthFromBmi, hipBreadthFromHipGirth } from './estimate-hips';
import { populationEstimate } from './population';
import { breadthFromPopulation } from './population-breadth';
import { isEstimate, type Estimate, type Sex, type SizeAnswer } from './size-types';

/** Whatever is known of a patient's size; lengths mm. */
export interface KnownSizes {
  readonly sex?: Sex;
  readonly weightKg?: Reading;
  readonly heightCm?: Reading;
  /** Waist girth at the iliac crest: that is where the tables measured it. */
  readonly girthMm?: Reading;
  readonly depthMm?: Reading;
  readonly breadthMm?: Reading;
  readonly hipGirthMm?: Reading;
  readonly hipBreadthMm?: Reading;
}

export interface WorkedOutSize {
  readonly depth: SizeAnswer;
  readonly breadth: SizeAnswer;
  readonly hipBreadth: SizeAnswer;
  /** [kg/m²]; absent without weight and height. */
  readonly bmi?: number;
}

export interface WorkOutOptions {
  readonly level: TrunkLevel;
  /** Fall back to the population when nothing else is known; otherwise the answer is that a size is needed. */
  readonly allowPopulation: boolean;
}

const ASK = 'Size needed: ask for the girth at the iliac crest, or measure breadth and depth.';

function asTaken(reading: Reading, what: string): Estimate {
  return {
    ...reading,
    words: `${what} as ${reading.source === 'reported' ? 'reported' : 'measured'}`,
    extrapolated: false,
    cautions: [],
  };
}

/**
 * Depth, breadth and hip breadth by the best route there is, in this order: the size itself; girth and depth (breadth);
 * girth; weight and height (BMI ≥ 35); the population, if allowed; otherwise "size needed".
 * @returns mm with spread and the words that say how each was got
 * @throws DomainError for a value outside what people measure
 */
export function workOutSize(known: KnownSizes, { level, allowPopulation }: WorkOutOptions): WorkedOutSize {
  const { sex, weightKg, heightCm, girthMm, depthMm, breadthMm, hipGirthMm, hipBreadthMm } = known;
  const both = weightKg && heightCm ? { weightKg, heightCm } : undefined;
  const bmi = both ? bodyMassIndex(both.weightKg.value, both.heightCm.value) : undefined;
  const fallBack = (answer: SizeAnswer | undefined, population: () => Estimate): SizeAnswer =>
    answer && isEstimate(answer) ? answer : allowPopulation ? population() : (answer ?? sizeNeeded(ASK));

  const depth = depthMm
    ? asTaken(depthMm, 'depth')
    : girthMm
      ? depthFromGirth(girthMm, sex, bmi, level)
      : fallBack(both && depthFromWeightAndHeight(both, sex, level), () => populationEstimate('depth', sex));

  const breadth = breadthMm
    ? asTaken(breadthMm, 'breadth')
    : girthMm && depthMm
      ? breadthFromMeasuredGirthAndDepth(girthMm, depthMm, sex, bmi)
      : girthMm
        ? breadthFromGirth(girthMm, sex, bmi)
        : fallBack(both && breadthFromWeightAndHeight(both, sex), () => breadthFromPopulation(sex));

  const hipBreadth = hipBreadthMm
    ? asTaken(hipBreadthMm, 'hip breadth')
    : hipGirthMm
      ? hipBreadthFromHipGirth(hipGirthMm, sex, bmi)
      : bmi === undefined
        ? sizeNeeded('Size needed: ask for the girth at the hips, or weight and height.')
        : hipBreadthFromBmi(bmi, sex);

  return { depth, breadth, hipBreadth, ...(bmi === undefined ? {} : { bmi }) };
}

/**
 * Extents each side of the FOV centre from breadth and depth, centred. Right and left share the breadth's one error,
 * anterior and posterior the depth's: each side's spread is half of it, and the two move together.
 * @returns mm a side, without superior and inferior, which no girth tells
 */
export function extentsFromTrunk(
  breadth: Reading,
  depth: Reading,
): Readonly<Record<Exclude<Side, 'superior' | 'inferior'>, Reading>> {
  const half = ({ value, spread, source, takenOn }: Reading): Reading => ({
    value: value / 2,
    spread: spread / 2,
    source,
    ...(takenOn === undefined ? {} : { takenOn }),
  });
  return { right: half(breadth), left: half(breadth), anterior: half(depth), posterior: half(depth) };
}
