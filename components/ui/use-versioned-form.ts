'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect, useRef, useState } from 'react';
import {
  useForm,
  type DefaultValues,
  type FieldValues,
  type Path,
  type UseFormReturn,
} from 'react-hook-form';
import type * as z from 'zod';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';
import { mergeForms } from './merge-forms';

export interface Versioned<T> {
  readonly version: number;
  readonly form: T;
}

interface Options<T extends FieldValues, R> {
  schema: z.ZodType<T, T>;
  initial: DefaultValues<T>;
  /** 0 for a record that is not there yet. */
  version: number;
  save: (expectedVersion: number, values: T) => Promise<ActionResult<R>>;
  /** What is stored now, asked for when somebody else was faster. */
  readCurrent?: () => Promise<ActionResult<Versioned<T>>>;
  onSaved: (result: R) => void;
}

export interface VersionedForm<T extends FieldValues> {
  form: UseFormReturn<T, unknown, T>;
  submit: (values: T) => Promise<void>;
  /** What is wrong with the form as a whole. */
  problem: ErrorView | null;
  /** What somebody else stored meanwhile. */
  stale: Versioned<T> | null;
  version: number;
  /** Theirs with my changes on top; where both changed a field, mine stands. */
  merged: () => T | null;
  saveMerged: () => void;
  keepMine: () => void;
  takeTheirs: () => void;
}

const OFFLINE: ErrorView = {
  code: 'unavailable',
  message: 'Nothing was saved: the server did not answer. What you typed is still here; try again shortly.',
};

/** A form over one version of a record: judged by the server's schema, and never overwriting a version it has not seen. */
export function useVersionedForm<T extends FieldValues, R>(options: Options<T, R>): VersionedForm<T> {
  const form = useForm<T, unknown, T>({
    resolver: zodResolver(options.schema) as never,
    defaultValues: options.initial,
    mode: 'onBlur',
    reValidateMode: 'onBlur',
  });
  const [version, setVersion] = useState(options.version);
  // What both people started from.
  const base = useRef(options.initial as T);
  const [problem, setProblem] = useState<ErrorView | null>(null);
  const [stale, setStale] = useState<Versioned<T> | null>(null);
  const { isDirty, isSubmitSuccessful } = form.formState;

  // The browser asks before a tab with unsaved changes is closed.
  const unsaved = isDirty && !(isSubmitSuccessful && !problem && !stale);
  useEffect(() => {
    if (!unsaved) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [unsaved]);

  const showProblem = (error: ErrorView) => {
    setProblem(error);
    for (const [path, message] of Object.entries(error.fields ?? {})) {
      // The action wraps the form; fields are named from inside it.
      form.setError(path.replace(/^form\./, '') as Path<T>, { type: 'server', message });
    }
  };

  const attempt = async (expected: number, values: T) => {
    setProblem(null);
    setStale(null);
    try {
      const result = await options.save(expected, values);
      if (result.ok) return options.onSaved(result.data);
      if (result.error.code === 'conflict' && options.readCurrent) {
        const current = await options.readCurrent();
        // A conflict that is not about versions (a name already taken) is an ordinary message.
        if (current.ok && current.data.version !== expected) return setStale(current.data);
      }
      showProblem(result.error);
    } catch {
      setProblem(OFFLINE);
    }
  };

  const merged = () =>
    stale ? mergeForms(base.current, stale.form, structuredClone(form.getValues())) : null;
  const saveOn = (onVersion: number) => {
    setVersion(onVersion);
    void form.handleSubmit((values) => attempt(onVersion, values))();
  };

  return {
    form,
    submit: (values) => attempt(version, values),
    problem,
    stale,
    version,
    merged,
    saveMerged: () => {
      const both = merged();
      if (!stale || !both) return;
      base.current = stale.form;
      form.reset(both, { keepDefaultValues: true });
      saveOn(stale.version);
    },
    keepMine: () => {
      if (!stale) return;
      base.current = stale.form;
      saveOn(stale.version);
    },
    takeTheirs: () => {
      if (!stale) return;
      base.current = stale.form;
      setVersion(stale.version);
      form.reset(stale.form);
      setStale(null);
    },
  };
}
