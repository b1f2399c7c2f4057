import type { BodyRegion } from '@/lib/physics/model/patient';
import type { Plane } from '@/lib/physics/model/prescription';
import type { AreaNode, Bounds, Ring, Token } from './scene';

/** An ellipse in the trunk's own frame: centre and semi-axes as shares of the trunk's half-breadth and half-height. */
interface Organ {
  readonly name: string;
  readonly at: readonly [number, number];
  readonly semi: readonly [number, number];
  readonly fill: Token;
}

/** Axial, at liver level; right of the patient on the left. A sketch to find one's way by, not a measurement. */
const AXIAL_ABDOMEN: readonly Organ[] = [
  { name: 'wall', at: [0, 0.03], semi: [0.82, 0.76], fill: 'tissue-lean' },
  { name: 'liver', at: [-0.32, -0.13], semi: [0.4, 0.44], fill: 'tissue-organ' },
  { name: 'stomach and spleen', at: [0.47, -0.06], semi: [0.14, 0.26], fill: 'tissue-gland' },
  { name: 'right kidney', at: [-0.38, 0.34], semi: [0.11, 0.2], fill: 'tissue-gland' },
  { name: 'left kidney', at: [0.36, 0.37], semi: [0.11, 0.2], fill: 'tissue-gland' },
  { name: 'vena cava', at: [-0.07, 0.24], semi: [0.06, 0.065], fill: 'tissue-vessel' },
  { name: 'aorta', at: [0.05, 0.25], semi: [0.055, 0.075], fill: 'tissue-vessel' },
  { name: 'spine', at: [0, 0.48], semi: [0.135, 0.155], fill: 'tissue-bone' },
];

/** Coronal, through the liver. */
const CORONAL_ABDOMEN: readonly Organ[] = [
  { name: 'wall', at: [0, 0], semi: [0.82, 0.98], fill: 'tissue-lean' },
  { name: 'liver', at: [-0.34, -0.3], semi: [0.4, 0.24], fill: 'tissue-organ' },
  { name: 'stomach and spleen', at: [0.48, -0.34], semi: [0.15, 0.17], fill: 'tissue-gland' },
  { name: 'right kidney', at: [-0.36, 0.13], semi: [0.12, 0.17], fill: 'tissue-gland' },
  { name: 'left kidney', at: [0.36, 0.08], semi: [0.12, 0.17], fill: 'tissue-gland' },
  { name: 'spine', at: [0, 0.05], semi: [0.1, 0.86], fill: 'tissue-bone' },
];

const SKETCHES: Partial<Record<BodyRegion, Partial<Record<Plane, readonly Organ[]>>>> = {
  abdomen: { axial: AXIAL_ABDOMEN, coronal: CORONAL_ABDOMEN },
};

const POINTS = 48;

/** Organs sketched inside the trunk's outline. The engine never sees them. */
export function anatomySketch(region: BodyRegion, plane: Plane, trunk: Bounds): readonly AreaNode[] {
  const middle = [(trunk.left + trunk.right) / 2, (trunk.top + trunk.bottom) / 2] as const;
  const half = [(trunk.right - trunk.left) / 2, (trunk.bottom - trunk.top) / 2] as const;
  return (SKETCHES[region]?.[plane] ?? []).map((organ): AreaNode => {
    const ring: Ring = Array.from({ length: POINTS }, (_, i) => {
      const t = (2 * Math.PI * i) / POINTS;
      return [
        middle[0] + half[0] * (organ.at[0] + organ.semi[0] * Math.cos(t)),
        middle[1] + half[1] * (organ.at[1] + organ.semi[1] * Math.sin(t)),
      ] as const;
    });
    return { kind: 'area', name: `sketch/${organ.name}`, rings: [ring], fill: organ.fill };
  });
}
