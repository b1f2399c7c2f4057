'use client';

import { useState } from 'react';
import { cx } from '@/components/ui/class-names';
import { Figure } from '@/components/ui/figure';
import { Mark, type MarkKind } from '@/components/ui/marks';
import { NumberSlider } from '@/components/ui/slider';
import type { Verdict } from '@/lib/physics/model/assessment';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import { FoldDrawing } from './fold-drawing';
import { THRESHOLDS, workFold } from './worked-fold';

const MAX_PCT = 20;

const LOOK: Partial<Record<Verdict, { mark: MarkKind; tone: string }>> = {
  'fold-in-keep-clear': { mark: 'inward', tone: 'text-thread' },
  'fold-outside-keep-clear': { mark: 'outward', tone: 'text-ochre' },
};

/** Slide the oversampling and watch what leaves by one edge come in by the opposite one. */
export function FoldExample() {
  const [typed, setTyped] = useState<number | null>(0);
  const usable = typed !== null && Number.isFinite(typed) && typed >= 0 && typed <= MAX_PCT;
  const [last, setLast] = useState(0);
  if (usable && typed !== last) setLast(typed);
  const worked = workFold(usable ? typed : last);
  const look = LOOK[worked.verdict] ?? { mark: 'flat', tone: 'text-ink' };
  const reason =
    worked.verdict === 'fold-in-keep-clear'
      ? `posterior tissue lands on the anterior liver, ${Math.ceil(worked.depthMm)} mm deep.`
      : worked.verdict === 'fold-outside-keep-clear'
        ? 'what still lands in the picture stays off the liver.'
        : 'what lies outside lands outside the picture, and is cut away.';
  const description =
    `Axial section of an abdomen 480 by 340 mm in a picture 300 mm deep, ${Math.round(worked.widthMm)} mm acquired. ` +
    `${VERDICT_WORDS[worked.verdict]}: ${reason}`;
  return (
    <figure className="self-start overflow-hidden rounded-md border border-line bg-cloth">
      <FoldDrawing worked={worked} description={description} />
      <figcaption className="border-t border-line bg-paper px-5 py-4">
        <p className="flex min-h-14 items-start gap-2.5" aria-live="polite">
          <Mark kind={look.mark} className={cx('mt-1', look.tone)} />
          <span>
            <strong className={cx('font-semibold', look.tone)}>{VERDICT_WORDS[worked.verdict]}</strong>:{' '}
            {reason}
          </span>
        </p>
        <NumberSlider
          className="mt-2"
          label="Phase oversampling"
          unit="%"
          value={typed}
          onChange={setTyped}
          min={0}
          max={MAX_PCT}
          step={0.5}
        />
        <dl className="mt-3 grid grid-cols-3 gap-4 text-sm">
          {[
            ['frees the liver', THRESHOLDS.keepClearPct],
            ['frees the picture', THRESHOLDS.picturePct],
            ['covers the body', THRESHOLDS.bodyPct],
          ].map(([words, pct]) => (
            <div key={words} className="flex flex-col-reverse">
              <dt className="text-ink-soft">{words}</dt>
              <dd className="text-base">
                <Figure value={(pct as number).toFixed(1)} unit="%" />
              </dd>
            </div>
          ))}
        </dl>
      </figcaption>
    </figure>
  );
}
