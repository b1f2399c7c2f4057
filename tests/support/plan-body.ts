import { randomUUID } from 'node:crypto';
import type { BenchView } from '@/lib/schemas/booking';
import type { SavePlanBody } from '@/lib/schemas/plan';

/** A bench as it opened, as the request that saves it. */
export function planBody(
  bench: BenchView,
  change: { readonly id?: string; readonly expectedVersion?: number; readonly key?: string; readonly plan?: Partial<SavePlanBody['plan']> } = {},
) {
  const plan = {
    bookingId: bench.booking.id,
    scannerId: bench.scanner.id,
    scannerVersion: bench.scanner.version,
    protocolId: bench.protocol.id,
    protocolVersion: bench.protocol.version,
    policyVersion: bench.policy.version,
    patient: bench.sizeRecord.patient,
    keepClear: bench.protocol.keepClear,
    sequences: bench.protocol.sequences.map(({ id, prescription }) => ({ id, prescription, adopted: [] })),
    note: '',
    ...change.plan,
  };
  return {
    id: change.id ?? randomUUID(),
    idempotencyKey: change.key ?? randomUUID(),
    body: { expectedVersion: change.expectedVersion ?? 0, plan },
  };
}
