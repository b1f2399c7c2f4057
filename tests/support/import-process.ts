/**
 * Stages and commits an import in a process of its own, which a test can kill: reads what to do as JSON from its
 * argument. Run with DATABASE_URL of the test's database.
 */
import type { UserActor } from '@/lib/domain/access';
import type { ImportRow } from '@/lib/domain/import';
import { closeDatabase } from '@/db/client';
import { commitImport } from '@/lib/services/import/commit-import';
import { stageRows } from '@/lib/services/import/stage-rows';
import { startImport } from '@/lib/services/import/start-import';

export interface ImportTask {
  readonly actor: UserActor;
  readonly importId: string;
  readonly pieces: readonly (readonly ImportRow[])[];
  /** Absent: it is only staged. */
  readonly expectedRows?: number;
}

const { actor, importId, pieces, expectedRows } = JSON.parse(process.argv[2] ?? '{}') as ImportTask;
await startImport({ actor }, { id: importId, format: 'csv' });
for (const rows of pieces) await stageRows({ actor }, { importId, rows });
if (expectedRows !== undefined) await commitImport({ actor }, { importId, expectedRows });
await closeDatabase();
