'use client';

import { useState } from 'react';
import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';

/** The server was not reached: nothing is known about the change, and nothing typed is lost. */
const NO_ANSWER: ErrorView = {
  code: 'unavailable',
  message: 'The server did not answer. What you typed is still here; try again shortly.',
};

/** Path of the first part of a form's values that a server's message belongs to, or null when there is none. */
function controlOf(values: FieldValues, path: string): string | null {
  const parts = path.split('.');
  let at: unknown = values;
  for (const part of parts) {
    if (Array.isArray(at)) return parts[0] ?? null;
    if (typeof at !== 'object' || at === null || !(part in at)) return null;
    at = (at as Record<string, unknown>)[part];
  }
  return path;
}

/**
 * Sends a form's values to a server action and puts each of its messages beside the control it is about. What belongs
 * to no control (a conflict, an incident) is returned as `problem` for a Notice above the buttons.
 */
export function useFormAction<T extends FieldValues, R>(
  form: UseFormReturn<T, unknown, T>,
  action: (values: T) => Promise<ActionResult<R>>,
  onDone: (data: R, values: T) => void | Promise<void>,
): { submit: (values: T) => Promise<void>; problem: ErrorView | null } {
  const [problem, setProblem] = useState<ErrorView | null>(null);
  const submit = async (values: T) => {
    setProblem(null);
    let result: ActionResult<R>;
    try {
      result = await action(values);
    } catch {
      return setProblem(NO_ANSWER);
    }
    if (result.ok) return onDone(result.data, values);
    let placed = false;
    for (const [path, message] of Object.entries(result.error.fields ?? {})) {
      const control = controlOf(form.getValues(), path);
      if (control === null) continue;
      form.setError(control as FieldPath<T>, { type: 'server', message }, { shouldFocus: !placed });
      placed = true;
    }
    if (!placed) setProblem(result.error);
  };
  return { submit, problem };
}
