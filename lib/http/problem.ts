import { type ErrorCode, type ErrorView, ServiceError } from '@/lib/domain/errors';
import { toErrorView } from './error-view';

export const STATUS_OF: Readonly<Record<ErrorCode, number>> = {
  'bad-request': 400,
  unauthenticated: 401,
  'wrong-origin': 403,
  'not-found': 404,
  conflict: 409,
  gone: 410,
  'too-large': 413,
  'not-json': 415,
  invalid: 422,
  'too-many': 429,
  unavailable: 503,
  unexpected: 500,
};

/** RFC 9457 problem details. `fields`, `details` and `incidentId` are our extension members. */
export interface ProblemDetails extends Omit<ErrorView, 'message'> {
  readonly type: string;
  readonly title: string;
  readonly status: number;
}

export function problemOf(view: ErrorView): ProblemDetails {
  const { message, ...rest } = view;
  return { type: `urn:selvedge:problem:${view.code}`, title: message, status: STATUS_OF[view.code], ...rest };
}

/** The response for any thrown thing. */
export function problemResponse(error: unknown, where: string): Response {
  const problem = problemOf(toErrorView(error, where));
  const headers = new Headers({ 'content-type': 'application/problem+json', 'cache-control': 'no-store' });
  if (problem.status === 401) headers.set('www-authenticate', 'Bearer realm="selvedge"');
  if (error instanceof ServiceError && error.retryAfterSeconds !== undefined) {
    headers.set('retry-after', String(Math.max(1, Math.ceil(error.retryAfterSeconds))));
  }
  return new Response(JSON.stringify(problem), { status: problem.status, headers });
}
