export { CsvError } from './csv-error';
export { CsvReader, MAX_FIELD_LENGTH, MAX_FIELDS, type CsvRow, type Delimiter } from './csv-reader';
export { TextPieces } from './decode-text';
export { detectDelimiter } from './detect-delimiter';
export { readNumber } from './read-number';
export { writeRow } from './write-row';
