import { keepClearOfPreset, keepClearPresetsFor } from '@/lib/domain/protocol/keep-clear-presets';
import type { Side } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Patient } from '@/lib/physics/model/patient';
import { edgeOf } from './state/window-box';

type Area = KeepClear['area'];

export interface KeepClearChoice {
  readonly value: string;
  readonly label: string;
  readonly area: Area;
}

export const OWN = 'own';

const SIDES: readonly Side[] = ['anterior', 'posterior', 'right', 'left', 'superior', 'inferior'];

export function isSameArea(a: Area, b: Area): boolean {
  if (a.kind !== 'box' || b.kind !== 'box') return a.kind === b.kind;
  return SIDES.every((side) => edgeOf(a.box, side) === edgeOf(b.box, side));
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
const labelOf = (area: Area): string => capital(area.kind === 'box' ? (area.label ?? 'own box') : 'whole picture');

/** What can be chosen: where the bench began, then every preset of the body part, laid into this patient. */
export function keepClearChoices(start: KeepClear, patient: Pick<Patient, 'extents' | 'region'>, asked: boolean): KeepClearChoice[] {
  const extents = Object.fromEntries(SIDES.map((side) => [side, patient.extents[side].value])) as Record<Side, number>;
  const presets = keepClearPresetsFor(patient.region).flatMap(({ key, label }) => {
    const area = keepClearOfPreset(key, extents)?.area;
    return area && !isSameArea(area, start.area) ? [{ value: key, label, area }] : [];
  });
  const begun = { value: 'start', label: `${labelOf(start.area)}, ${asked ? 'asked for' : 'from the protocol'}`, area: start.area };
  return [begun, ...presets];
}
