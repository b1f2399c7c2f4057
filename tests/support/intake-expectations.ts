/**
 * What the demo files must come to, worked out here from what their writers meant: arithmetic of our own for cells and
 * units, and the engine itself. Services, parsers, storage and pages have no part in it.
 */
import { BUNDLE_BOOKINGS, type BundleSize } from '@/fixtures/files/bookings/demo-bundle-bookings';
import { DEMO_COLUMNS, DEMO_ROWS, UNBOOKABLE_ROWS, type DemoColumn } from '@/fixtures/files/bookings/demo-rows';
import { spreadOf } from '@/lib/domain/import';
import type { SitePolicy } from '@/lib/domain/case/model';
import type { CheckedProtocol, CheckedScanner } from '@/lib/domain/pre-check/check-on-scanner';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import type { PreCheck } from '@/lib/domain/pre-check/result';
import type { PathwayPolicy } from '@/lib/domain/site-policy/document';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';
import type { TapeSite } from '@/lib/domain/size-reading/tape-site';

export interface ExpectedBooking {
  readonly accession: string;
  readonly scheduledAt: Date;
  readonly slotMinutes: number;
  readonly scanner: 'A' | 'B';
  readonly protocol: 'abdomen' | 'pelvis';
  readonly readings: readonly SizeReading[];
}
export interface ExpectationSetup {
  readonly scanners: Readonly<Record<'A' | 'B', CheckedScanner>>;
  readonly protocols: Readonly<Record<'abdomen' | 'pelvis', CheckedProtocol>>;
  readonly policy: SitePolicy;
  readonly pathway: PathwayPolicy;
  /** IANA name of the zone whose wall clocks the CSV's times are of. */
  readonly zone: string;
}

/** The files are dated early in 2027. Moved to a year no session of the demo site reaches, on any day they are read. */
export const movedOn = (text: string, years: number): string => text.replaceAll('2027', String(2027 + years)).replaceAll('2026', String(2026 + years));
export const YEARS_ON = new Date().getFullYear() + 2 - 2027;

const POUND_KG = 0.45359237;
const INCH_CM = 2.54;
const tenth = (value: number) => Math.round(value * 10) / 10;

function reading(quantity: SizeQuantity, value: number, takenOn: string, source: 'measured' | 'reported' = 'measured', tapeSite?: TapeSite): SizeReading {
  const spread = spreadOf({ quantity, source, ...(tapeSite ? { tapeSite } : {}) } as Parameters<typeof spreadOf>[0]);
  return { id: quantity, quantity, value, source, spread, takenOn, recordedAt: new Date(0), ...(tapeSite ? { tapeSite } : {}) };
}

/** A winter wall-clock time of a zone, by the zone's own written offset on that day. */
function inZone(day: string, time: string, zone: string): Date {
  const noon = new Date(`${day}T12:00:00Z`);
  const name = new Intl.DateTimeFormat('en-GB', { timeZone: zone, timeZoneName: 'longOffset' }).formatToParts(noon).find(({ type }) => type === 'timeZoneName')!.value;
  return new Date(`${day}T${time}:00${name.replace('GMT', '') || 'Z'}`);
}

const dayOf = (text: string): string => {
  const [day, month, year] = movedOn(text, YEARS_ON).split('.');
  return `${year}-${month!.padStart(2, '0')}-${day!.padStart(2, '0')}`;
};

function rowBooking(row: readonly string[], zone: string): ExpectedBooking {
  const cell = (column: DemoColumn) => row[DEMO_COLUMNS.indexOf(column)] ?? '';
  const figure = (column: DemoColumn) => Number(cell(column).replace(' cm', '').replace(' s', '').replace(',', '.'));
  const takenOn = cell('Measured on') && dayOf(cell('Measured on'));
  const waist = cell('Waist (in)');
  const arms = { up: 1, down: 0, 'cannot be raised': 2 }[cell('Arms')];
  return {
    accession: cell('Accession number'), scheduledAt: inZone(dayOf(cell('Exam date')), cell('Time'), zone),
    slotMinutes: Number(cell('Minutes').replace(' min', '')) || 45,
    scanner: cell('Room').endsWith('1') ? 'A' : 'B', protocol: cell('Exam') === 'Abdo' ? 'abdomen' : 'pelvis',
    readings: [
      ...(cell('Weight (lb)') ? [reading('weight-kg', tenth(figure('Weight (lb)') * POUND_KG), takenOn)] : []),
      ...(cell('Height (cm)') ? [reading('height-cm', figure('Height (cm)'), takenOn)] : []),
      ...(waist ? [reading('girth-cm', waist.endsWith('cm') ? figure('Waist (in)') : tenth(figure('Waist (in)') * INCH_CM), takenOn)] : []),
      ...(cell('Breadth (mm)') ? [reading('breadth-mm', figure('Breadth (mm)'), takenOn), reading('depth-mm', figure('Depth (mm)'), takenOn)] : []),
      ...(cell('Sex') ? [reading('sex', cell('Sex') === 'F' ? 1 : 2, takenOn)] : []),
      ...(arms === undefined ? [] : [reading('arms-position', arms, takenOn)]),
      ...(cell('Breath-hold (s)') ? [reading('breath-hold-s', figure('Breath-hold (s)'), takenOn)] : []),
    ],
  };
}

export const csvBookings = (zone: string): ExpectedBooking[] =>
  DEMO_ROWS.filter((_, index) => !UNBOOKABLE_ROWS.includes(index)).map((row) => rowBooking(row, zone));

const KG: Readonly<Record<string, number>> = { kg: 1, g: 0.001, '[lb_av]': POUND_KG };
const CM: Readonly<Record<string, number>> = { cm: 1, m: 100, mm: 0.1, '[in_i]': INCH_CM };

function bundleReading({ loinc, value, unit, on }: BundleSize, heightCm: number): SizeReading {
  const takenOn = movedOn(on, YEARS_ON);
  switch (loinc) {
    case '8302-2': return reading('height-cm', heightCm, takenOn);
    case '29463-7': return reading('weight-kg', tenth(value * KG[unit]!), takenOn);
    case '39156-5': return reading('weight-kg', tenth(value * (heightCm / 100) ** 2), takenOn, 'reported');
    case '8280-0': return reading('girth-cm', tenth(value * CM[unit]!), takenOn, 'measured', 'umbilicus');
    default: return reading('girth-cm', tenth(value * CM[unit]!), takenOn, 'measured', 'iliac-crest');
  }
}

export const bundleBookings = (): ExpectedBooking[] =>
  BUNDLE_BOOKINGS.map(({ accession, start, minutes, scanner, protocol, sizes }) => {
    const height = sizes.find(({ loinc }) => loinc === '8302-2')!;
    return {
      accession, slotMinutes: minutes, scheduledAt: new Date(movedOn(start, YEARS_ON)),
      scanner: scanner === 'Scanner A' ? 'A' : 'B', protocol: protocol === 'Liver' ? 'abdomen' : 'pelvis',
      readings: sizes.map((size) => bundleReading(size, tenth(height.value * CM[height.unit]!))),
    };
  });

/** The engine's own answer to a booking with no session entered and no plan. */
export function expectedCheck(booking: ExpectedBooking, { scanners, protocols, policy, pathway }: ExpectationSetup): PreCheck {
  const { scheduledAt, slotMinutes, readings, scanner } = booking;
  return preCheck({
    booking: { scheduledAt, slotMinutes, surgeryOn: '' },
    readings, policy, pathway, sessions: [],
    scanner: scanners[scanner], others: [scanners[scanner === 'A' ? 'B' : 'A']], protocol: protocols[booking.protocol],
  });
}
