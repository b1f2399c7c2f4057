/** The public doors of the engine: everything outside lib/physics imports from here or from lib/physics/model. */
export { assess } from './assess/assess';
export { ENGINE_VERSION } from './assess/engine-version';
export { roundAssessment } from './assess/round-assessment';
export { foldProbability, type FoldProbability } from './certainty/fold-probability';
export { sizesAt } from './certainty/sizes-at';
export { compareRemedies, rankRemedies, type RankFilters } from './remedy/rank-remedies';
export { drawSection } from './assess/draw-case';
export type { DrawSectionOptions } from './section/draw-section';
export { simulateImage, toGreyLevels, type ImageOptions, type SimulatedImage } from './image/simulate-image';
