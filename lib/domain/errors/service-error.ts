/**
 * The errors a use-case may end in. Everything else that is thrown is unexpected: it is logged under an
 * incident id and the caller sees only that id.
 */
export const ERROR_CODES = [
  'bad-request',
  'unauthenticated',
  'wrong-origin',
  'not-found',
  'conflict',
  'gone',
  'too-large',
  'not-json',
  'invalid',
  'too-many',
  'unavailable',
  'unexpected',
] as const;
export type ErrorCode = (typeof ERROR_CODES)[number];

const MESSAGES: Readonly<Record<ErrorCode, string>> = {
  'bad-request': 'The request could not be read.',
  unauthenticated: 'Sign in first.',
  'wrong-origin': 'This request did not come from this site.',
  'not-found': 'There is nothing here, or it is not yours to see.',
  conflict: 'Someone else changed this in the meantime. Nothing was overwritten.',
  gone: 'This link has been used or has expired.',
  'too-large': 'More was sent than is accepted.',
  'not-json': 'Send JSON with the content type application/json.',
  invalid: 'Some values cannot be accepted.',
  'too-many': 'Too many attempts. Wait a little and try again.',
  unavailable: 'This cannot be done at the moment. Try again shortly.',
  unexpected: 'Something went wrong on our side.',
};

/** Path of the field in dotted form (`patient.girthMm`) → what is wrong, naming what was given and what is allowed. */
export type FieldErrors = Readonly<Record<string, string>>;

/** What callers outside the services see: an action's result, a problem document, a test. */
export interface ErrorView {
  readonly code: ErrorCode;
  readonly message: string;
  readonly fields?: FieldErrors;
  /** Facts the caller can act on, such as the present version after a conflict. */
  readonly details?: Readonly<Record<string, unknown>>;
  /** Present for `unexpected` only: the number under which it was logged. */
  readonly incidentId?: string;
}

export class ServiceError extends Error implements ErrorView {
  override readonly name = 'ServiceError';
  readonly code: ErrorCode;
  readonly fields?: FieldErrors;
  readonly details?: Readonly<Record<string, unknown>>;
  readonly retryAfterSeconds?: number;

  constructor(
    code: Exclude<ErrorCode, 'unexpected'>,
    options: {
      message?: string;
      fields?: FieldErrors;
      details?: Readonly<Record<string, unknown>>;
      retryAfterSeconds?: number;
      cause?: unknown;
    } = {},
  ) {
    super(options.message ?? MESSAGES[code], options.cause === undefined ? undefined : { cause: options.cause });
    this.code = code;
    if (options.fields) this.fields = options.fields;
    if (options.details) this.details = options.details;
    if (options.retryAfterSeconds !== undefined) this.retryAfterSeconds = options.retryAfterSeconds;
  }
}

export function defaultMessage(code: ErrorCode): string {
  return MESSAGES[code];
}

/** One field is wrong. */
export function invalidField(path: string, message: string): ServiceError {
  return new ServiceError('invalid', { fields: { [path]: message } });
}

/** The expected version is not the stored one any more. */
export function staleVersion(currentVersion: number): ServiceError {
  return new ServiceError('conflict', { details: { currentVersion } });
}
