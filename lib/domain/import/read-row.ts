import { accessionRefusal } from '@/lib/domain/booking/accession';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import { isSizeField, type ImportField, type ImportSettings, IMPORT_FIELD_LABELS, SIZE_FIELDS } from './column-mapping';
import { SLOT_MINUTES, type ImportedQuantity, type ImportedReading, type ImportRow } from './import-row';
import { dayText, momentInZone, readDay, readMoment, readTime } from './moment';
import { toCm, toKg, toMm, type LengthUnit, type MassUnit, type SizeKind, type SizeUnit } from './units';

export interface RowReading {
  readonly settings: ImportSettings;
  readonly mask: string;
  readonly zone: string;
  /** Slot where the file has none. */
  readonly slotMinutes: number;
  readonly readNumber: (text: string) => number | undefined;
}

export type ReadRow = { readonly row: ImportRow } | { readonly skipped: string };

/** The cells of one row by what they are; unmapped cells are not in it. */
export type MappedCells = Partial<Record<ImportField, string>>;

class Refusal extends Error {}
const refuse = (field: ImportField, allowed: string): never => {
  throw new Refusal(`${IMPORT_FIELD_LABELS[field]}: not readable; allowed: ${allowed}`);
};

const QUANTITY_OF: Readonly<Record<SizeKind, ImportedQuantity>> = {
  weight: 'weight-kg', height: 'height-cm', girth: 'girth-cm', 'hip-girth': 'hip-girth-cm', breadth: 'breadth-mm', depth: 'depth-mm',
};
const ARMS: Readonly<Record<string, number>> = { down: 0, up: 1, 'cannot be raised': 2, 'cannot-be-raised': 2, no: 2, yes: 1 };
const SEXES: Readonly<Record<string, number>> = { f: 1, female: 1, woman: 1, w: 1, m: 2, male: 2, man: 2 };

/** A unit written behind the figure outranks the column's. */
function splitUnit(text: string, fallback: SizeUnit | undefined): { figure: string; unit: SizeUnit | undefined } {
  const match = /^(.*?\d)\s*(mm|cm|in|inch|inches|"|kg|lbs?|pounds)\.?$/i.exec(text.trim());
  if (!match) return { figure: text, unit: fallback };
  const written = match[2]!.toLowerCase();
  const unit = written === 'mm' || written === 'cm' || written === 'kg' ? written : written.startsWith('i') || written === '"' ? 'in' : 'lb';
  return { figure: match[1]!, unit };
}

function inRange(field: ImportField, quantity: ImportedQuantity, value: number | undefined, note: string): number {
  const { min, max, unit } = QUANTITY_FACTS[quantity];
  if (value === undefined || !(value >= min && value <= max)) return refuse(field, `a number that comes to ${min} to ${max} ${unit}${note}`);
  return value;
}

function readSize(field: SizeKind, text: string, { settings, readNumber }: RowReading): ImportedReading {
  const { figure, unit } = splitUnit(text, settings.units[field]);
  const quantity = QUANTITY_OF[field];
  const isMass = unit === 'kg' || unit === 'lb';
  if (unit === undefined || isMass !== (field === 'weight')) refuse(field, field === 'weight' ? 'kg or lb' : 'mm, cm or in');
  const given = readNumber(figure);
  const convert = quantity === 'weight-kg'
    ? (value: number) => toKg(value, unit as MassUnit)
    : (value: number) => (quantity.endsWith('-mm') ? toMm : toCm)(value, unit as LengthUnit);
  const value = inRange(field, quantity, given === undefined ? undefined : convert(given), `, read as ${unit}`);
  return { quantity, value, source: settings.source };
}

function readReadings(cells: MappedCells, reading: RowReading): ImportedReading[] {
  const { settings } = reading;
  const has = (field: ImportField) => (cells[field] ?? '').trim() !== '';
  const readings: ImportedReading[] = SIZE_FIELDS.filter((field) => isSizeField(field) && has(field)).map((field) => readSize(field, cells[field]!, reading));
  const coded = (field: ImportField, quantity: ImportedQuantity, words: Readonly<Record<string, number>>, allowed: string) => {
    if (!has(field)) return;
    const value = words[cells[field]!.trim().toLowerCase()];
    readings.push({ quantity, value: value ?? refuse(field, allowed), source: settings.source });
  };
  coded('sex', 'sex', SEXES, 'female or male, F or M');
  coded('arms', 'arms-position', ARMS, 'up, down, cannot be raised');
  if (has('breath-hold')) {
    const value = inRange('breath-hold', 'breath-hold-s', reading.readNumber(cells['breath-hold']!.replace(/\s*s$/i, '')), '');
    readings.push({ quantity: 'breath-hold-s', value, source: settings.source });
  }
  if (!has('taken-on') || readings.length === 0) return readings;
  const day = readDay(cells['taken-on']!, settings.dateOrder) ?? refuse('taken-on', 'a day of this century');
  return readings.map((one) => ({ ...one, takenOn: dayText(day) }));
}

function readStart(cells: MappedCells, { settings, zone }: RowReading): string {
  if (settings.columns.start) {
    return readMoment(cells.start ?? '', settings.dateOrder, zone) ?? refuse('start', 'a day and time that exist, such as 2026-12-01 10:40');
  }
  const day = readDay(cells.day ?? '', settings.dateOrder) ?? refuse('day', 'a day of this century, such as 2026-12-01');
  const time = readTime(cells.time ?? '') ?? refuse('time', 'a time such as 10:40');
  return momentInZone(day, time, zone) ?? refuse('time', 'a time that clocks show on that day');
}

function readSlot(cells: MappedCells, { readNumber, slotMinutes }: RowReading): number {
  const text = (cells.slot ?? '').trim();
  if (text === '') return slotMinutes;
  const minutes = readNumber(text.replace(/\s*min(utes)?\.?$/i, ''));
  const { min, max } = SLOT_MINUTES;
  if (minutes === undefined || !Number.isInteger(minutes) || minutes < min || minutes > max) return refuse('slot', `whole minutes, ${min} to ${max}`);
  return minutes;
}

export const nameKey = (text: string): string => text.trim().toLowerCase().replace(/\s+/g, ' ');

function readName(field: 'scanner' | 'protocol', cells: MappedCells, ids: Readonly<Record<string, string>>): string {
  const key = nameKey(cells[field] ?? '');
  if (key === '') return refuse(field, 'a name that is matched above');
  return Object.hasOwn(ids, key) && ids[key] ? ids[key] : refuse(field, 'a name that is matched above');
}

/** One row of a file as a booking with sizes, or why it is left out. The reason never repeats what stood in the row. */
export function readImportRow(number: number, cells: MappedCells, reading: RowReading): ReadRow {
  try {
    const accession = (cells.accession ?? '').trim();
    const refused = accessionRefusal(accession, reading.mask);
    if (refused) return { skipped: `Accession number: not in the form ${reading.mask}, or like a name or a date` };
    return {
      row: {
        number, accession,
        scheduledAt: readStart(cells, reading),
        slotMinutes: readSlot(cells, reading),
        scannerId: readName('scanner', cells, reading.settings.scanners),
        protocolId: readName('protocol', cells, reading.settings.protocols),
        readings: readReadings(cells, reading),
      },
    };
  } catch (error) {
    if (error instanceof Refusal) return { skipped: error.message };
    throw error;
  }
}
