import { existsSync } from 'node:fs';
import { chmod, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { vi } from 'vitest';
import { closeDatabase } from '@/db/client';
import { type Cluster, ensureDatabase, startCluster } from '@/db/local';
import { prepareDatabase } from '@/lib/ops/prepare-database';
import { closeOwnerDatabase } from './owner-database';
import { PREFIX, SECRETS } from './throw-away-cluster';

/** A database server of a test's own, which it may kill. */
export interface KillableCluster {
  /** Kills the server outright: whatever is connected is cut off in the middle of what it does. */
  kill(): Promise<void>;
  /** Starts it on the same data; it recovers by itself. */
  start(): Promise<void>;
  stop(): Promise<void>;
}

const DATABASE = 'selvedge';

async function childrenOf(pid: number): Promise<number[]> {
  const text = await readFile(`/proc/${pid}/task/${pid}/children`, 'utf8');
  return text.trim().split(' ').filter(Boolean).map(Number);
}

/** Turns this test file to a server of its own. Unlike other test servers this one writes to the disk as a real one does. */
export async function useKillableCluster(): Promise<KillableCluster> {
  const folder = await mkdtemp(path.join(os.tmpdir(), PREFIX));
  await writeFile(path.join(folder, 'owner.pid'), String(process.pid));
  await chmod(folder, 0o755);
  let cluster: Cluster = await startCluster({ dataDir: folder, secrets: SECRETS });
  const { port } = cluster;
  const start = async () => {
    cluster = await startCluster({ dataDir: folder, secrets: SECRETS, port });
    if (cluster.port !== port) throw new Error(`The server came back on port ${cluster.port} instead of ${port}.`);
  };
  const kill = async () => {
    const pid = Number((await readFile(path.join(folder, 'postgres/postmaster.pid'), 'utf8')).split('\n')[0]);
    const servants = await childrenOf(pid);
    process.kill(pid, 'SIGKILL');
    // Its servants see that it is gone and end by themselves; until then they hold its memory and port.
    await vi.waitUntil(() => [pid, ...servants].every((each) => !existsSync(`/proc/${each}`)), { timeout: 30_000, interval: 10 });
  };
  await ensureDatabase(cluster, DATABASE);
  await prepareDatabase(cluster.url('owner', DATABASE));
  await closeDatabase();
  await closeOwnerDatabase();
  process.env.DATABASE_URL = cluster.url('app', DATABASE);
  process.env.MIGRATION_DATABASE_URL = cluster.url('owner', DATABASE);
  return {
    kill,
    start,
    stop: async () => {
      await closeDatabase();
      await closeOwnerDatabase();
      await cluster.stop();
      await rm(folder, { recursive: true, force: true });
    },
  };
}
