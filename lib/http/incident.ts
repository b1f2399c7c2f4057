import { randomUUID } from 'node:crypto';

/** Facts of an error that carry no values: a database's `detail` quotes the row and is left out. */
function describe(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { thrown: typeof error };
  const { code, constraint, table, routine } = error as Error & Record<string, unknown>;
  return { name: error.name, message: error.message, code, constraint, table, routine, stack: error.stack };
}

/**
 * Logs an unexpected error as one JSON line and returns the number a person can quote.
 * Nothing of the error itself reaches the caller.
 */
export function recordIncident(error: unknown, where: string): string {
  const incidentId = randomUUID();
  const cause = error instanceof Error && error.cause !== undefined ? describe(error.cause) : undefined;
  console.error(
    JSON.stringify({ level: 'error', at: new Date().toISOString(), incidentId, where, error: describe(error), cause }),
  );
  return incidentId;
}
