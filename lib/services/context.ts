import type { Actor } from '@/lib/domain/access';

/**
 * What every use-case is given beside its input: `async function verbNoun(context, input)`.
 * Services authorise, act and audit inside one transaction; they throw ServiceError for what is expected.
 */
export interface ServiceContext {
  readonly actor: Actor;
  /** The moment of the request; tests fix it. Absent: the clock. */
  readonly now?: Date;
  /** Ties log lines of one request together. */
  readonly requestId?: string;
}

export function nowOf(context: { readonly now?: Date }): Date {
  return context.now ?? new Date();
}
