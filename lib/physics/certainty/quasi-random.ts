import { DomainError } from '../model/domain-error';

const PRIMES = [2, 3, 5, 7, 11, 13] as const;

/** Radical inverse of n in a prime base: the digits of n mirrored about the point, in (0, 1) for n ≥ 1. */
export function radicalInverse(n: number, base: number): number {
  let rest = n;
  let scale = 1 / base;
  let sum = 0;
  while (rest > 0) {
    sum += (rest % base) * scale;
    rest = Math.floor(rest / base);
    scale /= base;
  }
  return sum;
}

/**
 * Halton points in the open unit cube: the same on every machine and every run, no seed to keep.
 * The first 20 points are left out: in bases 11 and 13 they still lie on one diagonal.
 * @param dimensions 1 to 6
 * @throws DomainError "dimensions-out-of-range"
 * Source: [halton-1960], from memory.
 */
export function haltonPoints(count: number, dimensions: number): readonly (readonly number[])[] {
  if (!Number.isInteger(dimensions) || dimensions < 1 || dimensions > PRIMES.length) {
    throw new DomainError('dimensions-out-of-range', 'dimensions', dimensions, `1 to ${PRIMES.length}`);
  }
  const bases = PRIMES.slice(0, dimensions);
  return Array.from({ length: count }, (_, index) => bases.map((base) => radicalInverse(index + 21, base)));
}
