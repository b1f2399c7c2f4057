import { DomainError } from '../model/domain-error';
import type { Reading, ReadingSource } from '../model/patient';
import { requireRange } from '../model/require-argument';
import { readingAge, type ExpiryRule } from './reading-age';

/** A reading and where its error comes from: readings worked out from one girth share one error. */
export interface OriginReading {
  readonly reading: Reading;
  /** Same origin, same error: "girth of 2 May"; every independent measurement has its own. */
  readonly origin: string;
}

export interface Conflict {
  readonly a: Reading;
  readonly b: Reading;
  /** Their distance in standard deviations of the difference. */
  readonly deviations: number;
}

export interface Combined {
  /** Absent when every reading is expired or undated. */
  readonly reading?: Reading;
  readonly used: readonly Reading[];
  readonly expired: readonly Reading[];
  readonly undated: readonly Reading[];
  readonly conflicts: readonly Conflict[];
  readonly words: string;
}

/** Two readings conflict beyond this many standard deviations of their difference (5 % of honest pairs). */
const CONFLICT_DEVIATIONS = 1.96;
/** A reading said to be exact still cannot be told apart below this [mm, kg or s]: keeps the weights finite. */
const LEAST_SPREAD = 0.5;

const STANDING: readonly ReadingSource[] = [
  'measured',
  'localiser',
  'reported',
  'girth-and-depth',
  'girth',
  'weight-and-height',
  'population',
  'policy-default',
];

function conflictsAmong(readings: readonly Reading[]): readonly Conflict[] {
  return readings.flatMap((a, i) =>
    readings.slice(i + 1).flatMap((b) => {
      const deviations =
        Math.abs(a.value - b.value) /
        Math.hypot(Math.max(a.spread, LEAST_SPREAD), Math.max(b.spread, LEAST_SPREAD));
      return deviations > CONFLICT_DEVIATIONS ? [{ a, b, deviations }] : [];
    }),
  );
}

/** One reading an origin: the one with the smallest spread; ties go to the better kind, then the later date. */
function bestOfEachOrigin(readings: readonly OriginReading[]): readonly Reading[] {
  const best = new Map<string, Reading>();
  const rank = (r: Reading): readonly [number, number, string] => [
    r.spread,
    STANDING.indexOf(r.source),
    r.takenOn ?? '',
  ];
  for (const { reading, origin } of readings) {
    const known = best.get(origin);
    if (!known) best.set(origin, reading);
    else {
      const [s, k, d] = rank(reading);
      const [s0, k0, d0] = rank(known);
      if (s < s0 || (s === s0 && (k < k0 || (k === k0 && d > d0)))) best.set(origin, reading);
    }
  }
  return [...best.values()];
}

/**
 * Several readings of one size as one: the mean weighted by 1/SD² of the current ones, one an origin. Where they scatter
 * more than their spreads allow, the spread is widened by √(χ²/(n − 1)) so that a conflict is carried, not averaged away;
 * conflicting pairs are listed to be shown. A population value or policy default is used only when nothing else is.
 * @param readings same quantity, same unit
 * @throws DomainError "no-readings", "spread-out-of-range", those of readingAge
 */
export function combineReadings(readings: readonly OriginReading[], rule: ExpiryRule): Combined {
  if (readings.length === 0) throw new DomainError('no-readings', 'readings', 0, 'at least one reading');
  for (const { reading } of readings) requireRange('spread-out-of-range', 'spread', reading.spread, 0, 1e6);
  const aged = (age: string): readonly OriginReading[] =>
    readings.filter(({ reading }) => readingAge(reading, rule) === age);
  const expired = aged('expired').map(({ reading }) => reading);
  const undated = aged('undated').map(({ reading }) => reading);
  const current = aged('current');
  const ofThisPatient = current.filter(
    ({ reading }) => reading.source !== 'population' && reading.source !== 'policy-default',
  );
  const used = bestOfEachOrigin(ofThisPatient.length > 0 ? ofThisPatient : current);
  const rest = { used, expired, undated, conflicts: conflictsAmong(used) };
  if (used.length === 0) return { ...rest, words: 'No current reading.' };
  if (used.length === 1) return { ...rest, reading: used[0]!, words: 'One reading.' };

  const weights = used.map(({ spread }) => 1 / Math.max(spread, LEAST_SPREAD) ** 2);
  const total = weights.reduce((sum, w) => sum + w, 0);
  const value = used.reduce((sum, r, i) => sum + weights[i]! * r.value, 0) / total;
  const chi2 = used.reduce((sum, r, i) => sum + weights[i]! * (r.value - value) ** 2, 0);
  const widening = Math.max(1, Math.sqrt(chi2 / (used.length - 1)));
  const heaviest = used.reduce((a, b) => (b.spread < a.spread ? b : a));
  const dates = used.map(({ takenOn }) => takenOn).filter((date) => date !== undefined);
  const reading: Reading = {
    value,
    spread: widening / Math.sqrt(total),
    source: heaviest.source,
    // What is combined is as old as its oldest part.
    ...(dates.length > 0 ? { takenOn: dates.reduce((a, b) => (a < b ? a : b)) } : {}),
  };
  const words = `Weighted mean of ${used.length} readings${rest.conflicts.length > 0 ? ', which disagree' : ''}.`;
  return { ...rest, reading, words };
}
