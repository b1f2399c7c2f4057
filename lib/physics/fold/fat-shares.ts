import { fatWaterShiftHz } from '../constants/larmor';
import type { Prescription } from '../model/prescription';
import { epiDisplacementMm } from '../sequence/displacement';

/**
 * How far EPI displaces fat along phase, as shares κ of the acquired width, positive towards larger coordinates.
 *
 * Off resonance by Δf, tissue at p is sampled as if it lay at p + κW, κ = Δf·ESP/(R·shots), and only then folds: it is
 * seen at fold(p + κW) = p + (κ + n)·W. With p − (κ + n)·W' in place of p − n·W' everything of the fold rule holds: an
 * alias of order n reaches keep-clear exactly when −(n + κ)·W lies in the pair's open interval of displacements, so the
 * forbidden widths are that interval over |n + κ|. What is seen depends on κ only up to whole widths, so κ is taken
 * within ±½: then n = 0 is the copy nearest to its true place. That copy is displaced and is not called fold; every
 * n ≠ 0 has come in by the opposite side and is.
 *
 * Counted for all tissue of a part, at full brightness: the outermost tissue of every row is the rim of fat, which alone
 * sets both ends of the interval; fat between the organs makes the inside of it true as well. Fat suppression does not
 * take it away: it is tuned to the field inside the picture, and what folds lies outside.
 * @param fieldStrengthT [T] > 0
 * @returns [] where nothing is displaced (not EPI, or no echo spacing); one κ where the direction is known, else both
 * Valid: the main peak of fat, 3.5 ppm. Field errors of other origin displace water too and are not modelled. With
 * image-domain unfolding the coils see fat at its true place, so even what stays inside W can unfold imperfectly: only
 * what is displaced beyond the unfolding grid is counted as a ghost.
 * Source: displacement [bernstein-2004], from memory; the rest derived.
 */
export function fatShares(
  p: Pick<Prescription, 'family' | 'echoSpacingMs' | 'acceleration' | 'shots' | 'fatDisplacedTowards'>,
  fieldStrengthT: number,
): readonly number[] {
  if (p.family !== 'echo-planar' || !(p.echoSpacingMs > 0)) return [];
  const hz = fatWaterShiftHz(fieldStrengthT);
  const whole = epiDisplacementMm(hz, p.echoSpacingMs, 1, p.acceleration.factorPhase, p.shots);
  const share = whole - Math.round(whole);
  if (share === 0) return [];
  if (p.fatDisplacedTowards === undefined) return [share, -share];
  return [p.fatDisplacedTowards === 'high-end' ? share : -share];
}
