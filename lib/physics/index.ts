/** The public doors of the engine: everything outside lib/physics imports from here or from lib/physics/model. */
export { assess } from './assess/assess';
export { ENGINE_VERSION } from './assess/engine-version';
export { rankRemedies, type RankFilters } from './remedy/rank-remedies';
