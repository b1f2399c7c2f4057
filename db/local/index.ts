export { type Cluster, type ClusterSecrets, ensureDatabase, startCluster } from './cluster';
export { LocalError } from './local-error';
export { freePort, portIsFree, portNear } from './ports';
