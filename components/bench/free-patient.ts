import type { BodyRegion, Patient, Reading } from '@/lib/physics/model/patient';

/** A stand-in for a size nobody has given yet; dotted on the bench until it is typed over. */
function assumed(value: number, spread: number): Reading {
  return { value, source: 'policy-default', spread };
}

/**
 * A body to begin with on a bench without a booking: an adult of large habitus (an invented starting point, not a
 * statistic). Every value says that it was assumed.
 */
export function assumedPatient(region: BodyRegion): Patient {
  return {
    region,
    extents: {
      right: assumed(230, 10),
      left: assumed(230, 10),
      anterior: assumed(160, 10),
      posterior: assumed(160, 10),
      superior: assumed(250, 10),
      inferior: assumed(250, 10),
    },
    arms: { position: 'down', breadthMm: 95, depthMm: 105, gapMm: 10 },
    breathHoldS: assumed(18, 3),
    breathPeriodS: assumed(4, 0.5),
    weightKg: assumed(130, 10),
    position: 'head-first-supine',
    lateralOffsetMm: 0,
    isocentreZMm: 0,
  };
}
