export interface EquivalentMutant {
  readonly file: string;
  readonly code: string;
  readonly mutated: string;
  readonly reason: string;
}

/** Mutants that change no answer, with the reason: no test can tell them from the code. Matched by file and text. */
export const EQUIVALENT: readonly EquivalentMutant[] = [];
