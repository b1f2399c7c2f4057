import { defaultMessage, type ErrorView, ServiceError } from '@/lib/domain/errors';
import { DomainError } from '@/lib/physics/model/domain-error';
import { recordIncident } from './incident';

/** The database is away or full: worth saying "try again", and worth a line in the log. */
const AWAY = new Set(['ECONNREFUSED', 'ECONNRESET', 'ETIMEDOUT', '57P01', '57P02', '57P03', '53300', '08006', '08001']);

function codeOf(error: unknown): string | undefined {
  const code = error instanceof Error ? (error as Error & { code?: unknown }).code : undefined;
  return typeof code === 'string' ? code : undefined;
}

/** What may be told of any thrown thing. Expected errors say what they are; all others only give an incident id. */
export function toErrorView(error: unknown, where: string): ErrorView {
  if (error instanceof ServiceError) {
    return {
      code: error.code,
      message: error.message,
      ...(error.fields ? { fields: error.fields } : {}),
      ...(error.details ? { details: error.details } : {}),
    };
  }
  if (error instanceof DomainError) {
    return { code: 'invalid', message: defaultMessage('invalid'), fields: { [error.argument]: error.message } };
  }
  const incidentId = recordIncident(error, where);
  const code = AWAY.has(codeOf(error) ?? '') ? 'unavailable' : 'unexpected';
  return { code, message: defaultMessage(code), incidentId };
}
