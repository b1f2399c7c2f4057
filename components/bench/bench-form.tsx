'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { createContext, useCallback, useContext, useEffect, useRef, type ReactNode } from 'react';
import { FormProvider, useForm, type FieldValues } from 'react-hook-form';
import type * as z from 'zod';

type Commit = (path: string, value: unknown, step?: string) => void;

const CommitContext = createContext<Commit>(() => {});

/** Hands a changed field on, if the schema has nothing against it. */
export function useCommit(): Commit {
  return useContext(CommitContext);
}

/** Copy of `value` with one leaf replaced; everything beside the path stays the same object. */
export function withLeaf<T>(value: T, path: readonly string[], leaf: unknown): T {
  const [key, ...rest] = path;
  if (key === undefined) return leaf as T;
  if (Array.isArray(value)) {
    return value.map((each, i) => (String(i) === key ? withLeaf(each, rest, leaf) : each)) as T;
  }
  const object = (value ?? {}) as Record<string, unknown>;
  return { ...object, [key]: withLeaf(object[key], rest, leaf) } as T;
}

function leaves(value: unknown, path: string): [string, unknown][] {
  if (value !== null && typeof value === 'object') {
    return Object.entries(value).flatMap(([key, inner]) => leaves(inner, path === '' ? key : `${path}.${key}`));
  }
  return [[path, value]];
}

/** Leaves of `after` that are not the same in `before`. */
export function changedLeaves(before: unknown, after: unknown): [string, unknown][] {
  const known = new Map(leaves(before, ''));
  return leaves(after, '').filter(([path, value]) => !known.has(path) || !Object.is(known.get(path), value));
}

/**
 * A form over part of the bench. Typing goes field → schema → bench; a drag on the canvas comes back bench → field,
 * and touches only the fields that changed: a refused value that waits elsewhere stays as it was typed.
 */
export function BenchForm<T extends FieldValues>({
  schema,
  value,
  label,
  onEdit,
  children,
}: {
  schema: z.ZodType<T, T>;
  value: T;
  label: string;
  onEdit: (path: string, value: unknown, step?: string) => void;
  children: ReactNode;
}) {
  const form = useForm<T>({
    resolver: zodResolver(schema) as never,
    values: undefined,
    defaultValues: value as never,
    mode: 'onChange',
  });
  const shown = useRef(value);
  const edit = useRef(onEdit);
  useEffect(() => {
    edit.current = onEdit;
  }, [onEdit]);

  useEffect(() => {
    const changed = changedLeaves(shown.current, value);
    shown.current = value;
    for (const [path, leaf] of changed) {
      if (Object.is(form.getValues(path as never), leaf)) continue;
      form.setValue(path as never, leaf as never);
      form.clearErrors(path as never);
    }
  }, [value, form]);

  const commit = useCallback<Commit>(
    (path, leaf, step) => {
      const wanted = withLeaf(shown.current, path.split('.'), leaf);
      const parsed = schema.safeParse(wanted);
      if (parsed.success || !parsed.error.issues.some((issue) => issue.path.join('.').startsWith(path))) {
        edit.current(path, leaf, step);
      }
    },
    [schema],
  );

  return (
    <FormProvider {...form}>
      <CommitContext.Provider value={commit}>
        <form noValidate aria-label={label} method="post" onSubmit={(event) => event.preventDefault()}>
          {children}
        </form>
      </CommitContext.Provider>
    </FormProvider>
  );
}
