/**
 * Numbers a size record is made of. The unit is part of the name, as columns and files carry it.
 * Two facts that are not numbers are coded so that the record stays one append-only list:
 * arms-position 0 down, 1 up, 2 cannot be raised; sex 1 female, 2 male.
 */
export const QUANTITIES = [
  'extent-right-mm', 'extent-left-mm', 'extent-anterior-mm', 'extent-posterior-mm', 'extent-superior-mm',
  'extent-inferior-mm', 'breadth-mm', 'depth-mm', 'girth-cm', 'hip-girth-cm', 'arm-breadth-mm', 'arm-depth-mm',
  'arm-gap-mm', 'arms-position', 'weight-kg', 'height-cm', 'sex', 'breath-hold-s', 'breath-period-s',
  'lateral-offset-mm', 'hip-breadth-mm', 'shoulder-breadth-mm', 'elbow-breadth-mm',
] as const;

export type SizeQuantity = (typeof QUANTITIES)[number];

export interface QuantityFacts {
  readonly label: string;
  readonly unit: string;
  readonly min: number;
  readonly max: number;
}

const extent = (side: string): QuantityFacts => ({ label: `extent, ${side}`, unit: 'mm', min: 0, max: 1000 });

/** Label, unit and allowed range of every quantity. */
export const QUANTITY_FACTS: Readonly<Record<SizeQuantity, QuantityFacts>> = {
  'extent-right-mm': extent('right'),
  'extent-left-mm': extent('left'),
  'extent-anterior-mm': extent('anterior'),
  'extent-posterior-mm': extent('posterior'),
  'extent-superior-mm': extent('superior'),
  'extent-inferior-mm': extent('inferior'),
  'breadth-mm': { label: 'breadth, right–left', unit: 'mm', min: 50, max: 1500 },
  'depth-mm': { label: 'depth, front to back', unit: 'mm', min: 50, max: 1200 },
  'girth-cm': { label: 'girth at the iliac crest', unit: 'cm', min: 30, max: 300 },
  'hip-girth-cm': { label: 'hip girth', unit: 'cm', min: 30, max: 300 },
  'arm-breadth-mm': { label: 'arm breadth', unit: 'mm', min: 20, max: 300 },
  'arm-depth-mm': { label: 'arm depth', unit: 'mm', min: 20, max: 300 },
  'arm-gap-mm': { label: 'gap between trunk and arm', unit: 'mm', min: 0, max: 300 },
  'arms-position': { label: 'arms', unit: '', min: 0, max: 2 },
  'weight-kg': { label: 'weight', unit: 'kg', min: 2, max: 500 },
  'height-cm': { label: 'height', unit: 'cm', min: 40, max: 250 },
  sex: { label: 'sex', unit: '', min: 1, max: 2 },
  'breath-hold-s': { label: 'longest breath-hold', unit: 's', min: 0, max: 60 },
  'breath-period-s': { label: 'breath period', unit: 's', min: 1, max: 15 },
  'lateral-offset-mm': { label: 'mid-line to the left of the scanner’s', unit: 'mm', min: 0, max: 300 },
  'hip-breadth-mm': { label: 'hip breadth', unit: 'mm', min: 100, max: 1200 },
  'shoulder-breadth-mm': { label: 'shoulder breadth', unit: 'mm', min: 150, max: 1000 },
  'elbow-breadth-mm': { label: 'breadth over the elbows, arms up', unit: 'mm', min: 150, max: 1200 },
};
