import type { Side } from '@/lib/physics/model/axes';
import { SIDES } from '@/lib/physics/model/axes';
import type { KeepClear } from '@/lib/physics/model/keep-clear';
import type { Reading } from '@/lib/physics/model/patient';
import { ARM_WORDS, SIDE_LETTERS, SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import { formatPercent } from '@/lib/presentation/percent';
import { formatShort } from '@/lib/presentation/round';
import type { PlanView } from '@/lib/schemas/plan';

interface Row {
  readonly name: string;
  readonly value: string;
  readonly source: string;
}

function row(name: string, reading: Reading, unit: string, quantum = 1): Row {
  const date = reading.takenOn ? `, ${reading.takenOn}` : '';
  return {
    name,
    value: `${formatShort(reading.value, quantum)} ± ${formatShort(reading.spread, quantum)} ${unit}`,
    source: `${SOURCE_WORDS[reading.source]}${date}`,
  };
}

const name = (side: Side): string => side.charAt(0).toUpperCase() + side.slice(1);

/** What the plan rests on: every size with how it was got, the arms, the keep-clear area, how sure. */
export function SheetSizes({ plan }: { plan: PlanView }) {
  const { patient, policy } = plan;
  const rows = [
    ...SIDES.map((side) => row(name(side), patient.extents[side], 'mm')),
    row('Breath-hold', patient.breathHoldS, 's'),
    row('Breath', patient.breathPeriodS, 's', 0.1),
    ...(patient.weightKg ? [row('Weight', patient.weightKg, 'kg')] : []),
  ];
  return (
    <div className="sheet-small text-sm">
      <table className="w-full border-collapse text-left">
        <caption className="text-left font-semibold">Sizes from the origin, one standard deviation, and how they were got</caption>
        <tbody>
          {rows.map((each) => (
            <tr key={each.name} className="border-b border-line align-top">
              <th scope="row" className="py-0.5 pr-2 font-normal">{each.name}</th>
              <td className="figures py-0.5 pr-2 whitespace-nowrap">{each.value}</td>
              <td className="py-0.5">{each.source}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="mt-2">
        <strong className="font-semibold">Arms</strong> {ARM_WORDS[patient.arms.position]}.{' '}
        <strong className="font-semibold">Keep-clear area</strong> {keepClearWords(plan.keepClear)}.{' '}
        <strong className="font-semibold">Sure at</strong> {formatPercent(policy.sureAt * 100, 1)}, with the margins of site policy.
      </p>
    </div>
  );
}

function keepClearWords({ area }: KeepClear): string {
  if (area.kind === 'whole-picture') return 'whole picture';
  const { xMm, yMm, zMm } = area.box;
  const edges: [Side, number][] = [
    ['right', -xMm[0]], ['left', xMm[1]], ['anterior', -yMm[0]], ['posterior', yMm[1]], ['superior', zMm[1]], ['inferior', -zMm[0]],
  ];
  const box = edges.map(([side, value]) => `${SIDE_LETTERS[side]} ${formatShort(value, 1)}`).join(' ');
  return `${area.label ? `${area.label}, ` : ''}${box} mm`;
}
