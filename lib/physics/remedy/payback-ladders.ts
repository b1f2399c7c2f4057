/** The values people choose from when they buy time back; steps between them are what a site prices. */
export const ACCELERATION_LADDER = [1, 1.5, 2, 2.5, 3, 3.5, 4, 5, 6] as const;
export const PARTIAL_FOURIER_LADDER = [1, 0.875, 0.75, 0.625] as const;

/** Steps of the ladder climbed from `before` to `after`; 0 when acceleration does not grow. */
export const accelerationSteps = (before: number, after: number): number =>
  ACCELERATION_LADDER.filter((factor) => factor > before && factor <= after).length;

/** Steps of the ladder descended from `before` to `after`; 0 when the fraction does not fall. */
export const partialFourierSteps = (before: number, after: number): number =>
  PARTIAL_FOURIER_LADDER.filter((fraction) => fraction < before && fraction >= after).length;
