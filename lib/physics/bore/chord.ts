import { requireRange } from '../model/require-argument';

/**
 * Width of a bore at a height below its centre: 2·√(R² − h²).
 * @param diameterMm 2R [mm], 300–1500; belowCentreMm h [mm], 0 to R
 * @returns [mm]; 494 in a 600 mm bore and 612 in a 700 mm bore at 170 mm
 * @throws DomainError "bore-out-of-range", "height-out-of-range"
 */
export function chordMm(diameterMm: number, belowCentreMm: number): number {
  requireRange('bore-out-of-range', 'diameterMm', diameterMm, 300, 1500);
  requireRange('height-out-of-range', 'belowCentreMm', belowCentreMm, 0, diameterMm / 2);
  return 2 * Math.sqrt((diameterMm / 2) ** 2 - belowCentreMm ** 2);
}
