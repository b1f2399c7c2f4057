import type { BodyRegion } from '@/lib/physics/model/patient';
import type { Plane } from '@/lib/physics/model/prescription';
import type { TissueDrawing } from '@/lib/physics/section/section-drawing';
import { HALF_LENGTH_MM, SKETCHES, type Organ } from './anatomy-sketches';
import { boundsOf } from './rings';
import type { AreaNode, Bounds, Ring } from './scene';

const POINTS = 48;

/** Organs sketched inside the outlines of the body's parts. The engine never sees them. */
export function anatomySketch(
  region: BodyRegion,
  plane: Plane,
  tissue: readonly Pick<TissueDrawing, 'name' | 'kind'>[],
  ringsOf: (index: number) => readonly Ring[],
): readonly AreaNode[] {
  const sketch = SKETCHES[region][plane];
  return tissue.flatMap((part, index) => {
    const organs = sketch[part.kind] ?? [];
    const rings = organs.length > 0 ? ringsOf(index) : [];
    const bounds = boundsOf(rings);
    if (!bounds) return [];
    return organs.flatMap((organ): AreaNode[] => {
      const ring = outlineOf(organ, bounds, plane === 'axial' ? Infinity : HALF_LENGTH_MM[region]);
      // Where a section narrows the part, an organ that would stick out of it is left away.
      if (!ring.every((point) => isInside(rings, point))) return [];
      return [{ kind: 'area', name: `sketch/${part.name.replace(/^tissue\//, '')}/${organ.name}`, rings: [ring], fill: organ.fill }];
    });
  });
}

function outlineOf({ at, semi, corner = 2, through }: Organ, part: Bounds, halfLengthMm: number): Ring {
  const [middleU, halfU] = [(part.left + part.right) / 2, (part.right - part.left) / 2];
  const [partV, partHalfV] = [(part.top + part.bottom) / 2, (part.bottom - part.top) / 2];
  const cut = !through && partHalfV > halfLengthMm;
  const [middleV, halfV] = cut ? [0, halfLengthMm] : [partV, partHalfV];
  const bent = (value: number): number => Math.sign(value) * Math.abs(value) ** (2 / corner);
  return Array.from({ length: POINTS }, (_, i) => {
    const t = (2 * Math.PI * (i + 0.5)) / POINTS;
    return [
      middleU + halfU * (at[0] + semi[0] * bent(Math.cos(t))),
      middleV + halfV * (at[1] + semi[1] * bent(Math.sin(t))),
    ] as const;
  });
}

/** Even-odd rule: a ray to the right crosses the outline an odd number of times. */
function isInside(rings: readonly Ring[], [u, v]: readonly [number, number]): boolean {
  let inside = false;
  for (const ring of rings) {
    ring.forEach(([u1, v1], i) => {
      const [u2, v2] = ring[(i + 1) % ring.length]!;
      if (v1 > v !== v2 > v && u < u1 + ((v - v1) / (v2 - v1)) * (u2 - u1)) inside = !inside;
    });
  }
  return inside;
}
