import type { PatientBox } from './axes';

/**
 * What must stay free of fold, fixed in the patient. 'whole-picture' is the displayed window of the prescription
 * it was asked for: remedies freeze it to that window's box before they change anything.
 */
export type KeepClearArea =
  | { readonly kind: 'whole-picture' }
  | { readonly kind: 'box'; readonly box: PatientBox; readonly label?: string };

export interface KeepClear {
  readonly area: KeepClearArea;
  /** Anatomy that must stay displayed; absent: the keep-clear area alone. */
  readonly mustStayDisplayed?: PatientBox;
  /** The area follows the window when it is recentred; only while mustStayDisplayed stays inside. */
  readonly followsWindow: boolean;
}
