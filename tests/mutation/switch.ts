/**
 * What instrumented physics calls instead of its operators: each call knows the numbers of the mutants of its place and
 * plays the one that is switched on. Nothing is switched while it runs: every mutant gets a fresh evaluation of the code.
 */
export interface MutationControl {
  /** Number of the mutant to play; -1 for none. */
  active: number;
  /** Filled with the numbers of the mutants whose place was reached, where that is wanted. */
  hits: Uint8Array | undefined;
}

const control = (globalThis as { mutationControl?: MutationControl }).mutationControl ?? {
  active: -1,
  hits: undefined,
};
const { active, hits } = control;

function on(id: number): boolean {
  if (hits !== undefined) hits[id] = 1;
  return active === id;
}

type Call = (...given: never[]) => unknown;

export const add = (id: number, a: number, b: number): number => (on(id) ? a - b : a + b);
export const subtract = (id: number, a: number, b: number): number => (on(id) ? a + b : a - b);
export const multiply = (id: number, a: number, b: number): number => (on(id) ? a / b : a * b);
export const divide = (id: number, a: number, b: number): number => (on(id) ? a * b : a / b);
export const remainder = (id: number, a: number, b: number): number => (on(id) ? a * b : a % b);

export const less = (id: number, a: number, b: number): boolean =>
  on(id) ? a <= b : on(id + 1) ? a >= b : a < b;
export const lessOrEqual = (id: number, a: number, b: number): boolean =>
  on(id) ? a < b : on(id + 1) ? a > b : a <= b;
export const greater = (id: number, a: number, b: number): boolean =>
  on(id) ? a >= b : on(id + 1) ? a <= b : a > b;
export const greaterOrEqual = (id: number, a: number, b: number): boolean =>
  on(id) ? a > b : on(id + 1) ? a < b : a >= b;
export const same = (id: number, a: unknown, b: unknown): boolean => (on(id) ? a !== b : a === b);
export const different = (id: number, a: unknown, b: unknown): boolean => (on(id) ? a === b : a !== b);

export const and = (id: number, a: unknown, b: () => unknown): unknown => (on(id) ? a || b() : a && b());
export const or = (id: number, a: unknown, b: () => unknown): unknown => (on(id) ? a && b() : a || b());
export const not = (id: number, a: unknown): boolean => (on(id) ? Boolean(a) : !a);
export const negative = (id: number, a: number): number => (on(id) ? a : -a);

/** A constant and what stands in its place. */
export const constant = (id: number, value: number, other: number): number => (on(id) ? other : value);
/** A function and the one called in its place. */
export const either = (id: number, call: Call, other: Call): Call => (on(id) ? other : call);
