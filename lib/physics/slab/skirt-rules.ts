import { DomainError } from '../model/domain-error';

/*
 * Rules of thumb for the skirt beyond each nominal edge, as a share of the slab. Shown beside the simulated profile so
 * that people can carry them in their heads; nothing here decides anything.
 */

/** k of skirt ≈ k/TBW for one pulse at 10°, by threshold in percent of plateau. Source: fixtures/published/slab-profile. */
export const SINGLE_PULSE_SKIRT_RULE: Readonly<Record<1 | 2 | 5 | 10, number>> = {
  1: 1.48,
  2: 1.36,
  5: 1.14,
  10: 0.91,
};

/** k for a spoiled 3D gradient echo at 10–15°, 5 % of plateau. Source: fixtures/published/slab-profile. */
export const SPOILED_SKIRT_RULE_5_PCT = 1.55;

/** Full transition of a minimax pulse, D∞(1 %, 1 %), and how much wider a Hamming sinc's is. Source: [pauly-1991]. */
export const HAMMING_SINC_TRANSITION_RATIO = 1.5;

/**
 * D∞(δ1, δ2) of the equiripple filter, which a minimax slab pulse's full transition width follows: width/slab = D∞/TBW.
 * A polynomial in log10 δ1 times log10 δ2 with the published coefficients; D∞(0.01, 0.01) = 1.944.
 * @param passbandRipple δ1, stopbandRipple δ2: 1e-5 … 0.1 of plateau
 * @returns [1]
 * @throws DomainError "ripple-out-of-range"
 * Source: [pauly-1991] (coefficients from memory; the value at 1 % is the check).
 */
export function transitionProduct(passbandRipple: number, stopbandRipple: number): number {
  for (const [argument, ripple] of [
    ['passbandRipple', passbandRipple],
    ['stopbandRipple', stopbandRipple],
  ] as const) {
    if (!(ripple >= 1e-5 && ripple <= 0.1))
      throw new DomainError('ripple-out-of-range', argument, ripple, '0.00001 to 0.1');
  }
  const l1 = Math.log10(passbandRipple);
  const l2 = Math.log10(stopbandRipple);
  return (
    (5.309e-3 * l1 * l1 + 7.114e-2 * l1 - 4.761e-1) * l2 + (-2.66e-3 * l1 * l1 - 5.941e-1 * l1 - 4.278e-1)
  );
}
