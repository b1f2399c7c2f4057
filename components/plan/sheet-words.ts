import type { Side } from '@/lib/physics/model/axes';
import { SIDES } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Reading } from '@/lib/physics/model/patient';
import { ARM_WORDS, REGION_WORDS, SIDE_LETTERS, SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import { formatDate, formatMoment } from '@/lib/presentation/moment';
import { formatPercent } from '@/lib/presentation/percent';
import { formatShort } from '@/lib/presentation/round';
import type { PlanView } from '@/lib/schemas/plan';

/** What a sheet says in words; the page, its print and its PDF say the same. */
export const SHEET_TITLES = {
  sizes: 'Sizes, from the FOV centre to the skin, ± one standard deviation, and how they were got',
  cautions: 'Cautions',
  label: ['patient label here', 'checked by'],
  link: 'Look here for a newer version of this sheet:',
} as const;

export function sheetHeading(plan: PlanView): { kind: string; reference: string; version: string } {
  return {
    kind: `${REGION_WORDS[plan.patient.region]} · ${plan.scanner.name}`,
    reference: plan.accession ?? 'No booking',
    version: `Version ${plan.version}, ${plan.state}. Saved ${formatMoment(new Date(plan.savedAt))} by ${plan.savedBy}.`,
  };
}

export interface SizeRow {
  readonly name: string;
  readonly value: string;
  readonly source: string;
}

function row(name: string, reading: Reading, unit: string, quantum = 1): SizeRow {
  const date = reading.takenOn ? `, ${reading.takenOn}` : '';
  return {
    name,
    value: `${formatShort(reading.value, quantum)} ± ${formatShort(reading.spread, quantum)} ${unit}`,
    source: `${SOURCE_WORDS[reading.source]}${date}`,
  };
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

export function sizeRows({ patient }: PlanView): SizeRow[] {
  return [
    ...SIDES.map((side) => row(capital(side), patient.extents[side], 'mm')),
    row('Breath-hold', patient.breathHoldS, 's'),
    row('Breath', patient.breathPeriodS, 's', 0.1),
    ...(patient.weightKg ? [row('Weight', patient.weightKg, 'kg')] : []),
  ];
}

/** Name and words of what the plan rests on besides sizes. */
export function restRows({ patient, keepClear, policy }: PlanView): readonly (readonly [string, string])[] {
  return [
    ['Arms', `${ARM_WORDS[patient.arms.position]}.`],
    ['Keep-clear area', `${keepClearWords(keepClear)}.`],
    ['Sure at', `${formatPercent(policy.sureAt * 100, 1)}, with the margins of site policy.`],
  ];
}

export function keepClearWords({ area }: KeepClear): string {
  if (area.kind === 'whole-picture') return 'whole picture';
  const { xMm, yMm, zMm } = area.box;
  const edges: [Side, number][] = [
    ['right', -xMm[0]], ['left', xMm[1]], ['anterior', -yMm[0]], ['posterior', yMm[1]], ['superior', zMm[1]], ['inferior', -zMm[0]],
  ];
  const box = edges.map(([side, value]) => `${SIDE_LETTERS[side]} ${formatShort(value, 1)}`).join(' ');
  return `${area.label ? `${area.label}, ` : ''}${box} mm`;
}

export function signatureRows(plan: PlanView): readonly (readonly [string, string])[] {
  const { signOff } = plan;
  const radiologist = signOff
    ? `${signOff.decision} by ${signOff.by}, ${formatDate(new Date(signOff.at))}`
    : plan.needsSignOff
      ? 'needed: fold is left in the keep-clear area, or site policy asks for it'
      : 'not needed';
  return [
    ['Planned by', plan.savedBy],
    ['Used at the scanner by', ''],
    ['Radiologist’s sign-off', radiologist],
  ];
}

export function restsOn(plan: PlanView): string {
  return `policy version ${plan.policy.version} · engine ${plan.engineVersion} · input ${plan.inputHash.slice(0, 12)}`;
}
