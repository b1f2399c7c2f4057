'use client';

import { useEffect, useRef } from 'react';
import type { FieldErrors, FieldValues } from 'react-hook-form';
import type * as z from 'zod';
import { Button } from './button';
import { cx } from './class-names';
import { formDifferences } from './form-differences';
import { Notice } from './notice';
import { Table, Td, Th, Tr } from './table';
import type { VersionedForm } from './use-versioned-form';

function countErrors(errors: FieldErrors): number {
  return Object.values(errors).reduce<number>((sum, error) => {
    if (!error || typeof error !== 'object') return sum;
    return (
      sum + ('message' in error && typeof error.message === 'string' ? 1 : countErrors(error as FieldErrors))
    );
  }, 0);
}

/** What came of the last attempt to save: refused fields, a problem, or another person's version to look at. */
export function FormOutcome<T extends FieldValues>({
  state,
  schema,
  noun,
}: {
  state: VersionedForm<T>;
  schema: z.ZodType;
  noun: string;
}) {
  const { problem, stale, form } = state;
  const { submitCount, errors, isSubmitting } = form.formState;
  const refused = submitCount > 0 && !isSubmitting ? countErrors(errors) : 0;
  const top = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (problem || stale) top.current?.focus();
  }, [problem, stale]);

  if (stale) {
    const differences = formDifferences(schema, stale.form, form.getValues());
    const kept = new Set(
      formDifferences(schema, stale.form, state.merged()).map((difference) => difference.path),
    );
    return (
      <div ref={top} tabIndex={-1}>
        <Notice
          tone="error"
          live
          title={`Someone else saved version ${stale.version} while you were editing version ${state.version}.`}
        >
          Nothing was overwritten and nothing you typed is lost. Saving both keeps what is in bold: the fields
          you changed are yours, the rest theirs.
        </Notice>
        {differences.length > 0 && (
          <div className="mt-3">
            <Table caption="Fields that differ">
              <thead>
                <tr>
                  <Th>Field</Th>
                  <Th>Version {stale.version}</Th>
                  <Th>Yours</Th>
                </tr>
              </thead>
              <tbody>
                {differences.map((difference) => (
                  <Tr key={difference.path}>
                    <Td>{difference.words}</Td>
                    <Td className={cx('figures', !kept.has(difference.path) && 'font-bold')}>
                      {difference.theirs}
                    </Td>
                    <Td className={cx('figures', kept.has(difference.path) && 'font-bold')}>
                      {difference.mine}
                    </Td>
                  </Tr>
                ))}
              </tbody>
            </Table>
          </div>
        )}
        <div className="mt-3 flex flex-wrap gap-3">
          <Button variant="primary" onClick={state.saveMerged}>
            Save both as version {stale.version + 1}
          </Button>
          <Button onClick={state.keepMine}>Save yours alone as version {stale.version + 1}</Button>
          <Button onClick={state.takeTheirs}>Continue from version {stale.version}</Button>
        </div>
      </div>
    );
  }
  if (problem) {
    return (
      <div ref={top} tabIndex={-1}>
        <Notice tone="error" live title={problem.message}>
          {problem.incidentId && (
            <p>
              Incident <span className="figures">{problem.incidentId}</span>
            </p>
          )}
          {problem.fields?.[''] && <p>{problem.fields['']}</p>}
        </Notice>
      </div>
    );
  }
  if (refused > 0) {
    return (
      <Notice
        tone="error"
        live
        title={`The ${noun} was not saved: ${refused === 1 ? 'one field needs' : `${refused} fields need`} another look.`}
      >
        Each is marked in inverse print, with what was given and what is allowed.
      </Notice>
    );
  }
  return null;
}
