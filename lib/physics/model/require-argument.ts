import { DomainError } from './domain-error';

/** Returns `value` when it is a finite number in [low, high]; throws DomainError `code` otherwise. */
export function requireRange(
  code: string,
  argument: string,
  value: number,
  low: number,
  high: number,
): number {
  if (!(value >= low && value <= high)) {
    throw new DomainError(code, argument, value, `${low} to ${high}`);
  }
  return value;
}

/** Returns `value` when it is finite and above 0. */
export function requirePositive(code: string, argument: string, value: number): number {
  if (!(value > 0) || !Number.isFinite(value))
    throw new DomainError(code, argument, value, 'a number above 0');
  return value;
}

/** Returns `value` when it is a whole number ≥ `low`. */
export function requireWhole(code: string, argument: string, value: number, low: number): number {
  if (!Number.isInteger(value) || value < low) {
    throw new DomainError(code, argument, value, `a whole number, ${low} or more`);
  }
  return value;
}

/**
 * ⌈x⌉ that takes a product such as 256 · 0.75, off by the last bits of a double, for the whole number it stands for.
 * 1e-9 is far above the rounding error of any product of counts here (≤ 1e7 · 2e-16) and far below one line.
 */
export function ceilCount(x: number): number {
  return Math.ceil(x - 1e-9);
}

/** ⌊x⌋ with the same guard. */
export function floorCount(x: number): number {
  return Math.floor(x + 1e-9);
}
