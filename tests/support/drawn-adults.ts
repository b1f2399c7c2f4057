/**
 * Adults drawn from the tables the engine itself rests on, as they truly are: what a booking knows of them is another
 * matter. NHANES 2013–16 (percentiles and regressions of lib/physics/size); what those do not hold is from memory and
 * marked so.
 */
import { normalQuantile } from '@/lib/physics/certainty/normal';
import { breadthFromGirthAndDepth } from '@/lib/physics/size/ellipse-perimeter';
import { POPULATION_CM } from '@/lib/physics/size/population';
import { DEPTH_FROM_GIRTH, DEPTH_FROM_GIRTH_BMI_35, linear, WEIGHT_HEIGHT_FROM_BMI } from '@/lib/physics/size/regressions';
import type { Sex } from '@/lib/physics/size/size-types';
import { seededNumbers } from './seeded-numbers';

export interface DrawnAdult {
  readonly sex: Sex;
  readonly weightKg: number;
  readonly heightCm: number;
  readonly bmi: number;
  /** At the iliac crest [cm]. */
  readonly girthCm: number;
  /** Supine, at the level of the liver [mm]. */
  readonly depthMm: number;
  readonly breadthMm: number;
  readonly breathHoldS: number;
}

/** Median and SD of the logarithm of BMI, mean and SD of height [cm], fifth percentile of girth [cm]; from memory of NHANES. */
const FROM_MEMORY = {
  male: { bmi: 28.2, bmiLogSd: 0.2, heightCm: 175.5, heightSd: 7.6, girthP5: 78 },
  female: { bmi: 28.4, bmiLogSd: 0.25, heightCm: 162, heightSd: 7.1, girthP5: 74 },
} as const;
/** How closely girth follows BMI; from memory. */
const GIRTH_BMI_CORRELATION = 0.92;
/** Longest breath-hold of outpatients, mean and SD [s]; from memory. */
const BREATH_HOLD_S = { mean: 20, sd: 5 } as const;

function girthAt(sex: Sex, z: number): number {
  const { p50, p95, p99 } = POPULATION_CM.girth[sex];
  const [z95, z99] = [normalQuantile(0.95), normalQuantile(0.99)];
  if (z < 0) return p50 + ((p50 - FROM_MEMORY[sex].girthP5) * z) / z95;
  return z <= z95 ? p50 + ((p95 - p50) * z) / z95 : p95 + ((p99 - p95) * (z - z95)) / (z99 - z95);
}

/** So many adults, half of them women; the same for the same seed. */
export function drawnAdults(count: number, seed: number): DrawnAdult[] {
  const uniform = seededNumbers(seed);
  // Beyond four SDs nothing is known of anybody.
  const normal = () => Math.max(-4, Math.min(4, normalQuantile(Math.min(1 - 1e-9, Math.max(1e-9, uniform())))));
  return Array.from({ length: count }, (_, i) => {
    const sex: Sex = i % 2 === 0 ? 'male' : 'female';
    const facts = FROM_MEMORY[sex];
    const z = normal();
    const bmiZ = GIRTH_BMI_CORRELATION * z + Math.sqrt(1 - GIRTH_BMI_CORRELATION ** 2) * normal();
    const bmi = Math.max(16, facts.bmi * Math.exp(facts.bmiLogSd * bmiZ));
    const heightCm = facts.heightCm + facts.heightSd * normal();
    const girthCm = Math.max(60, girthAt(sex, z));
    const line = (bmi >= WEIGHT_HEIGHT_FROM_BMI ? DEPTH_FROM_GIRTH_BMI_35 : DEPTH_FROM_GIRTH)[sex];
    const crestCm = linear(line, girthCm) + line.residualSd * normal();
    const breadthMm = breadthFromGirthAndDepth(10 * girthCm, 10 * crestCm, sex);
    return {
      sex,
      bmi,
      heightCm,
      weightKg: (bmi * heightCm * heightCm) / 10_000,
      girthCm,
      // The liver lies above the crest: 15 mm of spread between the two levels, as the engine takes it.
      depthMm: 10 * crestCm + 15 * normal(),
      breadthMm,
      breathHoldS: Math.max(8, BREATH_HOLD_S.mean + BREATH_HOLD_S.sd * normal()),
    };
  });
}
