export const LENGTH_UNITS = ['mm', 'cm', 'in'] as const;
export const MASS_UNITS = ['kg', 'lb'] as const;
export type LengthUnit = (typeof LENGTH_UNITS)[number];
export type MassUnit = (typeof MASS_UNITS)[number];
export type SizeUnit = LengthUnit | MassUnit;

/** The international inch and pound are defined by these figures. */
const IN_MM: Readonly<Record<LengthUnit, number>> = { mm: 1, cm: 10, in: 25.4 };
const IN_KG: Readonly<Record<MassUnit, number>> = { kg: 1, lb: 0.45359237 };

const round = (value: number, step: number) => Math.round(value / step) * step;
/** Away with the last binary digits, so that the same size in two units is stored as one figure. */
const tidy = (value: number) => Number(value.toFixed(3));

export function toMm(value: number, unit: LengthUnit): number {
  return tidy(round(value * IN_MM[unit], 0.1));
}
export function toCm(value: number, unit: LengthUnit): number {
  return tidy(round((value * IN_MM[unit]) / 10, 0.1));
}
export function toKg(value: number, unit: MassUnit): number {
  return tidy(round(value * IN_KG[unit], 0.1));
}

const UNIT_WORDS: Readonly<Record<string, SizeUnit>> = {
  mm: 'mm', cm: 'cm', kg: 'kg', in: 'in', inch: 'in', inches: 'in', '"': 'in', '″': 'in', lb: 'lb', lbs: 'lb', pounds: 'lb',
};

/** Units named in a column's title as words of their own; the last one first, since "in" is also a little word. */
function unitsInTitle(title: string): SizeUnit[] {
  const words = title.toLowerCase().match(/\p{L}+|["″]/gu) ?? [];
  return words.flatMap((word) => UNIT_WORDS[word] ?? []).reverse();
}

export type SizeKind = 'weight' | 'height' | 'girth' | 'hip-girth' | 'breadth' | 'depth';

/** Range in which the middle value of a column lies for people of large habitus; wide, and only used to guess. */
const USUAL: Readonly<Record<Exclude<SizeKind, 'weight'>, readonly [number, number]>> = {
  height: [1350, 2100], girth: [800, 1900], 'hip-girth': [850, 1900], breadth: [300, 750], depth: [200, 600],
};

/** The unit a column's values are most likely in; undefined when they tell nothing. A person confirms it. */
export function guessUnit(kind: SizeKind, title: string, values: readonly number[]): SizeUnit | undefined {
  const titled = unitsInTitle(title).find((unit) => (kind === 'weight') === (unit === 'kg' || unit === 'lb'));
  if (titled) return titled;
  if (values.length === 0) return undefined;
  const middle = [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;
  // A middle value over 220 kg would be a list of the heaviest people known; in lb it is an ordinary one here.
  if (kind === 'weight') return middle > 220 ? 'lb' : 'kg';
  const [low, high] = USUAL[kind];
  const fits = LENGTH_UNITS.filter((unit) => middle * IN_MM[unit] >= low && middle * IN_MM[unit] <= high);
  return fits.length === 1 ? fits[0] : fits.find((unit) => unit === 'cm');
}
