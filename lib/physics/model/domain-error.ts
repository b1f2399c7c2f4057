/** The only error physics throws: which argument, what was given, what is allowed. */
export class DomainError extends Error {
  override readonly name = 'DomainError';

  constructor(
    readonly code: string,
    readonly argument: string,
    readonly given: unknown,
    readonly allowed: string,
  ) {
    super(`${argument} is ${String(given)}; allowed: ${allowed}`);
  }
}
