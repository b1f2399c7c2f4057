import { CompiledQuery } from 'kysely';
import PgBoss from 'pg-boss';
import type { SiteTransaction } from '@/db/client';
import { type JobPayload, QUEUES, type QueueName } from './queues';

// Never started: it only writes job rows, through the transaction it is handed.
let writer: PgBoss | undefined;

function jobWriter(): PgBoss {
  writer ??= new PgBoss({
    db: { executeSql: () => Promise.reject(new Error('A job is enqueued in the transaction of its change.')) },
    supervise: false,
    schedule: false,
  });
  return writer;
}

/** Adds a job in the transaction of the change that asks for it: both are there afterwards, or neither. */
export async function enqueue<Name extends QueueName>(
  trx: SiteTransaction,
  name: Name,
  payload: JobPayload<Name>,
): Promise<void> {
  const data = QUEUES[name].parse(payload);
  await jobWriter().send(name, data, {
    db: {
      executeSql: async (text: string, values: unknown[]) => {
        const { rows } = await trx.executeQuery(CompiledQuery.raw(text, values));
        return { rows: rows as unknown[] };
      },
    },
    retryLimit: 5,
    retryBackoff: true,
    expireInMinutes: 5,
  });
}
