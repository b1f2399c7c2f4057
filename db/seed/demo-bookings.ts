import type { ReadingSource } from '@/lib/domain/case/model';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';

interface DemoReading {
  readonly quantity: SizeQuantity;
  readonly value: number;
  readonly source: ReadingSource;
  readonly spread: number;
}

export interface DemoBooking {
  readonly accession: string;
  /** Days from the first day of the demo, and time of day (UTC). */
  readonly day: number;
  readonly at: string;
  readonly slotMinutes: number;
  readonly scanner: 'A' | 'B';
  readonly protocol: 'abdomen' | 'pelvis';
  /** Days before the first day on which the sizes were taken. */
  readonly sizedDaysBefore: number;
  readonly readings: readonly DemoReading[];
}

const read = (quantity: SizeQuantity, value: number, source: ReadingSource, spread: number): DemoReading => ({
  quantity, value, source, spread,
});
const measured = (quantity: SizeQuantity, value: number, spread = 3) => read(quantity, value, 'measured', spread);
const reported = (quantity: SizeQuantity, value: number, spread: number) => read(quantity, value, 'reported', spread);
const localiser = (quantity: SizeQuantity, value: number) => read(quantity, value, 'localiser', 2);
const breath = (holdS: number, periodS: number) => [reported('breath-hold-s', holdS, 2), measured('breath-period-s', periodS, 0.5)];
const arms = (position: 'down' | 'up' | 'cannot be raised') =>
  measured('arms-position', { down: 0, up: 1, 'cannot be raised': 2 }[position], 0);
const FEMALE = measured('sex', 1, 0);
const MALE = measured('sex', 2, 0);

/** Twelve invented patients of large habitus, known to very different degrees. */
export const DEMO_BOOKINGS: readonly DemoBooking[] = [
  {
    accession: 'HB-2107', day: 0, at: '08:20', slotMinutes: 45, scanner: 'B', protocol: 'abdomen', sizedDaysBefore: 6,
    readings: [measured('breadth-mm', 480), reported('depth-mm', 340, 12), measured('weight-kg', 146, 1), measured('height-cm', 174, 1), MALE, arms('down'), ...breath(18, 4.2), measured('shoulder-breadth-mm', 520), measured('elbow-breadth-mm', 520)],
  },
  {
    accession: 'HB-2109', day: 0, at: '09:20', slotMinutes: 45, scanner: 'A', protocol: 'abdomen', sizedDaysBefore: 3,
    readings: [measured('girth-cm', 131, 2), measured('weight-kg', 128, 1), measured('height-cm', 168, 1), FEMALE, arms('up'), ...breath(14, 3.8)],
  },
  {
    accession: 'HB-2112', day: 0, at: '10:40', slotMinutes: 40, scanner: 'B', protocol: 'pelvis', sizedDaysBefore: 9,
    readings: [measured('breadth-mm', 455), measured('depth-mm', 305), measured('hip-girth-cm', 138, 2), measured('weight-kg', 121, 1), measured('height-cm', 166, 1), FEMALE, arms('down'), ...breath(20, 4), measured('elbow-breadth-mm', 480)],
  },
  {
    accession: 'HB-2113', day: 0, at: '13:10', slotMinutes: 45, scanner: 'B', protocol: 'abdomen', sizedDaysBefore: 12,
    readings: [reported('weight-kg', 172, 4), reported('height-cm', 181, 2), MALE, arms('cannot be raised'), reported('breath-hold-s', 10, 3)],
  },
  {
    accession: 'HB-2116', day: 0, at: '14:20', slotMinutes: 45, scanner: 'A', protocol: 'abdomen', sizedDaysBefore: 1,
    readings: [localiser('extent-right-mm', 214), localiser('extent-left-mm', 206), localiser('extent-anterior-mm', 138), localiser('extent-posterior-mm', 150), measured('weight-kg', 118, 1), measured('height-cm', 169, 1), FEMALE, arms('up'), ...breath(22, 4.4), measured('shoulder-breadth-mm', 470), measured('elbow-breadth-mm', 450), measured('hip-breadth-mm', 440)],
  },
  {
    accession: 'HB-2118', day: 1, at: '08:20', slotMinutes: 45, scanner: 'B', protocol: 'abdomen', sizedDaysBefore: 20,
    readings: [measured('girth-cm', 148, 2), measured('depth-mm', 372, 6), measured('weight-kg', 163, 1), MALE, arms('down'), ...breath(12, 3.6)],
  },
  {
    accession: 'HB-2121', day: 1, at: '10:00', slotMinutes: 40, scanner: 'A', protocol: 'pelvis', sizedDaysBefore: 4,
    readings: [measured('breadth-mm', 470), measured('depth-mm', 322), measured('weight-kg', 208, 1), measured('height-cm', 176, 1), FEMALE, arms('up'), measured('shoulder-breadth-mm', 530), measured('elbow-breadth-mm', 510), measured('hip-breadth-mm', 490)],
  },
  {
    accession: 'HB-2122', day: 1, at: '11:30', slotMinutes: 45, scanner: 'A', protocol: 'abdomen', sizedDaysBefore: 2,
    readings: [measured('weight-kg', 134, 1)],
  },
  {
    accession: 'HB-2126', day: 2, at: '09:10', slotMinutes: 45, scanner: 'B', protocol: 'abdomen', sizedDaysBefore: 75,
    readings: [measured('breadth-mm', 520), measured('depth-mm', 395), measured('weight-kg', 188, 1), MALE, arms('down'), ...breath(9, 3.2)],
  },
  {
    accession: 'HB-2130', day: 2, at: '13:40', slotMinutes: 40, scanner: 'B', protocol: 'pelvis', sizedDaysBefore: 5,
    readings: [measured('breadth-mm', 405), measured('depth-mm', 242), measured('weight-kg', 104, 1), measured('height-cm', 165, 1), FEMALE, arms('up'), ...breath(16, 4), measured('shoulder-breadth-mm', 450), measured('elbow-breadth-mm', 430), measured('hip-breadth-mm', 430)],
  },
  {
    accession: 'HB-2133', day: 3, at: '08:40', slotMinutes: 45, scanner: 'A', protocol: 'abdomen', sizedDaysBefore: 7,
    readings: [measured('breadth-mm', 445), measured('depth-mm', 312), measured('weight-kg', 131, 1), FEMALE, arms('up'), ...breath(17, 4.1)],
  },
  {
    accession: 'HB-2137', day: 4, at: '11:00', slotMinutes: 50, scanner: 'B', protocol: 'abdomen', sizedDaysBefore: 10,
    readings: [localiser('extent-right-mm', 262), localiser('extent-left-mm', 248), localiser('extent-anterior-mm', 171), localiser('extent-posterior-mm', 182), measured('weight-kg', 176, 1), MALE, arms('down'), ...breath(15, 3.9)],
  },
];
