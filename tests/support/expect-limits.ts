import { expect } from 'vitest';
import { DomainError } from '@/lib/physics/model/domain-error';

/**
 * An argument is accepted at both ends of its range and refused with `code` just outside (a millionth of the range, or of
 * the end itself) and when it is not a number.
 */
export function expectLimits(act: (value: number) => unknown, code: string, low: number, high: number): void {
  const step = Math.max(high - low, Math.abs(high)) * 1e-6;
  for (const value of [low, high]) expect(() => act(value), `${code} at ${value}`).not.toThrow();
  for (const value of [low - step, high + step, Number.NaN]) {
    expect(() => act(value), `${code} at ${value}`).toThrow(DomainError);
    expect(() => act(value), `${code} at ${value}`).toThrow(expect.objectContaining({ code }));
  }
}
