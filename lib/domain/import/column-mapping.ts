import type { DateOrder } from './moment';
import type { ImportedSource } from './import-row';
import type { SizeKind, SizeUnit } from './units';

/** What a column of a file can be; a column that is none of these is not read. */
export const IMPORT_FIELDS = [
  'accession', 'start', 'day', 'time', 'slot', 'scanner', 'protocol', 'weight', 'height', 'girth', 'hip-girth',
  'breadth', 'depth', 'sex', 'arms', 'breath-hold', 'taken-on',
] as const;
export type ImportField = (typeof IMPORT_FIELDS)[number];

export const IMPORT_FIELD_LABELS: Readonly<Record<ImportField, string>> = {
  accession: 'Accession number', start: 'Day and time together', day: 'Day', time: 'Time', slot: 'Slot, minutes',
  scanner: 'Scanner', protocol: 'Protocol', weight: 'Weight', height: 'Height', girth: 'Girth at the iliac crest',
  'hip-girth': 'Hip girth', breadth: 'Breadth, right–left', depth: 'Depth, front to back', sex: 'Sex',
  arms: 'Arms', 'breath-hold': 'Breath-hold, seconds', 'taken-on': 'Day the sizes were taken',
};

export const SIZE_FIELDS = ['weight', 'height', 'girth', 'hip-girth', 'breadth', 'depth'] as const satisfies readonly SizeKind[];
export const isSizeField = (field: ImportField): field is SizeKind => (SIZE_FIELDS as readonly string[]).includes(field);

/** Which column is what: by its title, or by its place in a file without titles ("column 3"). */
export type ColumnMapping = Partial<Record<ImportField, string>>;

/** How a site's files are read; kept so that the next file of the same make needs no clicks. */
export interface ImportSettings {
  readonly schemaVersion: 1;
  readonly columns: ColumnMapping;
  readonly units: Partial<Record<SizeKind, SizeUnit>>;
  readonly dateOrder: DateOrder;
  readonly source: ImportedSource;
  /** The site's own words for its scanners and protocols, in lower case, each with the id it means. */
  readonly scanners: Readonly<Record<string, string>>;
  readonly protocols: Readonly<Record<string, string>>;
}

export const NO_SETTINGS: ImportSettings = {
  schemaVersion: 1, columns: {}, units: {}, dateOrder: 'day-first', source: 'reported', scanners: {}, protocols: {},
};

export const columnTitle = (titles: readonly string[] | undefined, index: number): string =>
  titles?.[index]?.trim() || `column ${index + 1}`;

/** Words that titles of such columns contain; the first field that matches takes the column. */
const TITLE_WORDS: readonly (readonly [ImportField, RegExp])[] = [
  ['taken-on', /taken|measured on|size date|weighed on/],
  ['accession', /accession|acc\.? ?(no|num|#)|request (no|num)|order (no|num)|reference/],
  ['slot', /slot|duration|minutes|length of/],
  ['start', /start|date ?(and|&|\/)? ?time|datetime|scheduled|appointment/],
  ['time', /^time|time$/],
  ['day', /^(exam|scan|booking|appt)? ?(day|date)$/],
  ['scanner', /scanner|room|resource|magnet|station/],
  ['protocol', /protocol|exam|procedure|study/],
  ['hip-girth', /hip/],
  ['girth', /girth|waist|circumference/],
  ['weight', /weight/],
  ['height', /height|stature/],
  ['breadth', /breadth|width/],
  ['depth', /depth|sagittal/],
  ['sex', /^sex$/],
  ['arms', /arms?/],
  ['breath-hold', /breath/],
];

/** A first proposal from the titles of a file. A title that speaks of birth or a name is never taken. */
export function guessColumns(titles: readonly string[]): ColumnMapping {
  const found: ColumnMapping = {};
  titles.forEach((title, index) => {
    const words = title.trim().toLowerCase().replace(/[_-]+/g, ' ');
    if (words === '' || /birth|\bdob\b|name\b|address|phone|mail|remark|comment|note/.test(words)) return;
    const field = TITLE_WORDS.find(([candidate, pattern]) => pattern.test(words) && found[candidate] === undefined)?.[0];
    if (field) found[field] = columnTitle(titles, index);
  });
  return found;
}

/** Whether the first row of a file holds titles: none of its cells is a figure, and at least two say something we know. */
export function looksLikeTitles(cells: readonly string[]): boolean {
  return cells.every((cell) => !/^\s*[\d.,:/-]+\s*$/.test(cell)) && Object.keys(guessColumns(cells)).length >= 2;
}

/** What must be mapped before rows can be read; '' when nothing is missing. */
export function missingColumns({ columns }: Pick<ImportSettings, 'columns'>): string {
  const missing: string[] = (['accession', 'scanner', 'protocol'] as const).filter((field) => !columns[field]).map((field) => IMPORT_FIELD_LABELS[field]);
  if (!columns.start && !(columns.day && columns.time)) missing.push('Day and time (together, or Day and Time)');
  return missing.join(', ');
}
