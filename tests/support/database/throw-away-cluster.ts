import { chmod, mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { type Cluster, ensureDatabase, startCluster } from '@/db/local';
import { prepareDatabase } from '@/lib/ops/prepare-database';

export const PREFIX = 'selvedge-test-';
/** Throw-away data behind passwords that everyone may read: nothing but invented rows ever gets there. */
export const SECRETS = { superuserPassword: 'test', ownerPassword: 'test', appPassword: 'test' };

export const TEMPLATE = 'selvedge_template';

function alive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

/** A run that was killed outright could not tidy up: its cluster is stopped and removed by the next one. */
async function removeAbandoned(): Promise<void> {
  for (const name of (await readdir(os.tmpdir())).filter((entry) => entry.startsWith(PREFIX))) {
    const folder = path.join(os.tmpdir(), name);
    const owner = Number(await readFile(path.join(folder, 'owner.pid'), 'utf8').catch(() => ''));
    if (!owner || alive(owner)) continue;
    const postmaster = await readFile(path.join(folder, 'postgres/postmaster.pid'), 'utf8').catch(() => '');
    const pid = Number(postmaster.split('\n')[0]);
    if (pid && alive(pid)) process.kill(pid, 'SIGQUIT');
    await rm(folder, { recursive: true, force: true });
  }
}

/** A cluster for one test run with a migrated template database in it; `stop` leaves nothing behind. */
export async function startThrowAwayCluster(): Promise<Cluster> {
  await removeAbandoned();
  const folder = await mkdtemp(path.join(os.tmpdir(), PREFIX));
  await writeFile(path.join(folder, 'owner.pid'), String(process.pid));
  // The postgres account must pass through; what is inside has its own locks.
  await chmod(folder, 0o755);
  const cluster = await startCluster({ dataDir: folder, secrets: SECRETS, throwAway: true });
  const stop = async () => {
    await cluster.stop();
    await rm(folder, { recursive: true, force: true });
  };
  try {
    await ensureDatabase(cluster, TEMPLATE);
    await prepareDatabase(cluster.url('owner', TEMPLATE));
  } catch (error) {
    await stop();
    throw error;
  }
  return { ...cluster, stop };
}
