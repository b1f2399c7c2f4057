'use client';

import { prescriptionShape } from '@/lib/schemas/case/prescription';
import { axesOfPlane } from '@/lib/domain/case/lines';
import type { PatientAxis } from '@/lib/physics/model/axes';
import type { Plane } from '@/lib/physics/model/prescription';
import { AXIS_WORDS, PLANE_WORDS } from '@/lib/presentation/anatomy-words';
import { useBenchState } from '../bench-context';
import { BenchChoice, optionsOf } from '../bench-choice';
import { BenchNumber, PlainNumber } from '../bench-number';
import { percentPhaseFov, percentSampling, withPercentPhaseFov, withPercentSampling } from '../state/prescription-edit';
import { Group, Pair, usable, usePatch, type GroupProps } from './group';

export function WindowGroup({ prescription: p, ...panel }: GroupProps) {
  const patch = usePatch();
  const limits = useBenchState((state) => state.document.scanner.limits);
  const fov = { sliderMin: limits.fovMinMm, sliderMax: limits.fovMaxMm };
  const readout = axesOfPlane(p.plane).find((axis) => axis !== p.phaseAxis) ?? 'RL';
  const oblique = p.tiltAboutReadoutDeg !== 0 || p.tiltAboutPhaseDeg !== 0 || p.inPlaneRotationDeg !== 0;
  const turned = oblique ? ', oblique' : '';
  const phaseAxes = Object.fromEntries(axesOfPlane(p.plane).map((axis) => [axis, AXIS_WORDS[axis]])) as Record<PatientAxis, string>;
  return (
    <Group
      title="Window"
      summary={`${Math.round(p.fovPhaseMm)} × ${Math.round(p.fovReadoutMm)} mm, ${AXIS_WORDS[p.phaseAxis]}${turned}`}
      {...panel}
    >
      <Pair>
        <BenchNumber path="fovPhaseMm" schema={prescriptionShape.fovPhaseMm} label={`FOV ${AXIS_WORDS[p.phaseAxis]}`} {...fov} />
        <BenchNumber path="fovReadoutMm" schema={prescriptionShape.fovReadoutMm} label={`FOV ${AXIS_WORDS[readout]}`} {...fov} />
        <BenchNumber path="linesAcrossFov" schema={prescriptionShape.linesAcrossFov} label="Lines" sliderMin={64} sliderMax={512} />
        <BenchNumber path="readoutMatrix" schema={prescriptionShape.readoutMatrix} label="Matrix" sliderMin={64} sliderMax={512} />
      </Pair>
      <PlainNumber
        label="Percent Phase Field of View" name="percentPhaseFov" unit="%" min={10} max={200}
        sliderMax={110} value={Math.round(percentPhaseFov(p) * 10) / 10} step={1}
        onEdit={(value, key) => usable(value) && value >= 10 && value <= 200 && patch(withPercentPhaseFov(p, value), key)}
      />
      <PlainNumber
        label="Percent Sampling" name="percentSampling" unit="%" min={10} max={200}
        sliderMin={40} sliderMax={120} value={Math.round(percentSampling(p) * 10) / 10} step={1}
        onEdit={(value, key) => usable(value) && value >= 10 && value <= 200 && patch(withPercentSampling(p, value), key)}
      />
      <div className="mt-1 space-y-1.5">
        <BenchChoice<PatientAxis> path="phaseAxis" label="Phase direction" options={optionsOf(phaseAxes)} />
        <BenchChoice<Plane> path="plane" label="Plane" options={optionsOf(PLANE_WORDS)} />
      </div>
      <p className="mt-2 text-sm text-ink-soft">Centre from the origin, mm</p>
      <div className="grid grid-cols-3 gap-x-3 [&_input]:w-[3.5ch] [&_label+div]:-ml-2 [&_span[aria-hidden]]:hidden">
        {(['L', 'P', 'S'] as const).map((letter, i) => (
          <BenchNumber key={letter} path={`centreMm.${i}`} schema={prescriptionShape.centreMm.def.items[i as 0]} label={letter} sliderMin={-200} sliderMax={200} />
        ))}
      </div>
      <Pair>
        <BenchNumber path="tiltAboutReadoutDeg" schema={prescriptionShape.tiltAboutReadoutDeg} label={`Tilt, ${AXIS_WORDS[readout]}`} />
        <BenchNumber path="tiltAboutPhaseDeg" schema={prescriptionShape.tiltAboutPhaseDeg} label={`Tilt, ${AXIS_WORDS[p.phaseAxis]}`} />
        <BenchNumber path="inPlaneRotationDeg" schema={prescriptionShape.inPlaneRotationDeg} label="Rotation" />
      </Pair>
      <p className="mt-1 text-sm text-ink-soft">Tilts turn the plane about the axis named; rotation turns the window in its plane.</p>
    </Group>
  );
}
