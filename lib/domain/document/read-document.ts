/** A stored JSON document; `schemaVersion` says which shape it was written in. */
export interface VersionedDocument {
  readonly schemaVersion: number;
}

/** Step n turns a document of version n into one of version n + 1. */
export type Upcasts = Readonly<Record<number, (old: Record<string, unknown>) => Record<string, unknown>>>;

/**
 * Reads a stored document in today's shape. Old ones are lifted step by step; one written by a newer program is
 * refused, because guessing at it could lose what it holds.
 */
export function readDocument<T extends VersionedDocument>(stored: unknown, current: T['schemaVersion'], upcasts: Upcasts): T {
  if (typeof stored !== 'object' || stored === null || !('schemaVersion' in stored)) {
    throw new Error('A stored document has no schemaVersion.');
  }
  let document = stored as Record<string, unknown>;
  for (let version = Number(document.schemaVersion); version !== current; version = Number(document.schemaVersion)) {
    const lift = upcasts[version];
    if (version > current || lift === undefined) {
      throw new Error(`A stored document has schemaVersion ${version}; this program reads up to ${current}.`);
    }
    document = { ...lift(document), schemaVersion: version + 1 };
  }
  return document as unknown as T;
}
