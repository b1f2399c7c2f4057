import { DomainError } from '../model/domain-error';
import { FAT_WATER_SHIFT_PPM, PROTON_GYROMAGNETIC_RATIO_MHZ_PER_T } from './proton';

/**
 * Proton resonance frequency f = (γ/2π)·B0.
 * @param fieldStrengthT B0 [T], > 0
 * @returns [MHz]; 63.87 at 1.5 T, 127.73 at 3 T
 * @throws DomainError "field-strength-not-positive"
 * Source: [codata-2018], from memory.
 */
export function larmorFrequencyMhz(fieldStrengthT: number): number {
  if (!(fieldStrengthT > 0) || !Number.isFinite(fieldStrengthT)) {
    throw new DomainError(
      'field-strength-not-positive',
      'fieldStrengthT',
      fieldStrengthT,
      'a number above 0 T',
    );
  }
  return PROTON_GYROMAGNETIC_RATIO_MHZ_PER_T * fieldStrengthT;
}

/**
 * Frequency by which fat resonates below water: Δf = 3.5 ppm · f.
 * @param fieldStrengthT B0 [T], > 0
 * @returns [Hz] > 0; 223.5 at 1.5 T, 447.1 at 3 T
 * @throws DomainError "field-strength-not-positive"
 * Valid: the main methylene peak; fat's other peaks are not modelled. Source: [bernstein-2004], from memory.
 */
export function fatWaterShiftHz(fieldStrengthT: number): number {
  return FAT_WATER_SHIFT_PPM * larmorFrequencyMhz(fieldStrengthT);
}
