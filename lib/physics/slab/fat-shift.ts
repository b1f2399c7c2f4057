import { DomainError } from '../model/domain-error';
import { fatWaterShiftHz } from '../constants/larmor';

/**
 * How far fat's slab sits from water's, as a share of the slab: |Δz|/S = Δf·T_rf/TBW.
 * @param fieldStrengthT [T] > 0; pulseDurationMs T_rf [ms] > 0; timeBandwidthProduct TBW > 0
 * @returns [1] > 0; TBW 8, 1 ms, 3 T: 0.056
 * @throws DomainError "pulse-duration-not-positive", "time-bandwidth-out-of-range", "field-strength-not-positive"
 * Valid: magnitude only; the side depends on the gradient's polarity. Source: [bernstein-2004], from memory.
 */
export function fatShiftShare(
  fieldStrengthT: number,
  pulseDurationMs: number,
  timeBandwidthProduct: number,
): number {
  if (!(pulseDurationMs > 0) || !Number.isFinite(pulseDurationMs)) {
    throw new DomainError(
      'pulse-duration-not-positive',
      'pulseDurationMs',
      pulseDurationMs,
      'a number above 0 ms',
    );
  }
  if (!(timeBandwidthProduct > 0) || !Number.isFinite(timeBandwidthProduct)) {
    throw new DomainError(
      'time-bandwidth-out-of-range',
      'timeBandwidthProduct',
      timeBandwidthProduct,
      'a number above 0',
    );
  }
  return (fatWaterShiftHz(fieldStrengthT) * (pulseDurationMs / 1000)) / timeBandwidthProduct;
}
