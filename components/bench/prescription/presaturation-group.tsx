'use client';

import { Button } from '@/components/ui/button';
import { presaturationShape } from '@/lib/schemas/case/prescription';
import { AXIS_SIDES } from '@/lib/physics/geometry/vector';
import type { Side } from '@/lib/physics/model/axes';
import type { PresaturationBand, Prescription } from '@/lib/physics/model/prescription';
import { BenchChoice, optionsOf } from '../bench-choice';
import { BenchNumber } from '../bench-number';
import { edgeOf, windowBox } from '../state/window-box';
import { Group, Pair, usePatch, type GroupProps } from './group';

const SIDES: Readonly<Record<Side, string>> = {
  right: 'right', left: 'left', anterior: 'anterior', posterior: 'posterior', superior: 'superior', inferior: 'inferior',
};
/** As many as the schema allows. */
const MOST_BANDS = 6;

/** Just outside the picture on a side along phase that has no band yet: there outlying tissue comes from. */
export function nextBand(prescription: Prescription): PresaturationBand {
  const [low, high] = AXIS_SIDES[prescription.phaseAxis];
  const taken = prescription.presaturation.map(({ side }) => side);
  const side = [high, low].find((each) => !taken.includes(each)) ?? high;
  const innerEdgeMm = Math.round(edgeOf(windowBox(prescription), side));
  return { side, innerEdgeMm, thicknessMm: 60, nominalFlipDeg: 90, delayMs: 10 };
}

/** Bands that lower the signal of tissue before each excitation. */
export function PresaturationGroup({ prescription: p, ...panel }: GroupProps) {
  const patch = usePatch();
  const { presaturation: bands } = p;
  const summary = bands.length === 0 ? 'none' : bands.map(({ side, thicknessMm }) => `${side} ${thicknessMm} mm`).join(', ');
  return (
    <Group title="Presaturation" summary={summary} {...panel}>
      {bands.length === 0 && <p className="text-sm text-ink-soft">No band. A band lowers the signal of tissue on one side; it never takes all of it.</p>}
      {bands.map((band, i) => (
        <fieldset key={i} className="mb-2 border-b border-line pb-2">
          <legend className="sr-only">{`Band ${i + 1}, ${band.side}`}</legend>
          <div className="flex items-end gap-2">
            <BenchChoice<Side> path={`presaturation.${i}.side`} label={`Band ${i + 1}`} options={optionsOf(SIDES)} className="min-w-0 flex-1" />
            <Button
              variant="quiet"
              size="sm"
              aria-label={`Remove band ${i + 1}, ${band.side}`}
              onClick={() => patch({ presaturation: bands.filter((_, at) => at !== i) })}
            >
              Remove
            </Button>
          </div>
          <Pair>
            <BenchNumber path={`presaturation.${i}.innerEdgeMm`} schema={presaturationShape.innerEdgeMm} label="Inner" sliderMin={-50} sliderMax={400} />
            <BenchNumber path={`presaturation.${i}.thicknessMm`} schema={presaturationShape.thicknessMm} label="Thick" sliderMin={1} sliderMax={200} />
            <BenchNumber path={`presaturation.${i}.nominalFlipDeg`} schema={presaturationShape.nominalFlipDeg} label="Flip" />
            <BenchNumber path={`presaturation.${i}.delayMs`} schema={presaturationShape.delayMs} label="Delay" sliderMax={200} />
          </Pair>
        </fieldset>
      ))}
      <Button variant="secondary" size="sm" disabled={bands.length >= MOST_BANDS} onClick={() => patch({ presaturation: [...bands, nextBand(p)] })}>
        Add a band
      </Button>
    </Group>
  );
}
