import path from 'node:path';
import { type Cluster, ensureDatabase, startCluster } from '@/db/local';
import { type LocalSecrets, localSecrets, rememberPorts, rememberedPorts } from './local-files';
import { prepareDatabase } from './prepare-database';

export const LOCAL_DATABASE = 'selvedge';

export interface LocalDatabase {
  readonly cluster: Cluster;
  readonly secrets: LocalSecrets;
  readonly ownerUrl: string;
  readonly appUrl: string;
}

/** Our own cluster, started, with the database in it migrated and its queues made. */
export async function startLocalDatabase(dataDir: string): Promise<LocalDatabase> {
  const secrets = await localSecrets(dataDir);
  const ports = await rememberedPorts(dataDir);
  const cluster = await startCluster({ dataDir, secrets, port: ports.postgres });
  try {
    if (cluster.port !== ports.postgres) await rememberPorts(dataDir, { ...ports, postgres: cluster.port });
    await ensureDatabase(cluster, LOCAL_DATABASE);
    const ownerUrl = cluster.url('owner', LOCAL_DATABASE);
    await prepareDatabase(ownerUrl);
    return { cluster, secrets, ownerUrl, appUrl: cluster.url('app', LOCAL_DATABASE) };
  } catch (error) {
    await cluster.stop();
    throw error;
  }
}

export const caughtMailFolder = (dataDir: string) => path.join(dataDir, 'mail');
