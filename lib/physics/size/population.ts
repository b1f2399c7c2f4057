import { normalQuantile } from '../certainty/normal';
import { requireRange } from '../model/require-argument';
import { eitherSex } from './either-sex';
import type { Estimate, Sex } from './size-types';

export type PopulationMeasure = 'depth' | 'girth';

interface Percentiles {
  readonly p50: number;
  readonly p95: number;
  readonly p99: number;
}

/**
 * Percentiles of US adults ≥ 20, 2013–16, unweighted [cm]: supine sagittal abdominal diameter and waist girth.
 * Source: [nhanes-2013]; [kahn-2014] reports 31.2 cm for men's 95th percentile of depth as well.
 */
export const POPULATION_CM: Readonly<Record<PopulationMeasure, Readonly<Record<Sex, Percentiles>>>> = {
  depth: { male: { p50: 22.9, p95: 31.2, p99: 35.7 }, female: { p50: 21.6, p95: 30.4, p99: 34.7 } },
  girth: { male: { p50: 101.0, p95: 130.9, p99: 149.5 }, female: { p50: 96.0, p95: 129.9, p99: 146.4 } },
};

/**
 * Size that a share p of adults does not exceed: straight between the tabulated percentiles in the normal deviate of p.
 * @param p 0.5–0.99 (the table's ends)
 * @returns [mm]
 * @throws DomainError "percentile-out-of-range"
 */
export function populationPercentileMm(measure: PopulationMeasure, sex: Sex, p: number): number {
  requireRange('percentile-out-of-range', 'p', p, 0.5, 0.99);
  const { p50, p95, p99 } = POPULATION_CM[measure][sex];
  const z = normalQuantile(p);
  const z95 = normalQuantile(0.95);
  const z99 = normalQuantile(0.99);
  const cm = z <= z95 ? p50 + ((p95 - p50) * z) / z95 : p95 + ((p99 - p95) * (z - z95)) / (z99 - z95);
  return 10 * cm;
}

/**
 * What is known of a person of whom nothing is known: the median, with the spread of the larger half
 * ((p95 − p50)/1.645), because it is the larger sizes that fold.
 * @returns mm
 */
export function populationEstimate(measure: PopulationMeasure, sex?: Sex): Estimate {
  const { value, spread } = eitherSex(sex, (one) => {
    const { p50, p95 } = POPULATION_CM[measure][one];
    return { value: 10 * p50, spread: (10 * (p95 - p50)) / normalQuantile(0.95) };
  });
  return {
    value,
    spread,
    source: 'population',
    words: `median of adults${sex ? ` (${sex === 'male' ? 'men' : 'women'})` : ''}, not of this patient`,
    extrapolated: false,
    cautions: ['Nothing about this patient went into it: measure before relying on it.'],
  };
}
