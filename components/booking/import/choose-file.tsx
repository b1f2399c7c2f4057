'use client';

import { useEffect, useEffectEvent, useId, useRef, useState } from 'react';
import { cx } from '@/components/ui/class-names';

/** A file by dropping or by the platform's own chooser. It stays in the browser. */
export function ChooseFile({ onChosen, mask }: { onChosen: (file: File) => void; mask: string }) {
  const id = useId();
  const [over, setOver] = useState(false);
  const chooser = useRef<HTMLInputElement>(null);
  const take = () => {
    const chosen = chooser.current?.files?.[0];
    if (!chosen) return;
    chooser.current!.value = '';
    onChosen(chosen);
  };
  // A quick hand has chosen before the script ran: then nothing told us.
  const takeEarly = useEffectEvent(take);
  useEffect(() => takeEarly(), []);
  return (
    <div
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={(event) => {
        event.preventDefault();
        setOver(false);
        const dropped = event.dataTransfer.files[0];
        if (dropped) onChosen(dropped);
      }}
      className={cx('rounded-md border border-dashed px-6 py-10 text-center', over ? 'border-indigo bg-wash' : 'border-line-strong bg-paper')}
    >
      <label htmlFor={id} className="text-lg font-semibold">
        Choose a CSV file or a FHIR bundle
      </label>
      <p className="mx-auto mt-2 max-w-prose text-ink-soft" id={`${id}-note`}>
        It is read in this browser. Only the columns you match leave it; names, dates of birth and all other text stay here.
        Accession numbers have to be in the form <span className="figures">{mask}</span>.
      </p>
      <input
        ref={chooser}
        id={id}
        type="file"
        aria-describedby={`${id}-note`}
        accept=".csv,.tsv,.txt,.json,text/csv,application/json,application/fhir+json"
        onChange={take}
        className="mx-auto mt-5 block max-w-full rounded border border-line-strong bg-paper p-2 file:mr-4 file:min-h-9 file:cursor-pointer file:rounded file:border-0 file:bg-indigo file:px-4 file:font-semibold file:text-on-indigo"
      />
    </div>
  );
}
