import type { AssessedPlan } from './assess-plan';

/** One JSON line for each save in which bench and server did not agree: a parity fault must not go unseen. */
export function logDifferences(planId: string, version: number, { result, engineVersion, inputHash }: AssessedPlan): void {
  if (result.differences.length === 0) return;
  const differences = result.differences.map(({ field, bench, server }) => ({ field, bench, server }));
  console.warn(JSON.stringify({ level: 'warn', event: 'plan-differs', planId, version, engineVersion, inputHash, differences }));
}
