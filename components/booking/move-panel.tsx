'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { ActionButton } from '@/components/ui/action-button';
import { Button } from '@/components/ui/button';
import { Fact, Facts } from '@/components/ui/figure';
import { Form, FormNumber, FormSelect, FormText } from '@/components/ui/form';
import { FormOutcome } from '@/components/ui/form-outcome';
import { Panel } from '@/components/ui/panel';
import { useStatus } from '@/components/ui/status';
import { useVersionedForm } from '@/components/ui/use-versioned-form';
import { STANDING_WORDS } from '@/lib/presentation/pre-check-words';
import type { ActionResult } from '@/lib/schemas/action-result';
import { moveFormSchema, type MoveForm } from './coordinator-forms';
import { PlaceWords, type PlaceWordsProps } from './place-words';

export interface ScannerPlaces {
  readonly scannerId: string;
  readonly scannerName: string;
  readonly standing: keyof typeof STANDING_WORDS;
  readonly reason: string;
  /** Absent: room unknown. */
  readonly places?: readonly { readonly day: string; readonly time: string; readonly label: string }[];
}

interface Props {
  slotMinutes: number;
  scanners: readonly ScannerPlaces[];
  open: { readonly proposed: PlaceWordsProps; readonly booked: PlaceWordsProps; readonly differs: boolean; readonly by: string } | null;
  propose: (form: MoveForm) => Promise<ActionResult<unknown>>;
  withdraw: () => Promise<ActionResult<unknown>>;
}

function OpenMove({ open, withdraw }: Pick<Props, 'withdraw'> & { open: NonNullable<Props['open']> }) {
  const router = useRouter();
  const { say } = useStatus();
  return (
    <div className="mb-5 space-y-3 border-l-4 border-indigo pl-4">
      <p className="font-semibold">{open.differs ? 'The booking system says something else than was proposed' : 'Change it in your booking system'}</p>
      <Facts>
        <Fact name="Booked now"><PlaceWords {...open.booked} /></Fact>
        <Fact name="Proposed"><PlaceWords {...open.proposed} /></Fact>
        <Fact name="By">{open.by}</Fact>
      </Facts>
      <p className="text-sm text-ink-soft">It closes by itself when an import or the API shows the proposed place.</p>
      <ActionButton action={withdraw} onDone={() => { say('The proposed move was taken back.'); router.refresh(); }}
        confirm={{ question: 'Take this proposed move back? What is booked stays.', yes: 'Take it back', no: 'Keep it' }}>
        Take it back
      </ActionButton>
    </div>
  );
}

/** Where a booking could go instead, and the form that makes the task of it. What is booked is not touched from here. */
export function MovePanel({ slotMinutes, scanners, open, propose, withdraw }: Props) {
  const router = useRouter();
  const { say } = useStatus();
  const [shown, setShown] = useState(open === null);
  const usable = scanners.filter(({ standing }) => standing !== 'ruled-out');
  const first = usable.find(({ standing, places }) => standing === 'fits' && places && places.length > 0) ?? usable[0];
  const state = useVersionedForm<MoveForm, unknown>({
    schema: moveFormSchema,
    initial: {
      scannerId: first?.scannerId ?? '', day: first?.places?.[0]?.day ?? '', time: first?.places?.[0]?.time ?? '', slotMinutes, reason: '',
    },
    version: 0,
    save: (_version, form) => propose(form),
    onSaved: () => {
      say('The move was proposed. The task is under Moves.');
      state.form.reset(state.form.getValues());
      setShown(false);
      router.refresh();
    },
  });
  const take = (scannerId: string, day: string, time: string) => {
    for (const [name, value] of [['scannerId', scannerId], ['day', day], ['time', time]] as const) state.form.setValue(name, value, { shouldDirty: true });
  };
  return (
    <Panel id="move" title="Another scanner or time" collapsible open={shown || open !== null} onOpenChange={setShown}>
      {open && <OpenMove open={open} withdraw={withdraw} />}
      <ul className="mb-5 divide-y divide-line border-y border-line">
        {scanners.map(({ scannerId, scannerName, standing, reason, places }) => (
          <li key={scannerId} className="space-y-1 py-3">
            <p><span className="font-semibold">{scannerName}</span> · {STANDING_WORDS[standing]}</p>
            <p className="text-sm text-ink-soft">{reason}</p>
            {standing !== 'ruled-out' && (places === undefined
              ? <p className="text-sm text-ink-soft">Room unknown: no session is entered for these days.</p>
              : places.length === 0
                ? <p className="text-sm text-ink-soft">No free place of {slotMinutes} min in the sessions of these days.</p>
                : (
                  <div className="flex flex-wrap gap-2">
                    {places.map(({ day, time, label }) => (
                      <Button key={label} size="sm" onClick={() => take(scannerId, day, time)}><span className="figures">{label}</span></Button>
                    ))}
                  </div>
                ))}
          </li>
        ))}
      </ul>
      {usable.length > 0 && (
        <Form form={state.form} onSubmit={state.submit} label="Propose a move">
          <div className="grid gap-x-6 gap-y-5 sm:grid-cols-2">
            <FormSelect name="scannerId" label="Scanner" placeholder="Choose a scanner" options={usable.map((one) => ({ value: one.scannerId, label: one.scannerName }))} />
            <FormNumber name="slotMinutes" schema={moveFormSchema.shape.slotMinutes} step={5} />
            <FormText name="day" label="Day" type="date" required />
            <FormText name="time" label="Start of the slot" type="time" required />
            <FormText name="reason" label="Why, for whoever changes the booking" optional className="sm:col-span-2" hint="No name, no date of birth." />
          </div>
          <div className="mt-5 space-y-4">
            <FormOutcome state={state} schema={moveFormSchema} noun="move" />
            <Button type="submit" variant="primary" pending={state.form.formState.isSubmitting} pendingLabel="Proposing…">Propose this move</Button>
          </div>
        </Form>
      )}
    </Panel>
  );
}
