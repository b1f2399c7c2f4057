import type { SitePolicy } from './policy';

/**
 * What a new site starts from; every value is site policy and editable.
 * Margins: breathing moves the front wall most (physics of the abdomen; common practice, no source).
 */
export const DEFAULT_POLICY: SitePolicy = {
  version: 1,
  marginMm: { anterior: 10, posterior: 3, right: 5, left: 5, superior: 10, inferior: 10 },
  tissueTolerance: 0.05,
  slabTolerance: 0.05,
  sureAt: 0.95,
  unknownTimeBandwidthProduct: 4,
  tissueT1Ms: { parenchyma: 800, fat: 300 },
  geometryFactorByOverlap: { '2': [1.0, 1.3], '3': [1.1, 1.8], '4': [1.3, 2.6] },
  strictBreathHold: false,
  tolerateFoldOutsidePct: 100,
  readingExpiryDays: 60,
  signOffAlways: false,
  weights: {
    timePct: 1,
    snrLostPct: 1.2,
    voxelPct: 1.4,
    breathHoldS: 12,
    extraBreathHold: 20,
    foldDisplayedPct: 1,
    foldKeepClearPct: 20,
    swap: { abdomen: 8, pelvis: 6, chest: 12, head: 3, shoulder: 8, hip: 4, knee: 3, breast: 15 },
    presaturationBand: 8,
    edit: 0.2,
    recentre: 1,
    armsUp: 6,
    reposition: 12,
    coilElements: 2,
    fewerAverages: 10,
    moreAcceleration: 6,
    partialFourier: 5,
    coverageMm: 1,
    trainPct: 0.2,
  },
};
