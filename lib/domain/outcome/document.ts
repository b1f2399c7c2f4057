import { readDocument, type Upcasts } from '@/lib/domain/document/read-document';

/** What was seen of wrap in the pictures: none, outside the keep-clear area, or inside it. */
export const WRAPS = ['none', 'outside', 'inside'] as const;
export type Wrap = (typeof WRAPS)[number];

export interface UsedSequence {
  /** The planned sequence it was. */
  readonly id: string;
  readonly name: string;
  /** What was acquired, as whole lines and partitions: a percent is only a scanner's way to ask for them. */
  readonly acquiredLines: number;
  readonly acquiredPartitions?: number;
}

export interface OutcomeDocument {
  readonly schemaVersion: 1;
  readonly sequences: readonly UsedSequence[];
  /** Scan minutes of all sequences together. */
  readonly minutes: number;
  /** Something was scanned again because of fold. */
  readonly repeated: boolean;
  readonly note: string;
}

export interface OutcomeRecord {
  readonly id: string;
  readonly planVersion: number;
  readonly wrap: Wrap;
  readonly document: OutcomeDocument;
  readonly recordedAt: Date;
  readonly recordedBy: string;
}

const UPCASTS: Upcasts = {};

export function readOutcome(stored: unknown): OutcomeDocument {
  return readDocument<OutcomeDocument>(stored, 1, UPCASTS);
}
