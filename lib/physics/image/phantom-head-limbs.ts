import { bothSides, organ, type Organ } from './phantom';

/* As phantom-trunk.ts, inside a thin rim. Front is negative y. */

export const headOrgans: readonly Organ[] = [
  organ('cortex', [0, 0], [0.97, 0.97]),
  organ('marrow', [0, 0], [0.945, 0.945]),
  organ('cortex', [0, 0], [0.92, 0.92]),
  organ('fluid', [0, 0.02], [0.87, 0.87], [10, 88]),
  organ('grey-matter', [0, 0.02], [0.84, 0.84], [10, 84]),
  ...bothSides(organ('white-matter', [0.4, 0.0], [0.34, 0.68], [14, 66])),
  ...bothSides(organ('grey-matter', [0.27, -0.02], [0.13, 0.18], [8, 22])),
  ...bothSides(organ('fluid', [0.14, -0.2], [0.06, 0.28], [16, 22], -14)),
  ...bothSides(organ('fluid', [0.2, 0.3], [0.06, 0.2], [14, 18], 16)),
  // Between the halves, front and back only: a sagittal slice through the middle would else see nothing but fluid.
  organ('fluid', [0, -0.64], [0.018, 0.16], [40, 30]),
  organ('fluid', [0, 0.68], [0.018, 0.14], [40, 30]),
  organ('white-matter', [0, -0.02], [0.12, 0.36], [24, 9]),
  organ('grey-matter', [0, 0.5], [0.56, 0.3], [-62, 30]),
  organ('white-matter', [0, 0.16], [0.17, 0.15], [-60, 36]),
  organ('gas', [0, -0.72], [0.2, 0.2], [-62, 34]),
  ...bothSides(organ('fluid', [0.42, -0.74], [0.16, 0.13], [-40, 13])),
  ...bothSides(organ('gas', [0.4, -0.52], [0.18, 0.2], [-74, 18])),
  organ('muscle', [0, -0.35], [0.36, 0.3], [-112, 22]),
];

export const kneeOrgans: readonly Organ[] = [
  organ('muscle', [0, 0.4], [0.7, 0.48], [0, 220]),
  organ('fat', [0, 0.42], [0.3, 0.34]),
  ...bothSides(organ('cartilage', [0.36, 0.02], [0.4, 0.52], [14, 40])),
  ...bothSides(organ('cortex', [0.36, 0.02], [0.36, 0.48], [18, 40])),
  ...bothSides(organ('marrow', [0.36, 0.02], [0.34, 0.46], [18, 38])),
  organ('cortex', [0, -0.06], [0.4, 0.4], [120, 95]),
  organ('marrow', [0, -0.06], [0.34, 0.34], [118, 92]),
  organ('cortex', [0, 0.02], [0.72, 0.5], [-62, 42]),
  organ('marrow', [0, 0.02], [0.69, 0.47], [-62, 40]),
  organ('cortex', [0, -0.02], [0.36, 0.36], [-165, 90]),
  organ('marrow', [0, -0.02], [0.3, 0.3], [-160, 88]),
  ...bothSides(organ('cartilage', [0.38, 0.04], [0.36, 0.42], [-20, 4])),
  organ('cartilage', [0, -0.62], [0.4, 0.16], [12, 26]),
  organ('cortex', [0, -0.68], [0.36, 0.16], [12, 25]),
  organ('marrow', [0, -0.69], [0.33, 0.13], [12, 22]),
  organ('blood', [0.05, 0.5], [0.08, 0.09]),
  organ('cortex', [0, 0.1], [0.05, 0.12], [-6, 14]),
];

export const limbOrgans: readonly Organ[] = [
  organ('muscle', [0, 0], [0.98, 0.98]),
  organ('fat', [0, 0.05], [0.5, 0.06]),
  organ('muscle', [0, -0.42], [0.66, 0.4]),
  organ('cortex', [0.05, 0.05], [0.3, 0.3]),
  organ('marrow', [0.05, 0.05], [0.2, 0.2]),
  organ('blood', [-0.45, 0.1], [0.08, 0.08]),
];

export const breastOrgans: readonly Organ[] = [organ('gland', [0, -0.05], [0.6, 0.6])];

export const neckOrgans: readonly Organ[] = [
  organ('muscle', [0, 0], [0.95, 0.95]),
  organ('marrow', [0, 0.3], [0.26, 0.22]),
  organ('fluid', [0, 0.52], [0.12, 0.1]),
  organ('gas', [0, -0.45], [0.16, 0.16]),
  ...bothSides(organ('blood', [0.45, -0.1], [0.1, 0.1])),
];
