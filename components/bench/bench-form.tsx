'use client';

import { zodResolver } from '@hookform/resolvers/zod';
import { createContext, useCallback, useContext, useEffect, useRef, type ReactNode } from 'react';
import { FormProvider, useForm, useFormContext, type FieldValues } from 'react-hook-form';
import type * as z from 'zod';
import { useBench, useBenchState } from './bench-context';
import type { BenchState } from './state/bench-state';

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

/** Writes what changed on the bench into the fields it changed; renders nothing, so a drag costs no more than that. */
function FollowBench<T>({ select }: { select: (state: BenchState) => T }) {
  const value = useBenchState(select);
  const { getValues, setValue, clearErrors } = useFormContext();
  const shown = useRef(value);
  useEffect(() => {
    const changed = changedLeaves(shown.current, value);
    shown.current = value;
    for (const [path, leaf] of changed) {
      if (Object.is(getValues(path), leaf)) continue;
      setValue(path, leaf);
      clearErrors(path);
    }
  }, [value, getValues, setValue, clearErrors]);
  return null;
}

/**
 * A form over part of the bench. Typing goes field → schema → bench; a drag on the canvas comes back bench → field,
 * and touches only the fields that changed: a refused value that waits elsewhere stays as it was typed.
 */
export function BenchForm<T extends FieldValues>({
  schema,
  select,
  label,
  onEdit,
  children,
}: {
  schema: z.ZodType;
  /** The part of the bench this form is over; one and the same function at every render. */
  select: (state: BenchState) => T;
  label: string;
  onEdit: (path: string, value: unknown, step?: string) => void;
  children: ReactNode;
}) {
  const { store } = useBench();
  const form = useForm<T>({
    resolver: zodResolver(schema as never) as never,
    defaultValues: select(store.read()) as never,
    mode: 'onChange',
  });
  const edit = useRef(onEdit);
  useEffect(() => {
    edit.current = onEdit;
  }, [onEdit]);

  const commit = useCallback<Commit>(
    (path, leaf, step) => {
      const parsed = schema.safeParse(withLeaf(select(store.read()), path.split('.'), leaf));
      if (parsed.success || !parsed.error.issues.some((issue) => issue.path.join('.').startsWith(path))) {
        edit.current(path, leaf, step);
      }
    },
    [schema, select, store],
  );

  return (
    <FormProvider {...form}>
      <CommitContext.Provider value={commit}>
        <FollowBench select={select} />
        <form noValidate aria-label={label} method="post" onSubmit={(event) => event.preventDefault()}>
          {children}
        </form>
      </CommitContext.Provider>
    </FormProvider>
  );
}
