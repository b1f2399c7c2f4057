import { bothSides, organ, type Organ } from './phantom';

/*
 * Organs painted one over the other, later over earlier, inside the muscle wall (whose edge is ±1). Patient's right is
 * negative x, front is negative y. Drawn by eye after ordinary anatomy, for recognition only.
 */

const spine: readonly Organ[] = [
  organ('cortex', [0, 0.34], [0.16, 0.2]),
  organ('marrow', [0, 0.34], [0.145, 0.185]),
  ...[-190, -155, -120, -85, -50, -15, 20, 55, 90, 125, 160, 195].map((z) =>
    organ('disc', [0, 0.34], [0.145, 0.185], [z, 6]),
  ),
  organ('cortex', [0, 0.66], [0.1, 0.18]),
  organ('fluid', [0, 0.575], [0.055, 0.065]),
  organ('white-matter', [0, 0.58], [0.028, 0.03]),
  organ('marrow', [0, 0.78], [0.03, 0.08]),
];

const backMuscles = [
  ...bothSides(organ('muscle', [0.24, 0.72], [0.2, 0.17], undefined, -12)),
  ...bothSides(organ('muscle', [0.24, 0.42], [0.09, 0.12])),
];

export const abdomenOrgans: readonly Organ[] = [
  organ('fat', [0, -0.02], [0.92, 0.88]),
  ...backMuscles,
  // Lungs above, so that a coronal picture shows its dome.
  organ('gas', [-0.47, 0.02], [0.4, 0.72], [190, 95]),
  organ('gas', [0.47, 0.02], [0.4, 0.72], [190, 105]),
  organ('muscle', [0.1, -0.35], [0.36, 0.38], [170, 62]),
  organ('blood', [0.12, -0.36], [0.26, 0.27], [170, 46]),
  organ('liver', [-0.4, -0.08], [0.5, 0.66], [25, 98], 14),
  organ('liver', [0.02, -0.4], [0.42, 0.3], [35, 60], -10),
  organ('blood', [-0.34, -0.05], [0.05, 0.035], [25, 60], 30),
  organ('blood', [-0.48, 0.12], [0.035, 0.06], [30, 60]),
  organ('blood', [-0.2, -0.24], [0.06, 0.03], [30, 50], -20),
  organ('fluid', [-0.24, -0.38], [0.08, 0.11], [-25, 34]),
  organ('bowel', [0.42, -0.36], [0.3, 0.3], [35, 60], 20),
  organ('gas', [0.42, -0.5], [0.2, 0.1], [35, 42], 20),
  organ('spleen', [0.66, 0.22], [0.17, 0.4], [28, 62], -18),
  ...bothSides(organ('kidney', [0.4, 0.44], [0.15, 0.19], [-52, 58], 20)),
  ...bothSides(organ('fluid', [0.35, 0.42], [0.045, 0.075], [-52, 24], 20)),
  ...bothSides(organ('bowel', [0.66, -0.1], [0.15, 0.2], [-120, 60])),
  ...bothSides(organ('muscle', [0.2, 0.26], [0.085, 0.13], [-140, 95], 8)),
  organ('bowel', [0, -0.16], [0.62, 0.12], [-38, 17]),
  ...[
    [-0.4, -78],
    [-0.12, -70],
    [0.16, -82],
    [0.42, -92],
    [-0.28, -112],
    [0.02, -108],
    [0.28, -124],
    [-0.42, -148],
    [-0.1, -146],
    [0.16, -156],
    [0.44, -150],
  ].map(([x, z]) => organ('bowel', [x!, -0.1], [0.125, 0.26], [z!, 17], x! * 60)),
  organ('bowel', [-0.2, -0.4], [0.24, 0.17], [-115, 40]),
  organ('bowel', [0.2, -0.3], [0.26, 0.2], [-130, 46]),
  organ('gas', [0.05, -0.52], [0.2, 0.09], [-105, 30]),
  ...bothSides(organ('cortex', [0.62, 0.2], [0.24, 0.5], [-205, 62], -16)),
  ...bothSides(organ('marrow', [0.62, 0.2], [0.21, 0.46], [-205, 57], -16)),
  ...spine,
  organ('blood', [0.07, 0.1], [0.055, 0.065]),
  organ('blood', [-0.1, 0.11], [0.07, 0.055]),
];

export const pelvisOrgans: readonly Organ[] = [
  organ('fat', [0, -0.04], [0.9, 0.84]),
  ...bothSides(organ('muscle', [0.56, 0.6], [0.38, 0.3], undefined, -24)),
  ...bothSides(organ('muscle', [0.55, -0.46], [0.24, 0.26])),
  organ('bowel', [0.12, -0.35], [0.36, 0.26], [90, 55]),
  organ('bowel', [-0.26, -0.3], [0.24, 0.24], [75, 46]),
  organ('cortex', [0, 0.62], [0.26, 0.17], [60, 90]),
  organ('marrow', [0, 0.62], [0.235, 0.15], [60, 86]),
  ...bothSides(organ('cortex', [0.62, 0.12], [0.27, 0.36], [85, 70], -18)),
  ...bothSides(organ('marrow', [0.62, 0.12], [0.24, 0.33], [85, 66], -18)),
  ...bothSides(organ('cortex', [0.44, 0.1], [0.16, 0.32], [0, 44], 14)),
  ...bothSides(organ('marrow', [0.44, 0.1], [0.13, 0.28], [0, 40], 14)),
  ...bothSides(organ('cortex', [0.66, 0.06], [0.165, 0.225], [-2, 28])),
  ...bothSides(organ('marrow', [0.66, 0.06], [0.15, 0.205], [-2, 26])),
  ...bothSides(organ('cortex', [0.76, 0.2], [0.12, 0.17], [-95, 85])),
  ...bothSides(organ('marrow', [0.76, 0.2], [0.07, 0.1], [-95, 82])),
  ...bothSides(organ('muscle', [0.3, 0.12], [0.06, 0.3], [0, 60], -8)),
  organ('muscle', [0, -0.32], [0.29, 0.27], [5, 42]),
  organ('fluid', [0, -0.32], [0.26, 0.24], [5, 38]),
  organ('gland', [0, 0.1], [0.2, 0.15], [0, 34]),
  organ('muscle', [0, 0.38], [0.13, 0.15], [0, 80]),
  organ('gas', [0, 0.36], [0.06, 0.06], [0, 70]),
  ...bothSides(organ('blood', [0.36, -0.42], [0.05, 0.06])),
];

export const chestOrgans: readonly Organ[] = [
  organ('fat', [0, 0], [0.9, 0.9]),
  organ('gas', [-0.48, 0.05], [0.4, 0.76], [0, 150]),
  organ('gas', [0.48, 0.05], [0.4, 0.76], [0, 150]),
  organ('muscle', [0.14, -0.32], [0.36, 0.42], [-25, 66], 24),
  organ('blood', [0.2, -0.34], [0.22, 0.26], [-25, 46], 24),
  organ('blood', [-0.04, -0.3], [0.13, 0.2], [-15, 50]),
  organ('liver', [-0.42, -0.05], [0.48, 0.7], [-150, 62]),
  ...backMuscles,
  ...spine,
  organ('blood', [0.16, 0.2], [0.065, 0.075]),
];
