import PgBoss from 'pg-boss';
import { QUEUE_NAMES } from './queues';

/** Creates the queue tables and the queues: needs the owner, since each queue is a partition. */
export async function createQueues(ownerUrl: string): Promise<void> {
  const boss = new PgBoss({ connectionString: ownerUrl, max: 2, supervise: false, schedule: false });
  boss.on('error', () => {});
  await boss.start();
  try {
    for (const name of QUEUE_NAMES) await boss.createQueue(name);
  } finally {
    await boss.stop({ graceful: false });
  }
}
