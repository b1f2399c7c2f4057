import type { Paper, SheetState } from '@/lib/domain/plan/sheet';
import type { Scene } from './scene';

/** A grey picture and lines a page, forty pages at most; the table refuses more. */
export const HAND_OUT_MAX_BYTES = 8_388_608;

/** What goes on paper for the audience: no note, no name of a scanner. */
export interface HandOut {
  readonly title: string;
  readonly scenes: readonly Omit<Scene, 'note'>[];
}

/** A hand-out as a file, or the place where it will be. */
export interface HandOutRecord {
  readonly siteId: string;
  readonly id: string;
  readonly demonstrationId: string;
  readonly paper: Paper;
  readonly contentHash: string;
  readonly state: SheetState;
  readonly attempts: number;
  readonly sizeBytes: number | null;
}
