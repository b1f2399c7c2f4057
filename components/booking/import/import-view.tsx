'use client';

import { useState } from 'react';
import { Button, LinkButton } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/choice';
import { Notice } from '@/components/ui/notice';
import { missingColumns, SIZE_FIELDS, IMPORT_FIELD_LABELS } from '@/lib/domain/import';
import { tableHref } from '../table-query';
import { ChooseFile } from './choose-file';
import { ComparedRows } from './compared-rows';
import { MatchColumns } from './match-columns';
import { MatchNames } from './match-names';
import { useImport, type Counts, type ImportProps, type ImportState } from './use-import';

const rows = (count: number) => (count === 1 ? '1 row' : `${count} rows`);

function Columns({ state, props }: { state: ImportState; props: ImportProps }) {
  const { settings, file, survey } = state;
  const csv = file?.kind === 'csv';
  const missing = csv ? missingColumns(settings) : '';
  const unitless = csv ? SIZE_FIELDS.filter((field) => settings.columns[field] && !settings.units[field]).map((field) => IMPORT_FIELD_LABELS[field]) : [];
  return (
    <div className="space-y-5">
      {csv ? (
        <>
          <MatchColumns columns={file.columns} settings={settings} slotMinutes={props.slotMinutes} onColumns={(columns) => void state.mapColumns(columns)} onChange={state.change} />
          <p className="text-ink-soft">Times without an offset are read as clocks show them in {props.zone}.</p>
        </>
      ) : (
        <Notice title="A FHIR bundle">
          Appointments with their ServiceRequest, and Observations of height, weight, waist and body mass index. Everything else in it is passed over.
        </Notice>
      )}
      <MatchNames title="Scanners" what="scanners" names={survey?.scanners ?? []} ids={settings.scanners} known={props.scanners} onChange={(scanners) => state.change({ scanners })} />
      <MatchNames title="Protocols" what="protocols" names={survey?.protocols ?? []} ids={settings.protocols} known={props.protocols} onChange={(protocols) => state.change({ protocols })} />
      {(missing !== '' || unitless.length > 0) && (
        <p role="status">
          {missing !== '' && <>Still to be matched: {missing}. </>}
          {unitless.length > 0 && <>Still without a unit: {unitless.join(', ')}.</>}
        </p>
      )}
      <div className="flex flex-wrap gap-3">
        <Button variant="primary" disabled={missing !== '' || unitless.length > 0} onClick={() => void state.compare()}>
          Compare with the bookings
        </Button>
        <Button onClick={state.again}>Choose another file</Button>
      </div>
    </div>
  );
}

function Compared({ state, counts, pending }: { state: ImportState; counts: Counts; pending: boolean }) {
  const [whole, setWhole] = useState(false);
  const change = counts.created + counts.changed;
  const held = whole && counts.skipped > 0;
  return (
    <div className="space-y-5">
      <Notice title={`${counts.created} new, ${counts.changed} changed, ${counts.same} the same as booked, ${counts.skipped} left out`} live>
        Nothing is booked yet. All of it is booked at once, or nothing.
      </Notice>
      <ComparedRows counts={counts} place={state.file?.kind === 'fhir' ? 'Entry' : 'Line'} page={(...asked) => state.session().page(...asked)} />
      {counts.skipped > 0 && (
        <Checkbox label="Book nothing while a row is left out" checked={whole} onChange={(event) => setWhole(event.target.checked)} hint="Without it the other rows are booked." />
      )}
      <div className="flex flex-wrap gap-3">
        <Button variant="primary" disabled={change === 0 || held} pending={pending} pendingLabel="Booking …" onClick={state.book}>
          Book {rows(change)}
        </Button>
        <Button disabled={pending} onClick={() => void state.back()}>
          Back to the columns
        </Button>
      </div>
    </div>
  );
}

/** Many bookings from a file: choose, match, compare, book. */
export function ImportView(props: ImportProps) {
  const state = useImport(props);
  const { step, problem, file } = state;
  return (
    <div className="space-y-5">
      {problem && (
        <Notice tone="error" live title="The file could not be brought in">
          {problem}
        </Notice>
      )}
      {file && step.at !== 'choose' && step.at !== 'done' && <p className="font-semibold break-all">{file.name}</p>}
      {step.at === 'choose' && <ChooseFile mask={props.mask} onChosen={(chosen) => void state.choose(chosen)} />}
      {step.at === 'columns' && <Columns state={state} props={props} />}
      {step.at === 'reading' && (
        <div className="space-y-4">
          <p role="status">{rows(step.rows)} compared …</p>
          <Button onClick={state.stop}>Stop</Button>
        </div>
      )}
      {(step.at === 'compared' || step.at === 'booking') && <Compared state={state} counts={step.counts} pending={step.at === 'booking'} />}
      {step.at === 'done' && (
        <Notice
          tone="done"
          live
          title={`${step.done.created} booked, ${step.done.changed} changed`}
          actions={
            <>
              <LinkButton href={tableHref({}, step.days ?? {})} variant="primary">
                Open the bookings
              </LinkButton>
              <Button onClick={state.again}>Bring in another file</Button>
            </>
          }
        >
          {step.done.same} were the same as booked, {step.skipped} were left out. Their pre-check runs in the background.
        </Notice>
      )}
    </div>
  );
}
