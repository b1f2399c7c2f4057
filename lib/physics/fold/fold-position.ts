import { DomainError } from '../model/domain-error';

/**
 * Where tissue at p is seen: fold(p) = c + ((p − c + W/2) mod W) − W/2. Shifted by whole acquired widths to the
 * opposite side, never mirrored.
 * @param pMm       true position along phase [mm]
 * @param centreMm  FOV centre c [mm]
 * @param widthMm   acquired width W [mm], > 0
 * @returns position within [c − W/2, c + W/2) [mm]; displayed when |fold − c| < F/2
 * @throws DomainError "acquired-width-not-positive"
 * Valid for Cartesian sampling. Source: [bernstein-2004], [graves-2013].
 */
export function foldPosition(pMm: number, centreMm: number, widthMm: number): number {
  if (!(widthMm > 0)) throw new DomainError('acquired-width-not-positive', 'widthMm', widthMm, '> 0 mm');
  const shifted = pMm - centreMm + widthMm / 2;
  return centreMm + (shifted - Math.floor(shifted / widthMm) * widthMm) - widthMm / 2;
}

/** Order n = (fold(p) − p)/W of the fold: 0 where tissue is seen in its place, −1 when it moved by one W to smaller p. */
export function foldOrder(pMm: number, centreMm: number, widthMm: number): number {
  return Math.round((foldPosition(pMm, centreMm, widthMm) - pMm) / widthMm) + 0;
}
