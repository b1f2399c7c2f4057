import type { PartBox } from '../body/make-part';
import type { Tissue } from './tissues';

/**
 * An organ in its part's own measure: x and y in half-breadths and half-depths from the part's centre, z in mm from the
 * origin of patient coordinates. Without z it runs through along z.
 */
export interface Organ {
  readonly tissue: Tissue;
  readonly at: readonly [x: number, y: number];
  readonly half: readonly [x: number, y: number];
  readonly z?: readonly [centreMm: number, halfMm: number];
  /** Turned in the axial plane, degrees, right-handed about z. */
  readonly turnDeg?: number;
}

export const organ = (
  tissue: Tissue,
  at: readonly [number, number],
  half: readonly [number, number],
  z?: readonly [number, number],
  turnDeg?: number,
): Organ => ({
  tissue,
  at,
  half,
  ...(z === undefined ? {} : { z }),
  ...(turnDeg === undefined ? {} : { turnDeg }),
});

/** The same organ on the other side. */
export const mirrored = (one: Organ): Organ => ({
  ...one,
  at: [-one.at[0], one.at[1]],
  ...(one.turnDeg === undefined ? {} : { turnDeg: -one.turnDeg }),
});

export const bothSides = (one: Organ): readonly Organ[] => [one, mirrored(one)];

/** Inner layers of a fat rim: thickness grows with size, so a large part is mostly rim and not a larger inside. */
export interface Rim {
  readonly sideMm: number;
  readonly frontMm: number;
  readonly backMm: number;
}

/** How thick the rim of fat is: a quarter of what a half-length exceeds 120 mm by, at least 12 mm. */
export function rimOf({ halfX, halfY }: Pick<PartBox, 'halfX' | 'halfY'>): Rim {
  const rim = (half: number, share: number): number =>
    Math.min(0.3 * half, 12 + share * Math.max(0, half - 120));
  return { sideMm: rim(halfX, 0.28), frontMm: rim(halfY, 0.42), backMm: rim(halfY, 0.3) };
}
