'use client';

import { proxy } from 'comlink';
import { useEffect, useRef, useState } from 'react';
import type { ImportSettings, RowOutcome } from '@/lib/domain/import';
import { nameKey } from '@/lib/domain/import/read-row';
import type { ImportDone } from '@/lib/schemas/import';
import { importServer } from './import-server';
import type { ImportBasis, OpenedFile, Survey } from './import-session';
import { startImportWorker, type RunningImport } from './start-import-worker';

interface Named {
  readonly id: string;
  readonly name: string;
}
export interface ImportProps extends ImportBasis {
  readonly scanners: readonly Named[];
  readonly protocols: readonly Named[];
  readonly settings: ImportSettings;
}

/** Beside the 200 of one file at most; a site keeps up to 500. */
const MOST_KEPT_NAMES = 250;

export type Counts = Readonly<Record<RowOutcome, number>>;
export interface Days {
  readonly from: string;
  readonly to: string;
}
export type Step =
  | { readonly at: 'choose' }
  | { readonly at: 'columns' }
  | { readonly at: 'reading'; readonly rows: number }
  | { readonly at: 'compared'; readonly importId: string; readonly counts: Counts; readonly days: Days | null }
  | { readonly at: 'booking'; readonly importId: string; readonly counts: Counts; readonly days: Days | null }
  | { readonly at: 'done'; readonly done: ImportDone; readonly skipped: number; readonly days: Days | null };

/** Ids by name: what was matched before, else a scanner or protocol of exactly that name. */
function matchNames(names: readonly string[], known: readonly Named[], before: Readonly<Record<string, string>>): Record<string, string> {
  return Object.fromEntries(
    names.map((name) => {
      const key = nameKey(name);
      const kept = known.some(({ id }) => id === before[key]) ? before[key]! : undefined;
      return [key, kept ?? known.find((one) => nameKey(one.name) === key)?.id ?? ''];
    }),
  );
}

/** The names matched last of those a site may keep, so that one file's names always have room beside them. */
const mostRecent = (names: Readonly<Record<string, string>>) => Object.fromEntries(Object.entries(names).slice(-MOST_KEPT_NAMES));

/** The columns of the last file that this one has too, else what the titles propose. */
function startingColumns({ columns, proposed }: OpenedFile, kept: ImportSettings['columns']): ImportSettings['columns'] {
  const known = Object.fromEntries(Object.entries(kept).filter(([, title]) => columns.includes(title)));
  return Object.keys(known).length >= 3 ? known : proposed;
}

/** The way of one file from the disk to the bookings. Reading happens in a worker; this only knows where it stands. */
export function useImport({ mask, zone, slotMinutes, scanners, protocols, settings: kept }: ImportProps) {
  const running = useRef<RunningImport | null>(null);
  const [step, setStep] = useState<Step>({ at: 'choose' });
  const [file, setFile] = useState<(OpenedFile & { readonly name: string }) | null>(null);
  const [survey, setSurvey] = useState<Survey | null>(null);
  const [settings, setSettings] = useState<ImportSettings>(kept);
  const [problem, setProblem] = useState<string | null>(null);

  useEffect(() => () => running.current?.end(), []);
  const session = () => {
    running.current ??= startImportWorker(setProblem);
    return running.current.session;
  };
  const guarded = async (back: Step, work: () => Promise<void>) => {
    setProblem(null);
    try {
      await work();
    } catch (error) {
      setProblem((error as Error).message);
      setStep(back);
    }
  };

  const look = async (next: ImportSettings) => {
    const found = await session().survey(next.columns);
    setSurvey(found);
    setSettings({
      ...next,
      units: { ...found.units, ...Object.fromEntries(Object.entries(next.units).filter(([field]) => field in found.units)) },
      ...(found.dateOrder ? { dateOrder: found.dateOrder } : {}),
      ...namesOf(found, next),
    });
  };
  /** Names of this file beside those of earlier ones, which the next file may bring again. */
  const namesOf = (found: Survey, before: ImportSettings) => ({
    scanners: { ...mostRecent(before.scanners), ...matchNames(found.scanners, scanners, before.scanners) },
    protocols: { ...mostRecent(before.protocols), ...matchNames(found.protocols, protocols, before.protocols) },
  });

  return {
    step, file, survey, settings, problem, session,
    choose: (chosen: File) =>
      guarded({ at: 'choose' }, async () => {
        const opened = await session().open(chosen);
        if (opened.kind === 'fhir') {
          // It has no columns: how tables are read stays as it was.
          const found = await session().survey({});
          setSurvey(found);
          setSettings({ ...kept, ...namesOf(found, kept) });
        } else {
          const columns = startingColumns(opened, kept.columns);
          // Units kept from the last file hold only for its own columns.
          await look({ ...kept, columns, units: columns === opened.proposed ? {} : kept.units });
        }
        setFile({ ...opened, name: chosen.name });
        setStep({ at: 'columns' });
      }),
    mapColumns: (columns: ImportSettings['columns']) => guarded({ at: 'columns' }, () => look({ ...settings, columns })),
    change: (change: Partial<ImportSettings>) => setSettings({ ...settings, ...change }),
    compare: () =>
      guarded({ at: 'columns' }, async () => {
        setStep({ at: 'reading', rows: 0 });
        const importId = crypto.randomUUID();
        await importServer.start(importId, file!.kind, settings);
        const whole = await session().stage(importId, settings, { mask, zone, slotMinutes }, proxy(({ done }) => setStep({ at: 'reading', rows: done })));
        if (!whole) {
          await importServer.cancel(importId);
          setStep({ at: 'columns' });
          return;
        }
        setStep({ at: 'compared', importId, counts: await session().counts(), days: await session().days(zone) });
      }),
    stop: () => void session().stop(),
    back: () =>
      guarded({ at: 'columns' }, async () => {
        if (step.at === 'compared') await importServer.cancel(step.importId);
        setStep({ at: 'columns' });
      }),
    book: () => {
      if (step.at !== 'compared') return;
      const { importId, counts, days } = step;
      void guarded(step, async () => {
        setStep({ at: 'booking', importId, counts, days });
        const done = await importServer.commit(importId, counts.created + counts.changed + counts.same);
        setStep({ at: 'done', done, skipped: counts.skipped, days });
      });
    },
    again: () => {
      running.current?.end();
      running.current = null;
      setFile(null);
      setStep({ at: 'choose' });
    },
  };
}

export type ImportState = ReturnType<typeof useImport>;
