import type { BenchDocument } from '../state/bench-document';

/** Unsaved edits of one bench in one tab. Keyed by user, and wiped at sign-out. */
export interface KeptEdits {
  readonly shape: 1;
  readonly planId: string;
  readonly version: number;
  readonly document: BenchDocument;
}

export function keptEditsKey(userId: string, subject: string): string {
  return `selvedge/bench/${userId}/${subject}`;
}

type Store = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>;

export function readKeptEdits(store: Store, key: string): KeptEdits | null {
  try {
    const kept = JSON.parse(store.getItem(key) ?? 'null') as Partial<KeptEdits> | null;
    return kept?.shape === 1 && kept.document && kept.planId !== undefined ? (kept as KeptEdits) : null;
  } catch {
    return null; // Not ours, or cut short: nothing to bring back.
  }
}

export function writeKeptEdits(store: Store, key: string, kept: KeptEdits | null): void {
  try {
    if (kept) store.setItem(key, JSON.stringify(kept));
    else store.removeItem(key);
  } catch {
    // A full or forbidden store costs the safety net, not the work on the bench.
  }
}
