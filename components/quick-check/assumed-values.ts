import type { Case } from '@/lib/physics/model/case';
import { ARM_WORDS, AXIS_NAMES, FAMILY_WORDS, PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import { formatEchoTime } from '@/lib/presentation/duration';
import { formatPercent } from '@/lib/presentation/percent';
import { formatShort } from '@/lib/presentation/round';

export interface AssumedValue {
  readonly name: string;
  readonly value: string;
}

/** Every value of the case that nobody typed, in words. */
export function assumedValues({ patient, prescription: p, keepClear, scanner, policy }: Case): AssumedValue[] {
  const whole = (a: 'right' | 'anterior' | 'superior', b: 'left' | 'posterior' | 'inferior') => patient.extents[a].value + patient.extents[b].value;
  const across = p.phaseAxis === 'AP' ? { name: 'right–left', mm: whole('right', 'left') } : { name: 'front to back', mm: whole('anterior', 'posterior') };
  const { slices } = p;
  const each = Object.values(policy.marginMm);
  const [least, most] = [Math.min(...each), Math.max(...each)].map((mm) => formatShort(mm, 0.1));
  return [
    { name: 'Phase direction', value: `${AXIS_NAMES[p.phaseAxis]}, ${PLANE_WORDS[p.plane]}` },
    { name: 'Patient', value: `${patient.region}, an ellipse ${formatShort(across.mm, 1)} mm ${across.name}, centred on the FOV` },
    { name: 'Head to feet', value: `${formatShort(whole('superior', 'inferior'), 1)} mm of tissue` },
    { name: 'Arms', value: ARM_WORDS[patient.arms.position] },
    { name: 'Breath', value: `hold ${formatShort(patient.breathHoldS.value, 0.1)} s, period ${formatShort(patient.breathPeriodS.value, 0.1)} s` },
    { name: 'Keep-clear area', value: keepClear.area.kind === 'whole-picture' ? 'whole picture' : 'a box' },
    { name: 'Margin', value: `${least === most ? most : `${least} to ${most}`} mm a side, sure at ${formatPercent(policy.sureAt * 100, 1)}` },
    { name: 'Readout', value: `FOV ${formatShort(p.fovReadoutMm, 1)} mm, matrix ${p.readoutMatrix}` },
    { name: 'Lines across the FOV', value: String(p.linesAcrossFov) },
    {
      name: 'Slices',
      value: slices.mode === 'slab'
        ? `slab of ${slices.partitions} × ${formatShort(slices.partitionThicknessMm, 0.1)} mm, ${slices.acquiredPartitions} partitions acquired`
        : `${slices.slices} × ${formatShort(slices.thicknessMm, 0.1)} mm, gap ${formatShort(slices.gapMm, 0.1)} mm`,
    },
    { name: 'Sequence', value: `${FAMILY_WORDS[p.family]}, TR ${formatEchoTime(p.trMs)}, TE ${formatEchoTime(p.teMs)}, ${formatShort(p.averages, 0.1)} ${p.averages === 1 ? 'average' : 'averages'}` },
    { name: 'Acceleration', value: p.acceleration.factorPhase * p.acceleration.factorSlice === 1 ? 'none' : `factor ${p.acceleration.factorPhase * p.acceleration.factorSlice}` },
    { name: 'Partial Fourier', value: p.partialFourierPhase === 1 ? 'none' : formatPercent(p.partialFourierPhase * 100, 0.1) },
    { name: 'Scanner', value: `${formatShort(scanner.fieldStrengthT, 0.1)} T, opening ${formatShort(scanner.boreDiameterMm / 10, 1)} cm, generic limits` },
  ];
}
