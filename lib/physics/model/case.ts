import type { KeepClear } from './keep-clear';
import type { Patient } from './patient';
import type { SitePolicy } from './policy';
import type { Prescription } from './prescription';
import type { Scanner } from './scanner';

/** The one question: everything `assess` and `rankRemedies` take. */
export interface Case {
  readonly patient: Patient;
  readonly prescription: Prescription;
  readonly keepClear: KeepClear;
  readonly scanner: Scanner;
  readonly policy: SitePolicy;
}
