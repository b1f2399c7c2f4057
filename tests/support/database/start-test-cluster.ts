import type { TestProject } from 'vitest/node';
import { startThrowAwayCluster } from './throw-away-cluster';

declare module 'vitest' {
  interface ProvidedContext {
    /** URLs of the run's cluster, ending before the database's name. */
    readonly clusterUrls: { readonly owner: string; readonly app: string; readonly superuser: string };
  }
}

/** Starts the run's cluster once, however many workers there are. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await startThrowAwayCluster();
  project.provide('clusterUrls', {
    owner: cluster.url('owner', ''),
    app: cluster.url('app', ''),
    superuser: cluster.url('superuser', ''),
  });
  return () => cluster.stop();
}
