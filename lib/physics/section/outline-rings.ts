import type { SectionFrame } from '../geometry/section-frame';
import { toPatient } from '../geometry/section-frame';
import type { PartShape } from '../model/patient';
import type { SectionRing } from './section-drawing';

const ACROSS = { x: [1, 2], y: [0, 2], z: [0, 1] } as const;
const ALONG = { x: 0, y: 1, z: 2 } as const;

/**
 * Rings of an uploaded outline as a section across its axis shows them, without the seams the solver's pieces have.
 * @returns undefined when the shape is no outline, the plane runs along its axis, or an end of it cuts the section
 */
export function outlineRings(
  shape: PartShape,
  frame: SectionFrame,
  reach: { readonly isocentreZMm: number; readonly tissueReachMm: number },
): SectionRing[] | undefined {
  if (shape.type !== 'outline-prism') return undefined;
  const [u, v] = ACROSS[shape.along];
  const { readout, phase, slice, sliceMm } = frame;
  const determinant = readout[u] * phase[v] - phase[u] * readout[v];
  // Under a hundredth the plane runs almost along the outline's axis, and the rings stretch a hundredfold.
  if (Math.abs(determinant) < 0.01) return undefined;
  const axis = ALONG[shape.along];
  const from = Math.max(
    shape.fromMm ?? -Infinity,
    axis === 2 ? reach.isocentreZMm - reach.tissueReachMm : -Infinity,
  );
  const to = Math.min(
    shape.toMm ?? Infinity,
    axis === 2 ? reach.isocentreZMm + reach.tissueReachMm : Infinity,
  );
  let missed = 0;
  let points = 0;
  const rings = shape.rings.map((ring) =>
    ring.map(([outlineU, outlineV]) => {
      const du = outlineU - slice[u] * sliceMm;
      const dv = outlineV - slice[v] * sliceMm;
      const r = (du * phase[v] - dv * phase[u]) / determinant;
      const p = (readout[u] * dv - readout[v] * du) / determinant;
      const at = toPatient(frame, r, p);
      points++;
      if (at[axis] <= from || at[axis] >= to || Math.abs(at[2] - reach.isocentreZMm) >= reach.tissueReachMm)
        missed++;
      return [r, p] as const;
    }),
  );
  if (missed === 0) return rings;
  return missed === points && Math.abs(readout[axis]) + Math.abs(phase[axis]) < 1e-9 ? [] : undefined;
}
