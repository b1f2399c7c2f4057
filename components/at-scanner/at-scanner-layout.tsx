'use client';

import { useBench, useBenchState } from '@/components/bench/bench-context';
import { LinkButton } from '@/components/ui/button';
import { extentsShape } from '@/lib/schemas/case/patient';
import { numberFacts } from '@/components/ui/schema-facts';
import type { Side } from '@/lib/physics/model/axes';
import type { Reading } from '@/lib/physics/model/patient';
import { isMeasured, SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import type { AtScannerProps } from './at-scanner';
import { SaveBar } from './save-bar';
import { SequenceVerdicts } from './sequence-verdicts';
import { Stepper } from './stepper';
import { useScannerSaving } from './use-scanner-saving';

const SIDES: readonly { readonly side: Side; readonly label: string }[] = [
  { side: 'right', label: 'Right' },
  { side: 'left', label: 'Left' },
  { side: 'anterior', label: 'Front' },
  { side: 'posterior', label: 'Back' },
  { side: 'superior', label: 'Head' },
  { side: 'inferior', label: 'Feet' },
];
/** What a press changes: a localiser is read to a few mm. Typing and arrow keys set single mm. */
const STEP_MM = 5;
/** One standard deviation of a length read off a localiser, mm (our judgement, no source). */
const LOCALISER_SPREAD_MM = 3;

export function AtScannerLayout(props: AtScannerProps) {
  const saving = useScannerSaving(props);
  return (
    <div className="mx-auto flex min-h-[calc(100dvh-3.5rem-1px)] max-w-5xl flex-col">
      <div className="flex flex-wrap items-center justify-between gap-3 border-b border-line bg-paper px-4 py-2">
        <div>
          <h1 className="text-lg"><span className="figures">{props.reference}</span> at the scanner</h1>
          <p className="text-sm text-ink-soft">{props.scannerName}</p>
        </div>
        <LinkButton size="sm" href={`/bench/${props.basis.bookingId}`} prefetch={false}>Bench</LinkButton>
      </div>
      <div className="grid flex-1 content-start gap-x-6 md:grid-cols-2">
        <SequenceVerdicts />
        <section aria-labelledby="sizes-title" className="px-4 py-3">
          <h2 id="sizes-title" className="text-lg">Sizes off the localiser</h2>
          <p className="mb-3 text-sm text-ink-soft">From the FOV centre to the skin, each side.</p>
          <div className="space-y-3">
            {SIDES.map((each) => <SideStepper key={each.side} {...each} />)}
          </div>
        </section>
      </div>
      <SaveBar saving={saving} />
    </div>
  );
}

function SideStepper({ side, label }: { side: Side; label: string }) {
  const { store, setting } = useBench();
  const reading = useBenchState((state) => state.document.patient.extents[side]);
  const { min = 0, max = 1000 } = numberFacts(extentsShape[side].shape.value);
  const onEdit = (value: number) => {
    const next: Reading = { value, source: 'localiser', spread: LOCALISER_SPREAD_MM, takenOn: setting.today };
    store.dispatch({ type: 'edit-extent', side, reading: next, step: `at-scanner ${side}` });
  };
  return (
    <Stepper
      label={label}
      hint={SOURCE_WORDS[reading.source]}
      value={reading.value}
      certainty={isMeasured(reading.source) ? 'measured' : 'estimated'}
      stepMm={STEP_MM}
      min={min}
      max={max}
      onEdit={onEdit}
      onSettle={() => store.dispatch({ type: 'settle' })}
    />
  );
}
