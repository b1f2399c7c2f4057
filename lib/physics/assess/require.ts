import { DomainError } from '../model/domain-error';

/** Throws a DomainError naming the argument unless low ≤ value ≤ high and value is finite. */
export function requireBetween(
  argument: string,
  value: number,
  low: number,
  high: number,
  unit: string,
): void {
  if (!Number.isFinite(value) || value < low || value > high) {
    throw new DomainError(
      'out-of-range',
      argument,
      value,
      `${low} to ${high}${unit === '' ? '' : ` ${unit}`}`,
    );
  }
}

export function requireWhole(argument: string, value: number, low: number, high: number): void {
  if (!Number.isInteger(value) || value < low || value > high) {
    throw new DomainError('not-whole', argument, value, `a whole number from ${low} to ${high}`);
  }
}

export function requireOneOf(argument: string, value: unknown, allowed: readonly string[]): void {
  if (typeof value !== 'string' || !allowed.includes(value)) {
    throw new DomainError('not-allowed', argument, value, allowed.join(', '));
  }
}

export function requireThat(
  holds: boolean,
  code: string,
  argument: string,
  given: unknown,
  allowed: string,
): void {
  if (!holds) throw new DomainError(code, argument, given, allowed);
}
