import { requireRange } from '../model/require-argument';

/**
 * BMI = W/H².
 * @param weightKg 20–450; heightCm 80–250 (people, with room; a slip of a unit falls outside)
 * @returns [kg/m²]
 * @throws DomainError "weight-out-of-range", "height-out-of-range"
 */
export function bodyMassIndex(weightKg: number, heightCm: number): number {
  requireRange('weight-out-of-range', 'weightKg', weightKg, 20, 450);
  requireRange('height-out-of-range', 'heightCm', heightCm, 80, 250);
  return weightKg / (heightCm / 100) ** 2;
}
