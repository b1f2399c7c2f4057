'use client';

import { Button } from '@/components/ui/button';
import { cx } from '@/components/ui/class-names';
import { NumberField } from '@/components/ui/number-field';
import { Popover } from '@/components/ui/popover';
import { Slider } from '@/components/ui/slider';
import { describeProbability, shortProbability } from '@/lib/presentation/certainty-words';
import { formatPercent } from '@/lib/presentation/percent';
import { useBench, useBenchState } from '../bench-context';
import { chosenCertainty, SURE_MAX, SURE_MIN } from '../state/certainty';
import { useFoldProbability } from './use-fold-probability';

const PERCENT = { min: SURE_MIN * 100, max: SURE_MAX * 100 };

/** The one knob of certainty: verdict, remedies, section and opening take sizes at it. Beside it how likely fold is. */
export function CertaintyControl() {
  const { store, setting } = useBench();
  const chosen = useBenchState((state) => state.sureAt);
  const { value, waiting, tried } = useFoldProbability();
  const site = setting.policy.sureAt;
  const percent = Math.round((chosen ?? site) * 1000) / 10;
  const choose = (next: number | null) => {
    if (next === null || !Number.isFinite(next) || next < PERCENT.min || next > PERCENT.max) return;
    store.dispatch({ type: 'choose-certainty', sureAt: chosenCertainty(next, setting.policy) });
  };
  return (
    <Popover
      align="end"
      label="How sure"
      trigger={
        <Button variant="quiet" size="sm" className="-mr-2 px-2!" aria-busy={waiting}>
          <span>
            {value && <span className={cx('font-medium text-ink-soft', waiting && 'opacity-60')}>{shortProbability(value, tried)} · </span>}
            sure at {formatPercent(percent, 1)}
          </span>
        </Button>
      }
    >
      <div className="w-76 max-w-full">
        {value && (
          <p className="mb-3 text-sm" data-probability={waiting ? undefined : value.probability.toFixed(3)}>
            {describeProbability(value, percent / 100, tried)}
          </p>
        )}
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
