import { spreadOf } from '@/lib/domain/import/reading-spread';
import { toCm, toKg, toMm } from '@/lib/domain/import/units';
import { QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';

export type UnitSystem = 'metric' | 'imperial';

/** What someone typed on the page, in the units they chose. */
export interface GivenSizes {
  readonly units: UnitSystem;
  /** kg or lb. */
  readonly weight: number;
  /** cm; with feet, the inches beyond them. */
  readonly height: number;
  readonly heightFeet?: number;
  /** cm or in. */
  readonly girth: number;
  readonly depth?: number;
  readonly sex?: 'female' | 'male';
  readonly arms?: 'up' | 'cannot-be-raised';
  readonly breathHoldS?: number;
}

export interface AnsweredReading {
  readonly quantity: SizeQuantity;
  readonly value: number;
  readonly source: 'reported';
  readonly spread: number;
  readonly tapeSite?: TapeSite;
}

export type SlipField = 'weight' | 'height' | 'girth' | 'depth' | 'breathHoldS';
export interface Slip {
  readonly field: SlipField;
  readonly text: string;
  /** Refused; else it is asked about once and taken when it is confirmed. */
  readonly refused: boolean;
}

interface InOurUnits {
  readonly weightKg: number;
  readonly heightCm: number;
  readonly girthCm: number;
  readonly depthMm?: number;
}

export function inOurUnits({ units, weight, height, heightFeet, girth, depth }: GivenSizes): InOurUnits {
  const length = units === 'metric' ? 'cm' : 'in';
  return {
    weightKg: toKg(weight, units === 'metric' ? 'kg' : 'lb'),
    heightCm: toCm(units === 'metric' ? height : (heightFeet ?? 0) * 12 + height, length),
    girthCm: toCm(girth, length),
    ...(depth === undefined ? {} : { depthMm: toMm(depth, length) }),
  };
}

const FIELD_OF = { weight: 'weight-kg', height: 'height-cm', girth: 'girth-cm', depth: 'depth-mm', breathHoldS: 'breath-hold-s' } as const;
const within = (field: SlipField, value: number) => {
  const { min, max } = QUANTITY_FACTS[FIELD_OF[field]];
  return value >= min && value <= max;
};

/** A figure that is out of range, but would be usual in another unit: the most common slip with a tape. */
function otherUnit(field: SlipField, typed: number, units: UnitSystem): string {
  const as = (factor: number, word: string) => ` ${typed} looks like ${word}: did you mean ${Number((typed * factor).toPrecision(4))} cm?`;
  if (units !== 'metric') return '';
  if (field === 'height' && typed > 0 && typed < 3) return as(100, 'metres');
  if ((field === 'height' || field === 'girth' || field === 'depth') && typed >= 150) return as(0.1, 'millimetres');
  return '';
}

/** Body mass index beyond which a figure is looked at once more; people of such sizes exist and confirm it. */
const USUAL_INDEX = { min: 14, max: 80 } as const;

/** What looks like a slip of pen or tape. Empty: nothing does. */
export function findSlips(given: GivenSizes): Slip[] {
  const sizes = inOurUnits(given);
  const slips: Slip[] = [];
  const check = (field: SlipField, value: number | undefined, typed: number | undefined) => {
    if (value === undefined || typed === undefined || within(field, value)) return;
    slips.push({ field, refused: true, text: `Please look at this again.${otherUnit(field, typed, given.units)}` });
  };
  check('weight', sizes.weightKg, given.weight);
  check('height', sizes.heightCm, given.height);
  check('girth', sizes.girthCm, given.girth);
  check('depth', sizes.depthMm, given.depth);
  check('breathHoldS', given.breathHoldS, given.breathHoldS);
  if (slips.length > 0) return slips;
  // A closed loop round something d deep is at least 2 d long.
  if (sizes.depthMm !== undefined && sizes.girthCm * 10 < 2 * sizes.depthMm) {
    slips.push({ field: 'girth', refused: true, text: 'A tape all the way round is at least twice as long as the depth. Please measure one of the two again.' });
  }
  const index = sizes.weightKg / (sizes.heightCm / 100) ** 2;
  if (index < USUAL_INDEX.min || index > USUAL_INDEX.max) {
    slips.push({ field: 'weight', refused: false, text: 'Weight and height together are unusual. If both are right, just confirm below.' });
  }
  const share = sizes.girthCm / sizes.heightCm;
  if (share < 0.35 || share > 1.3) {
    slips.push({ field: 'girth', refused: false, text: 'Round the body and height together are unusual. If both are right, just confirm below.' });
  }
  return slips;
}

/** The answer as readings: reported, with the spread that tapes at home have. */
export function toReadings(given: GivenSizes): AnsweredReading[] {
  const { weightKg, heightCm, girthCm, depthMm } = inOurUnits(given);
  const one = (quantity: 'weight-kg' | 'height-cm' | 'girth-cm' | 'depth-mm' | 'sex' | 'arms-position' | 'breath-hold-s', value: number, tapeSite?: TapeSite): AnsweredReading => ({
    quantity, value, source: 'reported', spread: spreadOf({ quantity, source: 'reported' }), ...(tapeSite ? { tapeSite } : {}),
  });
  return [
    one('weight-kg', weightKg),
    one('height-cm', heightCm),
    one('girth-cm', girthCm, 'iliac-crest'),
    ...(depthMm === undefined ? [] : [one('depth-mm', depthMm)]),
    ...(given.sex ? [one('sex', given.sex === 'female' ? 1 : 2)] : []),
    ...(given.arms ? [one('arms-position', given.arms === 'up' ? 1 : 2)] : []),
    ...(given.breathHoldS === undefined ? [] : [one('breath-hold-s', given.breathHoldS)]),
  ];
}
