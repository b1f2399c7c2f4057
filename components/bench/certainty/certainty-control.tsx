'use client';

import { Button } from '@/components/ui/button';
import { NumberField } from '@/components/ui/number-field';
import { Popover } from '@/components/ui/popover';
import { Slider } from '@/components/ui/slider';
import { formatPercent } from '@/lib/presentation/percent';
import { useBench, useBenchState } from '../bench-context';
import { chosenCertainty, SURE_MAX, SURE_MIN } from '../state/certainty';

const PERCENT = { min: SURE_MIN * 100, max: SURE_MAX * 100 };

/** The one knob of certainty: verdict, remedies, section and opening take sizes at it. */
export function CertaintyControl() {
  const { store, setting } = useBench();
  const chosen = useBenchState((state) => state.sureAt);
  const site = setting.policy.sureAt;
  const percent = Math.round((chosen ?? site) * 1000) / 10;
  const choose = (value: number | null) => {
    if (value === null || !Number.isFinite(value) || value < PERCENT.min || value > PERCENT.max) return;
    store.dispatch({ type: 'choose-certainty', sureAt: chosenCertainty(value, setting.policy) });
  };
  return (
    <Popover
      align="end"
      label="How sure"
      trigger={
        <Button variant="quiet" size="sm" className="-my-1.5 -mr-2" aria-label={`How sure: ${formatPercent(percent, 1)}`}>
          sure at {formatPercent(percent, 1)}
        </Button>
      }
    >
      <div className="w-72 max-w-full">
        <NumberField compact layout="row" label="Sure at" unit="%" value={percent} {...PERCENT} step={0.1} onChange={choose} />
        <Slider label="Sure at, slider" unit="%" value={percent} {...PERCENT} step={0.1} onChange={choose} />
        <p className="mt-1 text-sm text-ink-soft">
          Sizes are taken so that this share of such patients is not larger. At 50 % they are taken as given. Verdict,
          remedies, section and opening follow; the simulated picture keeps the sizes as given.
        </p>
        {chosen !== null && (
          <div className="mt-2 text-sm">
            <p>
              Site policy is {formatPercent(site * 100, 1)}: a saved plan is judged at that.
            </p>
            <Button size="sm" variant="quiet" className="-ml-3" onClick={() => store.dispatch({ type: 'choose-certainty', sureAt: null })}>
              Back to site policy
            </Button>
          </div>
        )}
      </div>
    </Popover>
  );
}
