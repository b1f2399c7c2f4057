import type { ErrorView } from '@/lib/domain/errors';

/** What a server action returns to its form: the result, or the error with what to show beside each control. */
export type ActionResult<T = undefined> =
  | { readonly ok: true; readonly data: T }
  | { readonly ok: false; readonly error: ErrorView };
