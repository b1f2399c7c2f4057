import type { Reading, ReadingSource } from '@/lib/physics/model/patient';

/** One standard deviation given to a length by how it was got, mm (our judgement, no source; each can be typed over). */
const LENGTH_SPREAD_MM: Readonly<Record<ReadingSource, number>> = {
  measured: 5,
  localiser: 3,
  reported: 15,
  'girth-and-depth': 12,
  girth: 15,
  'weight-and-height': 20,
  population: 35,
  'policy-default': 35,
};

/** A value put in by hand was not estimated any more: an edited estimate becomes a measurement of today. */
export function withValue(reading: Reading, value: number, today: string): Reading {
  const source: ReadingSource =
    reading.source === 'measured' || reading.source === 'localiser' || reading.source === 'reported'
      ? reading.source
      : 'measured';
  const spread = source === reading.source ? reading.spread : LENGTH_SPREAD_MM[source];
  return { value, source, takenOn: today, spread };
}

/** Saying how a value was got gives it that route's spread. */
export function withSource(reading: Reading, source: ReadingSource, today: string): Reading {
  return { ...reading, source, takenOn: reading.takenOn ?? today, spread: LENGTH_SPREAD_MM[source] };
}
